// Exact laws of change against every split of the changed pairs, in whole numbers, over arbitrary small tables.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  bowkerCut,
  mcnemarCut,
  stuartCut,
  stuartValue,
  type PairsCut,
} from '../../fixtures/reference/generator/pairs.js';
import { toNumber } from '../../fixtures/reference/generator/oracle.js';
import type { ExactCut } from '../../src/null/contract.js';
import { exactBowker, forecastBowker } from '../../src/pairs/bowker-exact.js';
import { exactHomogeneity, forecastHomogeneity } from '../../src/pairs/homogeneity-exact.js';
import { homogeneityForm } from '../../src/pairs/homogeneity.js';
import { exactMcNemar } from '../../src/pairs/mcnemar-exact.js';
import { discordantPairs } from '../../src/pairs/square-table.js';
import { compareKeys, keyOf, lastOfSum, symmetryKeys } from '../../src/pairs/symmetry-keys.js';
import { bowkerValue } from '../../src/pairs/work.js';
import { makeTable } from '../../src/table/table.js';
import { relativeDifference } from '../helpers/tables.js';

const bound = 1e-12;

function expectCut(cut: ExactCut, { below, tied, above, whole }: PairsCut): void {
  expect(relativeDifference(cut.atLeast.value, toNumber(above + tied, whole))).toBeLessThan(bound);
  expect(relativeDifference(cut.above.value, toNumber(above, whole))).toBeLessThan(bound);
  expect(relativeDifference(cut.tied.value, toNumber(tied, whole))).toBeLessThan(bound);
  expect(relativeDifference(cut.below.value, toNumber(below, whole))).toBeLessThan(bound);
}

const squareOf = (levels: number, largest: number): fc.Arbitrary<number[][]> =>
  fc
    .array(fc.array(fc.integer({ min: 0, max: largest }), { minLength: levels, maxLength: levels }), {
      minLength: levels,
      maxLength: levels,
    })
    .filter((table) => table.flat().some((n) => n > 0));

const smallSquare = fc.oneof(squareOf(2, 30), squareOf(3, 6), squareOf(4, 2));

describe('exact McNemar', () => {
  it('is the law of fair coins on every ordering, for every split of up to 30 changed pairs', () => {
    for (let m = 0; m <= 30; m++) {
      for (let there = 0; there <= m; there++) {
        const { cuts } = exactMcNemar(there, m - there, ['upper', 'lower', 'distance']);
        const table = [
          [1, there],
          [m - there, 1],
        ];
        for (const cut of cuts) expectCut(cut, mcnemarCut(table, cut.ordering as 'upper'));
      }
    }
  });

  it('keeps its digits far out, and its logarithm beyond the doubles', () => {
    for (const [there, back] of [
      [900, 100],
      [1, 700],
    ] as const) {
      const [cut] = exactMcNemar(there, back, ['upper']).cuts;
      const table = [
        [0, there],
        [back, 0],
      ];
      const { above, tied, whole } = mcnemarCut(table, 'upper');
      expect(relativeDifference(cut!.atLeast.value, toNumber(above + tied, whole))).toBeLessThan(bound);
    }
    // All of 5,000 one way: 2^-5000.
    const [far] = exactMcNemar(5000, 0, ['upper']).cuts;
    expect(far!.atLeast.value).toBe(0);
    expect(far!.atLeast.log10).toBeCloseTo(-5000 * Math.log10(2), 9);
  });
});

describe('exact symmetry (Bowker)', () => {
  it('is the law of all splits', () => {
    fc.assert(
      fc.property(smallSquare, (counts) => {
        const pairs = discordantPairs(makeTable({ counts }));
        const statistic = bowkerValue(pairs);
        expect(forecastBowker(pairs, statistic).possible).toBe(true);
        expectCut(exactBowker(pairs, statistic), bowkerCut(counts));
      }),
      { numRuns: 600, seed: 21 },
    );
  });

  it('compares keys beyond 2^53 as the whole numbers they stand for', () => {
    const long = fc.bigInt({ min: 0n, max: 2n ** 94n });
    const apart = fc.oneof(fc.bigInt({ min: -5n, max: 5n }), fc.bigInt({ min: -(2n ** 60n), max: 2n ** 60n }));
    fc.assert(
      fc.property(long, apart, (one, difference) => {
        const other = one + difference < 0n ? one : one + difference;
        const [a, b] = [keyOf(one), keyOf(other)];
        const order = one > other ? 1 : one < other ? -1 : 0;
        expect(compareKeys(a.value, a.last, b.value, b.last, 2 ** 46)).toBe(order);
        expect(lastOfSum(a.last, b.last)).toBe(keyOf(one + other).last);
      }),
      { numRuns: 2000, seed: 22 },
    );
  });

  it('takes keys beyond 2^53 on three levels of large coprime totals', () => {
    const counts = [
      [0, 50021, 40],
      [49998, 0, 99],
      [60, 101, 0],
    ];
    const pairs = discordantPairs(makeTable({ counts }));
    const longer = discordantPairs(
      makeTable({
        counts: [
          [0, 260, 130, 70],
          [241, 0, 433, 80],
          [117, 360, 0, 205],
          [37, 83, 174, 0],
        ],
      }),
    );
    expect(symmetryKeys(longer)!.slack).toBeGreaterThan(0);
    const cut = exactBowker(longer, bowkerValue(longer));
    expect(cut.above.value + cut.tied.value + cut.below.value).toBeCloseTo(1, 12);
    expect(exactBowker(pairs, bowkerValue(pairs)).tied.value).toBeGreaterThan(0);
  });
});

describe('exact exchange of pairs (Stuart)', () => {
  it('has the statistic of the whole covariance, singular or not', () => {
    fc.assert(
      fc.property(smallSquare, (counts) => {
        const form = homogeneityForm(counts.length, discordantPairs(makeTable({ counts })));
        const [value, constant] = stuartValue(counts);
        expect(relativeDifference(form.value, toNumber(value, constant))).toBeLessThan(bound);
      }),
      { numRuns: 500, seed: 23 },
    );
  });

  it('is the law of all splits', () => {
    fc.assert(
      fc.property(smallSquare, (counts) => {
        const pairs = discordantPairs(makeTable({ counts }));
        const form = homogeneityForm(counts.length, pairs);
        expect(forecastHomogeneity(form, pairs).possible).toBe(true);
        expectCut(exactHomogeneity(form, pairs), stuartCut(counts));
      }),
      { numRuns: 400, seed: 24 },
    );
  });
});
