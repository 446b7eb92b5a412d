// The engine of linear statistics against the oracle in whole numbers, and against what symmetry and far tails demand.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  oracleTrendCut,
  toNumber,
  type Scores,
  type TrendOrdering,
} from '../../../../fixtures/reference/generator/oracle.js';
import { dealColumns } from '../../../../src/null/exact/linear/deal.js';
import { exactLinear } from '../../../../src/null/exact/linear/exact-linear.js';
import { forecastLinear } from '../../../../src/null/exact/linear/linear-forecast.js';
import { upscale } from '../../../../src/null/exact/linear/node.js';
import { scoredSides } from '../../../../src/null/exact/linear/scored-sides.js';
import { wholeCounts } from '../../../../src/null/exact/linear/whole-counts.js';
import { exactByEnumeration } from '../../../../src/null/exact/enumerate.js';
import { pointMass } from '../../../../src/null/exact/point-mass.js';
import { orderingFor } from '../../../../src/null/ordering.js';
import type { BoundStatistic } from '../../../../src/statistic/contract.js';
import { trend } from '../../../../src/statistic/trend.js';
import type { LiveTable } from '../../../../src/table/live-table.js';
import { liveFrom, relativeDifference, rowsFirst, smallTable, tableOf } from '../../../helpers/tables.js';

const orderings: readonly TrendOrdering[] = ['upper', 'lower', 'distance', 'probability'];
const bound = 1e-13;

const exactly = (scores: readonly number[]) => scores.map((x) => ({ numerator: BigInt(x), denominator: 1n }));
const bindTrend = (live: LiveTable, scores: Scores): BoundStatistic =>
  trend.bind(live, rowsFirst, { rowScores: exactly(scores.rows), columnScores: exactly(scores.columns) });

/** Tables with scores that are often tied, often one apart, and sometimes far apart. */
const scored = (table: fc.Arbitrary<number[][]>): fc.Arbitrary<{ table: number[][]; scores: Scores }> =>
  table.chain((counts) => {
    const score = fc.oneof(fc.integer({ min: -2, max: 3 }), fc.constantFrom(0, 10, 100_003));
    const side = (length: number): fc.Arbitrary<number[]> =>
      fc.oneof(
        fc.constant(Array.from({ length }, (_, k) => k)),
        fc.array(score, { minLength: length, maxLength: length }),
      );
    return fc
      .tuple(side(counts.length), side(counts[0]!.length))
      .map(([rows, columns]) => ({ table: counts, scores: { rows, columns } }));
  });

function hold(table: number[][], scores: Scores, name: TrendOrdering): void {
  const live = liveFrom(table);
  const statistic = bindTrend(live, scores);
  const truth = oracleTrendCut(table, scores, name);
  const ordering = orderingFor(live, statistic, name);
  const found = [
    ...(statistic.linear === undefined ? [] : exactLinear(live, [ordering])),
    exactByEnumeration(live, [ordering]).cuts[0]!,
  ];
  for (const cut of found) {
    for (const [what, ours, theirs] of [
      ['atLeast', cut.atLeast.value, truth.tied + truth.above],
      ['above', cut.above.value, truth.above],
      ['tied', cut.tied.value, truth.tied],
      ['below', cut.below.value, truth.below],
    ] as const) {
      const difference = relativeDifference(ours, toNumber(theirs, truth.whole));
      expect(difference, `${name} ${what} of ${JSON.stringify({ table, scores })}`).toBeLessThan(bound);
    }
  }
  expect(relativeDifference(pointMass(live).value, toNumber(truth.point, truth.whole))).toBeLessThan(1e-15);
}

describe('exact cuts of trend equal those of the oracle', () => {
  for (const name of orderings) {
    it(`ordered by ${name}`, () => {
      fc.assert(
        fc.property(scored(smallTable), ({ table, scores }) => hold(table, scores, name)),
        { numRuns: 500, seed: 21 },
      );
    });
  }

  it('with four and five columns and rows, where nodes merge and columns are dealt in parts', () => {
    const larger = tableOf({ rows: [3, 3], columns: [4, 4], largest: 3 });
    fc.assert(
      fc.property(scored(larger), ({ table, scores }) => hold(table, scores, 'distance')),
      { numRuns: 25, seed: 22 },
    );
  });
});

describe('scores whose sums no double holds', () => {
  const huge = fc.constantFrom(0, 1, 2 ** 52, 2 ** 53 - 1);
  for (const name of ['upper', 'lower', 'distance'] as const) {
    it(`are compared in whole numbers, ordered by ${name}`, () => {
      const cases = tableOf({ rows: [2, 3], columns: [3, 3], largest: 3 }).chain((table) =>
        fc
          .tuple(
            fc.array(huge, { minLength: table.length, maxLength: table.length }),
            fc.array(huge, { minLength: 3, maxLength: 3 }),
          )
          .map(([rows, columns]) => ({ table, scores: { rows, columns } })),
      );
      fc.assert(
        fc.property(cases, ({ table, scores }) => hold(table, scores, name)),
        { numRuns: 150, seed: 24 },
      );
    });
  }

  it('leave no sum for engines that add in doubles', () => {
    const live = liveFrom([
      [1, 2, 3],
      [3, 2, 1],
      [1, 1, 2],
    ]);
    const scores = { rows: [0, 1, 2 ** 53 - 1], columns: [0, 1, 2 ** 53 - 1] };
    const bound = bindTrend(live, scores);
    expect([bound.linear, bound.sum]).toEqual([undefined, undefined]);
    expect(orderingFor(live, bound, 'distance').arbitrary).toBe(true);
  });
});

