import { describe, expect, it } from 'vitest';
import { anyText } from '../../../src/cli/arguments/check-value.js';
import { flagOf, repeatable, toggle, valued } from '../../../src/cli/arguments/option.js';
import { scan } from '../../../src/cli/arguments/scan.js';
import { problemOf } from '../problem-of.js';

const declarations = {
  seed: valued('How p is found', 'TEXT', anyText, 'a seed'),
  twoSidedRule: valued('The test', 'RULE', anyText, 'a rule'),
  output: valued('The report', 'FILE', anyText, 'a file', 'o'),
  quiet: toggle('The report', 'no remarks', 'q'),
  color: toggle('The report', 'colours'),
  noColor: toggle('The report', 'no colours'),
  drop: repeatable('Reading the table', 'LABELS', anyText, 'levels'),
};
const scanned = (...words: string[]) => scan(words, declarations);

describe('which words are options and which are operands', () => {
  it('takes options before, between and after operands', () => {
    expect(scanned('--seed', 'a', '8,2', '-q', '1,9', '--two-sided-rule=distance')).toEqual({
      options: ['--seed=a', '--quiet', '--two-sided-rule=distance'],
      operands: ['8,2', '1,9'],
    });
  });

  it('leaves a row that begins with a negative count among the operands', () => {
    expect(scanned('-8,2', '1,9', '-.5').operands).toEqual(['-8,2', '1,9', '-.5']);
  });

  it('takes a value that begins with one hyphen, as lists of scores do', () => {
    expect(scanned('--seed', '-1,0,1')).toEqual({ options: ['--seed=-1,0,1'], operands: [] });
  });

  it('takes everything after -- as operands, options included', () => {
    expect(scanned('-q', '--', '--seed', '-x', '--')).toEqual({
      options: ['--quiet'],
      operands: ['--seed', '-x', '--'],
    });
  });

  it('takes a lone hyphen as the name of standard input, and as a value', () => {
    expect(scanned('-', '-o', '-')).toEqual({ options: ['--output=-'], operands: ['-'] });
  });

  it('splits a joined value at its first equals sign only, and keeps an empty one', () => {
    expect(scanned('--seed=a=b', '--output=').options).toEqual(['--seed=a=b', '--output=']);
  });

  it('takes a value that begins with two hyphens only when it is joined', async () => {
    expect(scanned('--seed=--quiet').options).toEqual(['--seed=--quiet']);
    const problem = await problemOf(() => scanned('--seed', '--quiet'));
    expect(problem).toMatchObject({ code: 'missing-value', kind: 'usage' });
    expect(problem.hint).toContain('--seed=--quiet');
  });

  it('says that the value is missing when the option comes last, by its long name', async () => {
    const problem = await problemOf(() => scanned('8,2', '-o'));
    expect(problem).toMatchObject({ code: 'missing-value', hint: 'write --output FILE' });
  });

  it('takes -- after an option as the end of options, not as its value', async () => {
    expect((await problemOf(() => scanned('--seed', '--'))).code).toBe('missing-value');
  });

  it('suggests the option that was meant, for one hyphen too many or too few', async () => {
    for (const typed of ['--sede', '-seed', '--seeed=5', '--SEED']) {
      const problem = await problemOf(() => scanned(typed));
      expect(problem).toMatchObject({ code: 'unknown-option', hint: 'did you mean --seed?' });
    }
  });

  it('suggests nothing when nothing is near', async () => {
    expect((await problemOf(() => scanned('--frobnicate'))).hint).not.toContain('did you mean');
  });

  it('refuses a value given to a switch', async () => {
    expect(await problemOf(() => scanned('--quiet=yes'))).toMatchObject({
      code: 'needless-value',
      message: '--quiet takes no value',
    });
  });
});

it('a flag is the name of its option with hyphens for capitals', () => {
  expect(flagOf('samplingConfidence')).toBe('--sampling-confidence');
});

describe('two answers to one question', () => {
  it.each([
    [
      'two values, long and short',
      ['-o', 'a', '--output=b'],
      'given-twice',
      /--output is given twice, as "a" and as "b"/,
    ],
    ['an empty value beside another', ['--seed=', '--seed', 'x'], 'given-twice', /as "" and as "x"/],
    ['a switch and its opposite', ['--no-color', '--color'], 'contradiction', /--color and --no-color contradict/],
  ])('are refused: %s', async (_case, words, code, message) => {
    const problem = await problemOf(() => scanned(...words));
    expect(problem).toMatchObject({ code, kind: 'usage' });
    expect(problem.message).toMatch(message);
  });

  it('are one where they agree, and where an option may be given several times', () => {
    expect(scanned('--seed', 'a', '--seed=a', '-q', '--quiet', '--drop', 'x', '--drop', 'y').options).toHaveLength(6);
  });
});
