import { describe, expect, it } from 'vitest';
import { tableLines } from '../../src/report/text-table.js';
import { beforeWords, emptyRow, hostileLabels, waldExact, wideTable } from '../helpers/sample-results.js';
import type { InputEcho } from '../../src/result/result.js';

const linesOf = (input: InputEcho, width: number): string[] => tableLines(input, width).map((line) => line.trimEnd());

function inputWith(rowLabels: string[], columnLabels: string[], count = 1): InputEcho {
  return beforeWords({
    input: { rowLabels, columnLabels, counts: rowLabels.map(() => columnLabels.map(() => count)) },
    statistic: { name: 'pearson', value: 0 },
    pValues: waldExact.pValues,
  }).input;
}

describe('the table in text', () => {
  it('stands with its margins, totals ruled off', () => {
    expect(linesOf(emptyRow.input, 78)).toEqual([
      '              none   mild   severe   all',
      'low dose         6      1        3    10',
      'middle dose      2      7        1    10',
      'high dose        1      4        5    10',
      'not given        0      0        0     0',
      '              ----   ----   ------   ---',
      'all              9     12        9    30',
    ]);
  });

  it('folds into groups of columns that say which they are; row totals close the last', () => {
    const lines = linesOf(wideTable.input, 78);
    expect(lines.filter((line) => line.startsWith('column'))).toEqual([
      'columns 1 to 6 of 14',
      'columns 7 to 12 of 14',
      'columns 13 to 14 of 14',
    ]);
    expect(lines.at(-1)).toMatch(/1,124 +1,121 +15,845$/);
    expect(lines.filter((line) => line.includes(' all')).length).toBeGreaterThan(0);
  });

  it('lines up rows whose labels hold wide characters', () => {
    const row = linesOf(wideTable.input, 78).find((line) => line.startsWith('返品'))!;
    expect(row).toBe(`返品（理由なし）${' '.repeat(15)}4       4       5       6       2       5`);
  });

  it('cuts labels that differ at the end inside, so that they can be told apart', () => {
    const long = 'a treatment that is described at some length, group ';
    const lines = linesOf(inputWith([`${long}A`, `${long}B`], ['yes', 'no']), 40);
    expect(lines[1]).toMatch(/^a treatment …th, group A /);
    expect(lines[2]).toMatch(/^a treatment …th, group B /);
  });

  it('numbers labels that differ in the middle only', () => {
    const [before, after] = ['x'.repeat(60), 'y'.repeat(60)];
    const lines = linesOf(inputWith([`${before}1${after}`, `${before}2${after}`], ['yes', 'no']), 40);
    expect(lines[1]).toMatch(/^1: x+… /);
    expect(lines[2]).toMatch(/^2: x+… /);
  });

  it('shows a label without a visible character as blank', () => {
    expect(linesOf(hostileLabels.input, 118)[0]).toContain('(blank)');
  });

  it('keeps the largest count whole at the narrowest width', () => {
    const lines = linesOf(inputWith(['a row label of some length', 'another'], ['one', 'two'], 2 ** 51), 38);
    expect(lines.join('\n')).toContain('2,251,799,813,685,248');
    for (const line of lines) expect(line.length).toBeLessThanOrEqual(38);
  });
});
