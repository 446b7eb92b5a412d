// The statistics of groups with scored responses against brute force in whole numbers: every table listed, the isotonic
// regression by its max-min formula (Robertson, Wright & Dykstra 1988), which shares nothing with pooling.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factorial, tablesWith, toNumber } from '../../fixtures/reference/generator/oracle.js';
import { analyse } from '../../src/analyse.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference, tableOf } from '../helpers/tables.js';

type Fraction = readonly [bigint, bigint];
const less = (a: Fraction, b: Fraction): boolean => a[0] * b[1] < b[0] * a[1];
const largest = (all: readonly Fraction[]): Fraction => all.reduce((a, b) => (less(a, b) ? b : a));
const smallest = (all: readonly Fraction[]): Fraction => all.reduce((a, b) => (less(b, a) ? b : a));
const add = (a: Fraction, b: Fraction): Fraction => [a[0] * b[1] + b[0] * a[1], a[1] * b[1]];

const addUp = (numbers: readonly number[]): number => numbers.reduce((a, b) => a + b, 0);

/** Sums of scores of the rows. */
const sumsOf = (table: readonly (readonly number[])[], scores: readonly number[]): number[] =>
  table.map((row) => addUp(row.map((count, j) => count * scores[j]!)));

/** sum S^2 / size. */
const spreadOfMeans = (sums: readonly number[], sizes: readonly number[]): Fraction =>
  sums.map((s, g): Fraction => [BigInt(s) ** 2n, BigInt(sizes[g]!)]).reduce(add);

/** sum size x (isotonic mean)^2, the mean of group g being the largest over s <= g of the smallest over t >= g of the mean from s to t. */
function spreadOfIsotonic(sums: readonly number[], sizes: readonly number[]): Fraction {
  const mean = (s: number, t: number): Fraction => [
    BigInt(addUp(sums.slice(s, t + 1))),
    BigInt(addUp(sizes.slice(s, t + 1))),
  ];
  const groups = [...sums.keys()];
  return groups
    .map((g): Fraction => {
      const [top, bottom] = largest(
        groups.filter((s) => s <= g).map((s) => smallest(groups.filter((t) => t >= g).map((t) => mean(s, t)))),
      );
      return [top ** 2n * BigInt(sizes[g]!), bottom ** 2n];
    })
    .reduce(add);
}

/** P(at least as far out) and the mass of ties, by listing every table. */
function bruteForce(table: number[][], extremeness: (table: number[][]) => Fraction): { p: number; tied: number } {
  const rowTotals = table.map(addUp);
  const columnTotals = table[0]!.map((_, j) => addUp(table.map((row) => row[j]!)));
  const target = extremeness(table);
  let [atLeast, tied, whole] = [0n, 0n, 0n];
  const ways = columnTotals.map(factorial).reduce((a, b) => a * b);
  for (const flat of tablesWith(rowTotals, columnTotals)) {
    const weight = ways / flat.map(factorial).reduce((a, b) => a * b);
    const value = extremeness(table.map((row, i) => flat.slice(i * row.length, (i + 1) * row.length)));
    whole += weight;
    if (less(value, target)) continue;
    atLeast += weight;
    if (!less(target, value)) tied += weight;
  }
  return { p: toNumber(atLeast, whole), tied: toNumber(tied, whole) };
}

const table = fc.oneof(
  tableOf({ rows: [2, 5], columns: [2, 2], largest: 4 }),
  tableOf({ rows: [2, 4], columns: [3, 3], largest: 2 }),
  tableOf({ rows: [3, 3], columns: [4, 4], largest: 2 }),
);
const scored = table.chain((counts) =>
  fc.record({
    counts: fc.constant(counts),
    scores: fc.array(fc.integer({ min: -2, max: 5 }), { minLength: counts[0]!.length, maxLength: counts[0]!.length }),
  }),
);

const runs = { numRuns: 120 };

