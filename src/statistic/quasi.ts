// Pearson's and the likelihood-ratio statistic against quasi-independence: the same sums over the possible cells.
import { devianceTerm } from '../numeric/saddle-point.js';
import { compareSelfPowers } from './comparison/self-powers.js';
import type { Place } from './contract.js';

export const quasiStatistics = ['pearson', 'likelihood-ratio'] as const;
export type QuasiStatistic = (typeof quasiStatistics)[number];

export interface BoundQuasi {
  readonly value: number;
  /** Place beside the observed table. `likelihood-ratio`: exact (the expected counts drop out, the margins held). `pearson`: expected
   *  counts are no fractions, so values that agree to nine digits count as ties, which can only make p larger. */
  place(counts: ArrayLike<number>): Place;
}

const near = 1e-9;

/** @param cells those with an expected count above 0; arrays row-major over the whole table. */
export function bindQuasi(
  name: QuasiStatistic,
  observed: Float64Array,
  expected: Float64Array,
  cells: readonly number[],
): BoundQuasi {
  const term =
    name === 'pearson'
      ? (n: number, e: number): number => ((n - e) * (n - e)) / e
      : (n: number, e: number): number => 2 * devianceTerm(n, e);
  const sum = (counts: ArrayLike<number>): number => {
    let all = 0;
    for (const cell of cells) all += term(counts[cell]!, expected[cell]!);
    return all;
  };
  const value = sum(observed);
  const slack = near * (1 + value);
  return {
    value,
    place(counts) {
      const apart = sum(counts) - value;
      if (apart > slack) return 1;
      if (apart < -slack) return -1;
      return name === 'pearson' ? 0 : compareSelfPowers(counts, observed);
    },
  };
}
