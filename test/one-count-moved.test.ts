// How fragile p is: against the same question asked of the neighbouring tables one by one.
import { describe, expect, it } from 'vitest';
import { tablesWith } from '../fixtures/reference/generator/oracle.js';
import { analyse, answer } from '../src/analyse.js';
import { fragilityOf } from '../src/one-count-moved.js';
import { makePlan } from '../src/plan/make-plan.js';
import { liveTable } from '../src/table/live-table.js';
import { makeTable } from '../src/table/table.js';
import type { PlanOptions } from '../src/plan/plan.js';
import { checked } from './helpers/checked-result.js';

const twoByTwo = [[8, 2], [1, 9]]; // prettier-ignore
const larger = [[3, 0, 1], [0, 4, 2]]; // prettier-ignore

/** p of every table with one count in another cell of its row or column. */
async function neighbouring(counts: number[][], options: PlanOptions): Promise<number[]> {
  const found: number[] = [];
  for (const [i, row] of counts.entries()) {
    for (const [j, count] of row.entries()) {
      if (count === 0) continue;
      for (const [k, other] of counts.entries()) {
        for (const l of other.keys()) {
          if ((k === i) === (l === j)) continue;
          const moved = counts.map((line) => [...line]);
          moved[i]![j]!--;
          moved[k]![l]!++;
          found.push((await answer({ counts: moved }, options)).pValues[0]!.p!);
        }
      }
    }
  }
  return found;
}

describe('p with one count moved', () => {
  it.each([
    ['2x2, pearson', twoByTwo, {}],
    ['2x2, two-tailed by probability', twoByTwo, { statistic: 'wald', twoSidedRule: 'probability' }],
    ['2x3', larger, { statistic: 'likelihood-ratio' }],
  ] as [string, number[][], PlanOptions][])('lies between the stated ends: %s', async (_, counts, options) => {
    const all = await neighbouring(counts, options);
    const { fragility } = checked(await analyse({ counts }, options));
    expect(fragility!.moves).toBe(all.length);
    expect(fragility!.smallest.p).toBe(Math.min(...all));
    expect(fragility!.largest.p).toBe(Math.max(...all));
  });
});

describe('the least attainable p', () => {
  it.each([
    ['2x2', twoByTwo, { statistic: 'score', twoSidedRule: 'doubled' }],
    ['2x2 by the smaller tail', [[3, 4], [5, 9]], { statistic: 'score', twoSidedRule: 'blaker' }],
    ['2x3', larger, { statistic: 'pearson' }],
    ['trend, two-tailed', larger, { statistic: 'trend' }],
  ] as [string, number[][], PlanOptions][])('is the smallest p of all tables with these margins: %s', async (_, counts, options) => {
    const [rows, columns] = [counts.map(sum), counts[0]!.map((__, j) => sum(counts.map((row) => row[j]!)))];
    let least = 1;
    for (const table of tablesWith(rows, columns)) {
      const shaped = rows.map((__, i) => table.slice(i * columns.length, (i + 1) * columns.length));
      least = Math.min(least, (await answer({ counts: shaped }, options)).pValues[0]!.p!);
    }
    const { pValues } = checked(await analyse({ counts }, options));
    expect(Math.abs(pValues[0]!.leastAttainable! / least - 1)).toBeLessThan(1e-12);
  }); // prettier-ignore
});

describe('neither is looked for where that would take longer than the p itself is worth', () => {
  it.each([
    [[[3e15, 5], [7, 2e15]]],
    [[[2e13, 5], [7, 2e13]]],
  ])('%j', async (counts) => {
    const table = makeTable({ counts });
    const live = liveTable(table);
    const options = { method: 'exact', effort: 1e12 } as const;
    expect(await fragilityOf(table, live, makePlan(table, live, options), options)).toEqual({});
  }); // prettier-ignore

  it('but is where it is cheap, with millions of counts', async () => {
    const counts = [[2_000_000, 1_000_000], [3_000_000, 1_600_000]]; // prettier-ignore
    const { fragility } = checked(await analyse({ counts }));
    expect(fragility!.moves).toBe(8);
  });
});

const sum = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0);
