// The power-divergence family: its special cases, and its near ties against arithmetic to a thousand bits.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Rational } from '../../src/numeric/rational.js';
import { lowestRoot, signOfPowerSum, type PowerTerm } from '../../src/statistic/comparison/radical-sums.js';
import { freemanTukey } from '../../src/statistic/freeman-tukey.js';
import { likelihoodRatio } from '../../src/statistic/likelihood-ratio.js';
import { pearson } from '../../src/statistic/pearson.js';
import { bindPower, powerDivergence } from '../../src/statistic/power-divergence.js';
import { exactByEnumeration } from '../../src/null/exact/enumerate.js';
import { exactCut } from '../../src/null/exact/network/exact-cut.js';
import { orderingFor } from '../../src/null/ordering.js';
import type { BoundStatistic } from '../../src/statistic/contract.js';
import { liveFrom, relativeDifference, rowsFirst, smallTable } from '../helpers/tables.js';

const rational = (numerator: number, denominator = 1): Rational => ({
  numerator: BigInt(numerator),
  denominator: BigInt(denominator),
});

/** sum n ((n/e)^lambda - 1), as the formula is printed. */
const printed = (counts: number[][], lambda: number): number => {
  const rows = counts.map((row) => row.reduce((a, b) => a + b));
  const columns = counts[0]!.map((_, j) => counts.reduce((a, row) => a + row[j]!, 0));
  const total = rows.reduce((a, b) => a + b);
  let sum = 0;
  counts.forEach((row, i) =>
    row.forEach((n, j) => {
      if (n > 0) sum += n * (((n * total) / (rows[i]! * columns[j]!)) ** lambda - 1);
    }),
  );
  return (2 / (lambda * (lambda + 1))) * sum;
};

describe('power-divergence', () => {
  const cutOf = (counts: number[][], bind: (live: ReturnType<typeof liveFrom>) => BoundStatistic) => {
    const live = liveFrom(counts);
    return exactByEnumeration(live, [orderingFor(live, bind(live), 'upper')]).cuts[0]!;
  };

  it('is pearson at 1, likelihood-ratio at 0 and freeman-tukey at -1/2: value and exact p', () => {
    fc.assert(
      fc.property(smallTable, (counts) => {
        const live = liveFrom(counts);
        for (const [lambda, twin] of [
          [rational(1), pearson],
          [rational(0), likelihoodRatio],
          [rational(-1, 2), freemanTukey],
        ] as const) {
          const bound = powerDivergence.bind(live, rowsFirst, { lambda });
          expect(bound.value(live.counts)).toBe(twin.bind(live, rowsFirst).value(live.counts));
          expect(cutOf(counts, (one) => bindPower(one, rowsFirst, lambda))).toEqual(
            cutOf(counts, (one) => twin.bind(one, rowsFirst)),
          );
        }
      }),
      { numRuns: 60, seed: 31 },
    );
  });

  it('follows its printed formula, 4 sum (sqrt n - sqrt e)^2 at -1/2, and pearson and likelihood-ratio nearby', () => {
    fc.assert(
      fc.property(smallTable, fc.constantFrom([2, 3], [-1, 2], [5, 1], [-9, 10], [1, 1000]), (counts, [a, b]) => {
        const live = liveFrom(counts);
        const value = bindPower(live, rowsFirst, rational(a!, b)).value(live.counts);
        expect(value).toBeCloseTo(printed(counts, a! / b!), 9);
      }),
      { numRuns: 300, seed: 32 },
    );
    const counts = [
      [3, 9, 4],
      [8, 1, 6],
    ];
    const live = liveFrom(counts);
    const near = (numerator: number): number =>
      bindPower(live, rowsFirst, rational(numerator, 1000)).value(live.counts);
    expect(near(1001)).toBeCloseTo(pearson.bind(live, rowsFirst).value(live.counts), 1);
    expect(near(1)).toBeCloseTo(likelihoodRatio.bind(live, rowsFirst).value(live.counts), 1);
  });

  it('orders tables by whole numbers where lambda is whole', () => {
    fc.assert(
      fc.property(smallTable, fc.constantFrom(2, 3), (counts, lambda) => {
        const live = liveFrom(counts);
        const { rowTotals, columnTotals, columns, total } = live;
        const product = [...rowTotals, ...columnTotals].reduce((all, x) => all * BigInt(x), 1n);
        // sum n^(lambda + 1) (N prod / (R C))^lambda
        const exact = (table: ArrayLike<number>): bigint =>
          Array.from(table).reduce((sum, n, cell) => {
            const margins = BigInt(rowTotals[Math.floor(cell / columns)]!) * BigInt(columnTotals[cell % columns]!);
            return sum + BigInt(n) ** BigInt(lambda + 1) * ((BigInt(total) * product) / margins) ** BigInt(lambda);
          }, 0n);
        const ordering = orderingFor(live, bindPower(live, rowsFirst, rational(lambda)), 'upper');
        const target = exact(live.counts);
        const truth = { name: 'upper', place: (table: ArrayLike<number>) => signOf(exact(table) - target) } as const;
        const [ours, theirs] = exactByEnumeration(live, [ordering, truth]).cuts;
        expect(ours!.atLeast).toEqual(theirs!.atLeast);
        expect(ours!.tied).toEqual(theirs!.tied);
      }),
      { numRuns: 150, seed: 33 },
    );
  });

  it('has the same exact p by the network of partial tables as by listing them', () => {
    fc.assert(
      fc.property(smallTable, fc.constantFrom([2, 3], [-1, 2], [3, 1]), (counts, [a, b]) => {
        const live = liveFrom(counts);
        if (live.rows === 2 && live.columns === 2) return;
        const ordering = orderingFor(live, bindPower(live, rowsFirst, rational(a!, b)), 'upper');
        const [listed] = exactByEnumeration(live, [ordering]).cuts;
        const found = exactCut(live, ordering, 'power-divergence');
        expect(relativeDifference(found.atLeast.value, listed!.atLeast.value)).toBeLessThan(1e-12);
        expect(relativeDifference(found.tied.value, listed!.tied.value)).toBeLessThan(1e-12);
      }),
      { numRuns: 150, seed: 35 },
    );
  });

  it('takes tables with the same cells in other places, or with cells that make up for each other, as tied', () => {
    // All margins alike: any rearrangement of the counts of a row ties.
    const live = liveFrom([
      [4, 1, 1],
      [1, 4, 1],
      [1, 1, 4],
    ]);
    const { sum } = bindPower(live, rowsFirst, rational(2, 3));
    expect(sum!.decide([1, 4, 1, 4, 1, 1, 1, 1, 4])).toBe(0);
    expect(sum!.decide([2, 2, 2, 2, 2, 2, 2, 2, 2])).toBe(-1);
  });
});

