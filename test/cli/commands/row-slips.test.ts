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
    [['8,2', '1,9']],
    [['a=8,2', 'b=1,9']],
    [['counts, final.csv']],
    [['my table.csv']],
    [['8,', 'a.csv']],
    [['8', '2']],
    [['8,-', '1,9']],
    [[]],
  ])('%j is left to others', (operands) => {
    expect(() => refuseRowSlips(operands)).not.toThrow();
  });
});
