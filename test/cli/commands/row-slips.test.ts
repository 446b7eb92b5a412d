// What was probably meant is said, never done; words that can be read are left alone.
import { describe, expect, it } from 'vitest';
import { refuseRowSlips } from '../../../src/cli/commands/row-slips.js';
import { problemOf } from '../problem-of.js';

describe('rows with a slip are refused with what to type', () => {
  it.each([
    ['blanks after commas', ['8,', '2', '1,', '9'], '8,2 1,9'],
    ['blanks before commas', ['8', ',2', '1', ',9'], '8,2 1,9'],
    ['blanks around commas', ['8', ',', '2', '1', ',', '9'], '8,2 1,9'],
    ['blanks around equals signs', ['treated', '=', '8,2', 'control', '=', '1,9'], 'treated=8,2 control=1,9'],
    ['a comma at the end of each row', ['8,2,', '1,9,'], '8,2 1,9'],
    ['a comma between rows', ['8,2,', '1,9'], '8,2 1,9'],
    ['quotes around all', ['8,2 1,9'], '8,2 1,9'],
    ['brackets', ['[[8,2],[1,9]]'], '8,2 1,9'],
    ['brackets and blanks', ['[[8,', '2],', '[1,', '9]]'], '8,2 1,9'],
  ])('%s', async (_case, operands, wanted) => {
    const problem = await problemOf(() => refuseRowSlips(operands));
    expect(problem).toMatchObject({ code: 'row-slip', exitStatus: 2 });
    expect(problem.hint.endsWith(`: ${wanted}`)).toBe(true);
  });

  it.each([
    ['counts one by one', ['8', '2', '1', '9'], 'for two rows 8,2 1,9'],
    ['counts one by one, a comma after each', ['8,', '2,', '1,', '9'], 'for two rows 8,2 1,9'],
    ['six of them', ['8', '2', '3', '1', '9', '4'], 'for two rows 8,2,3 1,9,4'],
    ['an odd number of them', ['8', '2', '1'], 'for example 8,2 1,9'],
    ['two of them', ['8', '2'], 'for example 8,2 1,9'],
    ['labelled ones', ['a=8', 'b=2'], 'for example 8,2 1,9'],
    ['one alone', ['8'], 'for example 8,2 1,9'],
    ['events of totals', ['8/10', '1/10'], 'write 8,2 1,9 if these are events of totals, else 8,10 1,10'],
    ['strokes that are no share', ['8/2', '1/9'], ': 8,2 1,9'],
    ['semicolons', ['8;2', '1;9'], ': 8,2 1,9'],
    ['hyphens', ['8-2', '1-9'], ': 8,2 1,9'],
  ])('%s', async (_case, operands, end) => {
    const problem = await problemOf(() => refuseRowSlips(operands));
    expect(problem).toMatchObject({ code: 'row-slip', exitStatus: 2 });
    expect(problem.hint.endsWith(end), problem.hint).toBe(true);
  });

  it.each([
    [['8,2', '1,9']],
    [['8-2']],
    [['2026-12-01.csv', '1-9']],
    [['a=8,2', 'b=1,9']],
    [['counts, final.csv']],
    [['my table.csv']],
    [['8,', 'a.csv']],
    [['8,-', '1,9']],
    [[]],
  ])('%j is left to others', (operands) => {
    expect(() => refuseRowSlips(operands)).not.toThrow();
  });
});