const signOf = (x: bigint): -1 | 0 | 1 => (x > 0n ? 1 : x < 0n ? -1 : 0);
const term = (multiple: number, count: number, row = 1, column = 1): PowerTerm => ({
  multiple: BigInt(multiple),
  count: BigInt(count),
  row: BigInt(row),
  column: BigInt(column),
});

describe('sums of radicals', () => {
  it('that are 0 are found to be: 18 sqrt 18 = 27 sqrt 8, sqrt 8 of 8 against 2 sqrt 2 of 2', () => {
    // count x sqrt(count): 8 sqrt 8 = 16 sqrt 2 = 8 x (2 sqrt 2); 18 sqrt 18 = 54 sqrt 2 = 27 x (2 sqrt 2).
    expect(signOfPowerSum([term(1, 8), term(-8, 2)], 1n, rational(1, 2))).toBe(0);
    expect(signOfPowerSum([term(1, 18), term(-27, 2)], 1n, rational(1, 2))).toBe(0);
    expect(signOfPowerSum([term(1, 18), term(-27, 2), term(1, 3)], 1n, rational(1, 2))).toBe(1);
    // A perfect power as a base: 4 sqrt 4 = 8.
    expect(signOfPowerSum([term(1, 4), term(-8, 1)], 1n, rational(1, 2))).toBe(0);
  });

  it('that agree to twenty digits are told apart', () => {
    // (n + 1)^(3/2) + (n - 1)^(3/2) - 2 n^(3/2) is about (3/4) / sqrt n, beside 2 n^(3/2): 1e-26 of it here; n^(1/1000) is
    // concave.
    const n = 10 ** 13;
    expect(signOfPowerSum([term(1, n + 1), term(1, n - 1), term(-2, n)], 1n, rational(1, 2))).toBe(1);
    expect(signOfPowerSum([term(-1, n + 1), term(-1, n - 1), term(2, n)], 1n, rational(1, 2))).toBe(-1);
    expect(signOfPowerSum([term(1, n + 1), term(1, n - 1), term(-2, n)], 1n, rational(-999, 1000))).toBe(-1);
  });

  it('have the sign of doubles where those are sure', () => {
    const terms = fc.array(
      fc.record({
        multiple: fc.integer({ min: -5, max: 5 }),
        count: fc.integer({ min: 1, max: 50 }),
        row: fc.integer({ min: 1, max: 60 }),
        column: fc.integer({ min: 1, max: 60 }),
      }),
      { minLength: 1, maxLength: 5 },
    );
    fc.assert(
      fc.property(terms, fc.constantFrom([2, 3], [-1, 2], [7, 4], [-9, 10], [333, 1000]), (list, [a, b]) => {
        const sizes = list.map((t) => t.multiple * t.count * ((t.count * 60) / (t.row * t.column)) ** (a! / b!));
        const sum = sizes.reduce((x, y) => x + y, 0);
        const doubt = 1e-12 * sizes.reduce((x, y) => x + Math.abs(y), 0);
        const sign = signOfPowerSum(
          list.map((t) => term(t.multiple, t.count, t.row, t.column)),
          60n,
          rational(a!, b),
        );
        if (Math.abs(sum) > doubt) expect(sign).toBe(Math.sign(sum));
      }),
      { numRuns: 500, seed: 34 },
    );
  });

  it('have bases that are powers of nothing smaller', () => {
    expect([4n, 8n, 36n, 64n, 12n, 7n, 2n ** 52n].map(lowestRoot)).toEqual([2n, 2n, 6n, 2n, 12n, 7n, 2n]);
    expect(relativeDifference(Number(lowestRoot(94906265n ** 2n)), 94906265)).toBe(0);
  });
});