describe('exact p of scored responses equals brute force', () => {
  it('kruskal-wallis with declared scores', async () => {
    await fc.assert(
      fc.asyncProperty(scored, async ({ counts, scores }) => {
        const sizes = counts.map(addUp);
        const truth = bruteForce(counts, (t) => spreadOfMeans(sumsOf(t, scores), sizes));
        const { pValues } = checked(
          await analyse({ counts }, { statistic: 'kruskal-wallis', columnScores: scores, method: 'exact' }),
        );
        expect(relativeDifference(pValues[0]!.p!, truth.p)).toBeLessThan(1e-12);
        expect(relativeDifference(pValues[0]!.tied!, truth.tied)).toBeLessThan(1e-12);
      }),
      runs,
    );
  });

  it('isotonic-trend: rise, fall, and the larger of them', async () => {
    await fc.assert(
      fc.asyncProperty(scored, async ({ counts, scores }) => {
        const sizes = counts.map(addUp);
        const rise = (t: number[][]): Fraction => spreadOfIsotonic(sumsOf(t, scores), sizes);
        const fall = (t: number[][]): Fraction => spreadOfIsotonic(sumsOf(t, scores).toReversed(), sizes.toReversed());
        const truths = [(t: number[][]) => largest([rise(t), fall(t)]), rise, fall].map((by) => bruteForce(counts, by));
        const { pValues } = checked(
          await analyse({ counts }, { statistic: 'isotonic-trend', columnScores: scores, method: 'exact' }),
        );
        truths.forEach((truth, k) => {
          expect(relativeDifference(pValues[k]!.p!, truth.p)).toBeLessThan(1e-12);
          expect(relativeDifference(pValues[k]!.tied!, truth.tied)).toBeLessThan(1e-12);
        });
      }),
      runs,
    );
  });

  it('and a sampled one holds it in its interval (99.99%, of fixed seeds)', async () => {
    for (const [k, counts] of fc.sample(table, { numRuns: 12, seed: 5 }).entries()) {
      for (const statistic of ['kruskal-wallis', 'isotonic-trend']) {
        const exact = (await analyse({ counts }, { statistic, method: 'exact' })).pValues[0]!.p!;
        const { pValues } = checked(
          await analyse(
            { counts },
            { statistic, method: 'sample', draws: 4000, seed: `s${k}`, samplingConfidence: 0.9999 },
          ),
        );
        const [error] = pValues[0]!.errors;
        if (error?.kind !== 'sampling') continue;
        expect(error.interval[0]).toBeLessThanOrEqual(exact);
        expect(error.interval[1]).toBeGreaterThanOrEqual(exact);
      }
    }
  });
});

describe('laws of scored responses', () => {
  it('kruskal-wallis of two groups has the p of the trend by distance, midranks as scores', async () => {
    await fc.assert(
      fc.asyncProperty(tableOf({ rows: [2, 2], columns: [2, 4], largest: 5 }), async (counts) => {
        const kruskal = (await analyse({ counts }, { statistic: 'kruskal-wallis', method: 'exact' })).pValues[0]!;
        const trend = (await analyse({ counts }, { statistic: 'trend', columnScores: 'midranks', method: 'exact' }))
          .pValues[0]!;
        expect(relativeDifference(kruskal.p!, trend.p!)).toBeLessThan(1e-12);
      }),
      { numRuns: 100 },
    );
  });

  it('isotonic-trend is at least the trend of any nondecreasing group scores', async () => {
    await fc.assert(
      fc.asyncProperty(
        tableOf({ rows: [2, 5], columns: [2, 3], largest: 6 }).chain((counts) =>
          fc.tuple(
            fc.constant(counts),
            fc.array(fc.integer({ min: 0, max: 4 }), { minLength: counts.length, maxLength: counts.length }),
          ),
        ),
        async ([counts, steps]) => {
          const rowScores = steps.map((_, i) => addUp(steps.slice(0, i + 1)));
          const trend = await analyse({ counts }, { statistic: 'trend', rowScores, method: 'asymptotic' }).catch(
            () => undefined,
          );
          if (trend === undefined) return; // all scores equal
          const isotonic = await analyse(
            { counts },
            { statistic: 'isotonic-trend', method: 'sample', draws: 1, seed: 'x' },
          );
          const value = isotonic.statistic.value as number;
          // The value is that of the larger of rise and fall.
          expect(Math.abs(value)).toBeGreaterThanOrEqual(Math.abs(trend.pValues[0]!.value!) * (1 - 1e-12));
        },
      ),
      { numRuns: 150 },
    );
  });
});
