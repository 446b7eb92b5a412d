// The summary behind pictures against the p-values, which come from other engines: its tail must hold what they hold.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import { checked } from './helpers/checked-result.js';
import { relativeDifference, smallTable, twoByTwoTable } from './helpers/tables.js';

const sum = (values: readonly number[]): number => values.reduce((all, value) => all + value, 0);

const wishes: PlanOptions[] = [
  { statistic: 'pearson' },
  { statistic: 'pearson', tail: 'lower' },
  { statistic: 'likelihood-ratio' },
  { statistic: 'probability' },
  { statistic: 'trend' },
  { statistic: 'trend', tail: 'lower' },
  { statistic: 'trend', twoSidedRule: 'probability' },
];

describe('summary of the null law', () => {
  it('visits every table, and its tail is the exact p', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, fc.constantFrom(...wishes), async (counts, options) => {
        const result = checked(
          await analyse({ counts }, { ...options, method: 'exact', cells: false, nullSummary: true }),
        );
        const summary = result.nullSummary!;
        expect(summary.method).toBe('exact');
        expect(sum(summary.bins.map(({ mass }) => mass))).toBeCloseTo(1, 12);
        expect(relativeDifference(sum(summary.bins.map(({ inTail }) => inTail)), result.pValues[0]!.p!)).toBeLessThan(
          1e-10,
        );
        expect(summary.bins.every(({ mass, inTail }) => inTail <= mass * (1 + 1e-12))).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('halves a doubled p of a 2x2 table where that is below 1', async () => {
    await fc.assert(
      fc.asyncProperty(twoByTwoTable, fc.constantFrom('wald', 'score'), async (counts, statistic) => {
        const result = checked(
          await analyse({ counts }, { statistic, twoSidedRule: 'doubled', cells: false, nullSummary: true }),
        );
        const { p } = result.pValues[0]!;
        const tail = sum(result.nullSummary!.bins.map(({ inTail }) => inTail));
        if (p! < 0.9) expect(relativeDifference(2 * tail, p!)).toBeLessThan(1e-10);
      }),
      { numRuns: 40 },
    );
  });

  it('has bins that join, rising, with the approximation adding up to at most 1', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, async (counts) => {
        const { bins } = (await analyse({ counts }, { cells: false, nullSummary: true })).nullSummary!;
        bins.slice(1).forEach(({ from }, k) => {
          expect(from).toBeCloseTo(bins[k]!.to as number, 9);
        });
        expect(sum(bins.map(({ approximation }) => approximation!))).toBeLessThan(1 + 1e-9);
      }),
      { numRuns: 30 },
    );
  });

  it('draws from a seed where tables are many: the same digits each time, the approximation near', async () => {
    const counts = [
      [30, 20, 60],
      [25, 30, 40],
      [50, 20, 70],
    ];
    const options: PlanOptions = { method: 'sample', draws: 1000, seed: 'meadow', nullSummary: true, cells: false };
    const [one, two] = [await analyse({ counts }, options), await analyse({ counts }, options)];
    expect(one.nullSummary).toEqual(two.nullSummary);
    expect(one.nullSummary!.method).toBe('sample');
    expect(one.nullSummary!.tables).toBe(20_000);
    const apart = one.nullSummary!.bins.map(({ mass, approximation }) => Math.abs(mass - approximation!));
    expect(Math.max(...apart)).toBeLessThan(0.01);
    const other = await analyse({ counts }, { ...options, seed: 'hill' });
    expect(other.nullSummary!.bins).not.toEqual(one.nullSummary!.bins);
  });

  it('is left out unasked, and where one table is all there is', async () => {
    expect(
      (
        await analyse({
          counts: [
            [8, 2],
            [1, 9],
          ],
        })
      ).nullSummary,
    ).toBeUndefined();
    expect(
      (
        await analyse(
          {
            counts: [
              [8, 2],
              [0, 0],
            ],
          },
          { nullSummary: true },
        )
      ).nullSummary,
    ).toBeUndefined();
  });
});
