// Laws of whole analyses of pairs, and kappa against every table with its margins.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { kappaCut } from '../fixtures/reference/generator/pairs.js';
import { toNumber } from '../fixtures/reference/generator/oracle.js';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import type { PValue } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';
import { relativeDifference, transpose } from './helpers/tables.js';

const squareOf = (levels: number, largest: number): fc.Arbitrary<number[][]> =>
  fc
    .array(fc.array(fc.integer({ min: 0, max: largest }), { minLength: levels, maxLength: levels }), {
      minLength: levels,
      maxLength: levels,
    })
    .filter((table) => table.flat().some((n) => n > 0));

const pairsOf = async (counts: number[][], options: PlanOptions = {}): Promise<PValue[]> =>
  checked(await analyse({ counts }, { paired: true, ...options })).pValues;
const exactOf = async (counts: number[][], options: PlanOptions = {}): Promise<number[]> =>
  (await pairsOf(counts, { method: 'exact', ...options })).filter((p) => p.method === 'exact').map((p) => p.p!);

describe('laws of pairs', () => {
  it('transposing exchanges the tails of McNemar', async () => {
    await fc.assert(
      fc.asyncProperty(squareOf(2, 15), async (counts) => {
        const [both, upper, lower] = await exactOf(counts);
        expect(await exactOf(transpose(counts))).toEqual([both, lower, upper]);
      }),
      { numRuns: 40, seed: 31 },
    );
  });

  it('for two levels symmetry, homogeneity and McNemar are one question', async () => {
    await fc.assert(
      fc.asyncProperty(squareOf(2, 15), async (counts) => {
        const [mcnemar] = await exactOf(counts);
        for (const statistic of ['bowker', 'marginal-homogeneity']) {
          const [p] = await exactOf(counts, { statistic });
          expect(relativeDifference(p!, mcnemar!)).toBeLessThan(1e-12);
        }
      }),
      { numRuns: 40, seed: 32 },
    );
  });

  it('levels in another order change nothing', async () => {
    const cases = squareOf(3, 5).chain((counts) =>
      fc
        .shuffledSubarray([0, 1, 2], { minLength: 3, maxLength: 3 })
        .map((order) => [counts, order.map((i) => order.map((j) => counts[i]![j]!))] as const),
    );
    await fc.assert(
      fc.asyncProperty(cases, async ([counts, other]) => {
        const [ours, theirs] = [await exactOf(counts), await exactOf(other)];
        expect(ours).toHaveLength(2);
        ours.forEach((p, k) => expect(relativeDifference(p, theirs[k]!)).toBeLessThan(1e-12));
      }),
      { numRuns: 60, seed: 33 },
    );
  });

  it.each(['kappa', 'kappa-linear', 'kappa-quadratic'] as const)(
    'p of %s is that of every table with both margins',
    async (statistic) => {
      await fc.assert(
        fc.asyncProperty(squareOf(3, 4), async (counts) => {
          const [p] = await exactOf(counts, { statistic });
          const { above, tied, whole } = kappaCut(counts, statistic);
          expect(relativeDifference(p!, toNumber(above + tied, whole))).toBeLessThan(1e-12);
        }),
        { numRuns: 100, seed: 34 },
      );
    },
  );

  it('sampled p-values hold the exact ones in their intervals', async () => {
    const counts = [
      [9, 6, 1],
      [2, 7, 8],
      [0, 3, 5],
    ];
    const options = { method: 'sample', draws: 20_000, seed: 'pairs' } as const;
    for (const statistic of ['bowker', 'marginal-homogeneity']) {
      const exact = await pairsOf(counts, { statistic });
      for (const p of (await pairsOf(counts, { statistic, ...options })).filter(({ method }) => method === 'sample')) {
        const error = p.errors[0]!;
        if (error.kind !== 'sampling') throw new Error('no sampling error');
        const truth = exact.find((one) => one.statistic === p.statistic && one.method === 'exact')!.p!;
        expect(truth).toBeGreaterThan(error.interval[0]);
        expect(truth).toBeLessThan(error.interval[1]);
      }
    }
    for (const twoSidedRule of ['distance', 'doubled'] as const) {
      const two = [
        [5, 9],
        [3, 4],
      ];
      const exact = await pairsOf(two, { twoSidedRule });
      const sampled = await pairsOf(two, { twoSidedRule, ...options });
      for (let k = 0; k < 3; k++) expect(Math.abs(sampled[k]!.p! - exact[k]!.p!)).toBeLessThan(0.02);
    }
  });
});