describe('the law of a linear statistic', () => {
  const table = tableOf({ rows: [2, 3], columns: [3, 4], largest: 5 });

  it('is the same in whole numbers, in arrays and in hash maps', () => {
    fc.assert(
      fc.property(scored(table), ({ table: counts, scores }) => {
        const live = liveFrom(counts);
        const { linear } = bindTrend(live, scores);
        if (linear === undefined) return;
        const sides = scoredSides(live, linear);
        if (sides.rows.length === 1) return;
        const ways = wholeCounts(sides);
        const whole = [...ways.values()].reduce((sum, x) => sum + x, 0n);
        const kinds = linear.rowScores.every((x) => x < 100) && linear.columnScores.every((x) => x < 100);
        for (const sparse of kinds ? [true, false] : [true]) {
          const { law } = dealColumns(sides, 0, sparse);
          for (const [sum, count] of ways) {
            expect(relativeDifference(law.at(sum) / upscale, toNumber(count, whole))).toBeLessThan(bound);
          }
        }
      }),
      { numRuns: 60, seed: 23 },
    );
  });

  it('keeps its digits in far tails: 1e-62 against whole numbers, 3.7e-300 against 1 / C(1000, 500)', () => {
    const far = [
      [60, 55, 3, 0],
      [0, 5, 57, 60],
    ];
    const live = liveFrom(far);
    const statistic = trend.bind(live, rowsFirst);
    const [upper, lower] = exactLinear(live, [
      orderingFor(live, statistic, 'upper'),
      orderingFor(live, statistic, 'lower'),
    ]);
    let [atLeast, whole] = [0n, 0n];
    for (const [sum, ways] of wholeCounts(scoredSides(live, statistic.linear!))) {
      whole += ways;
      if (sum >= statistic.linear!.observed) atLeast += ways;
    }
    expect(relativeDifference(upper!.atLeast.value, toNumber(atLeast, whole))).toBeLessThan(1e-12);
    expect(upper!.atLeast.value).toBeLessThan(1e-50);
    expect(lower!.atLeast.value).toBeCloseTo(1, 13);

    const end = liveFrom([
      [100, 100, 100, 100, 100, 0, 0, 0, 0, 0],
      [0, 0, 0, 0, 0, 100, 100, 100, 100, 100],
    ]);
    const [cut] = exactLinear(end, [orderingFor(end, trend.bind(end, rowsFirst), 'upper')]);
    expect(relativeDifference(cut!.atLeast.value, binomialInverse(1000, 500))).toBeLessThan(1e-12);
    expect(cut!.above.value).toBe(0);
  });

  it('adds many moves to a node in blocks, and states an error far below 1e-12 for it', () => {
    const wide = liveFrom([
      [150, 210, 160],
      [220, 190, 130],
    ]);
    const statistic = trend.bind(wide, rowsFirst);
    const [cut] = exactLinear(wide, [orderingFor(wide, statistic, 'upper')]);
    let [atLeast, whole] = [0n, 0n];
    for (const [sum, ways] of wholeCounts(scoredSides(wide, statistic.linear!))) {
      whole += ways;
      if (sum >= statistic.linear!.observed) atLeast += ways;
    }
    const difference = relativeDifference(cut!.atLeast.value, toNumber(atLeast, whole));
    expect(difference).toBeLessThan(cut!.relativeError);
    const large = liveFrom([
      [3600, 4100, 3900],
      [4150, 3950, 4200],
    ]);
    const [far] = exactLinear(large, [orderingFor(large, trend.bind(large, rowsFirst), 'upper')]);
    expect(far!.relativeError).toBeLessThan(1e-13);
  });

  it('is forecast as cheap where it is: two rows, ten doses and a total of 1,000', () => {
    const live = liveFrom([
      [40, 45, 50, 50, 55, 45, 55, 50, 50, 60],
      [60, 55, 50, 50, 45, 55, 45, 50, 50, 40],
    ]);
    expect(forecastLinear(live, trend.bind(live, rowsFirst).linear!).workUnits).toBeLessThan(1e7);
  });
});

/** 1 / C(n, k). */
function binomialInverse(n: number, k: number): number {
  let ways = 1n;
  for (let i = 1; i <= k; i++) ways = (ways * BigInt(n - k + i)) / BigInt(i);
  return toNumber(1n, ways);
}
