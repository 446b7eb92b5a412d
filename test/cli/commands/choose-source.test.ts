import { describe, expect, it } from 'vitest';
import { chooseSource } from '../../../src/cli/commands/choose-source.js';
import { problemOf } from '../problem-of.js';

const piped = (): boolean => false;
const terminal = (): boolean => true;

describe('where the table stands', () => {
  it('rows typed in are the table, even when input is piped', () => {
    expect(chooseSource(['a=8,2', '1,9'], {}, piped)).toEqual({ form: 'inline', rows: ['a=8,2', '1,9'] });
  });

  it('a row with a negative count is still a row', () => {
    expect(chooseSource(['-8,2'], {}, terminal)).toEqual({ form: 'inline', rows: ['-8,2'] });
  });

  it('any other word is a file, and so is a row with ./ in front', () => {
    expect(chooseSource(['counts.csv'], {}, terminal)).toEqual({ form: 'cross-table', path: 'counts.csv' });
    expect(chooseSource(['./8,2'], {}, terminal)).toEqual({ form: 'cross-table', path: './8,2' });
  });

  it('a lone hyphen is standard input, at a terminal too', () => {
    expect(chooseSource(['-'], {}, terminal)).toEqual({ form: 'cross-table', path: null });
  });

  it('nothing named is standard input when that is piped, and nothing at all at a terminal', () => {
    expect(chooseSource([], {}, piped)).toEqual({ form: 'cross-table', path: null });
    expect(chooseSource([], {}, terminal)).toBeUndefined();
  });

  it('--rows and --columns make it raw records', () => {
    const given = { rows: 'ward', columns: 'outcome' };
    expect(chooseSource(['visits.csv'], given, terminal)).toEqual({ form: 'records', path: 'visits.csv' });
    expect(chooseSource([], given, piped)).toEqual({ form: 'records', path: null });
  });
});

describe('what does not go together', () => {
  it.each([
    ['rows and a file', ['8,2', 'x.csv'], {}, 'rows-with-files'],
    ['an empty word', [''], {}, 'empty-word'],
    ['a blank word', [' '], {}, 'empty-word'],
    ['rows and standard input', ['8,2', '-'], {}, 'rows-with-files'],
    ['two files', ['a.csv', 'b.csv'], {}, 'two-files'],
    ['standard input and a file', ['-', 'b.csv'], {}, 'two-files'],
    ['--rows without --columns', ['a.csv'], { rows: 'x' }, 'rows-without-columns'],
    ['--columns without --rows', ['a.csv'], { columns: 'x' }, 'rows-without-columns'],
    ['--count without both', ['a.csv'], { count: 'n' }, 'rows-without-columns'],
    ['--missing without both', ['a.csv'], { missing: 'drop' }, 'rows-without-columns'],
    ['--rows with rows typed in', ['8,2', '1,9'], { rows: 'a', columns: 'b' }, 'option-does-not-fit'],
    ['--delimiter with rows typed in', ['8,2', '1,9'], { delimiter: 'comma' }, 'option-does-not-fit'],
    ['--header-row with raw records', ['a.csv'], { rows: 'a', columns: 'b', headerRow: 'yes' }, 'option-does-not-fit'],
    ['--row-labels with raw records', ['a.csv'], { rows: 'a', columns: 'b', rowLabels: 'x' }, 'option-does-not-fit'],
    ['--drop-totals and --keep-totals', ['a.csv'], { dropTotals: true, keepTotals: true }, 'drop-and-keep-totals'],
    ['both for rows typed in', ['8,2'], { dropTotals: true, keepTotals: true }, 'drop-and-keep-totals'],
  ])('%s is wrong usage', async (_case, operands, given, code) => {
    const problem = await problemOf(() => chooseSource(operands, given, terminal));
    expect(problem).toMatchObject({ kind: 'usage', code });
    expect(problem.hint).not.toBe('');
  });
});
