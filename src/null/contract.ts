// The one answer that every null gives: the cut. For an ordering of tables by extremeness, how much of the null law lies
// below, level with (tied) and above the observed table.
import type { CellSum, Place } from '../statistic/contract.js';

export type OrderingName = 'upper' | 'lower' | 'distance' | 'probability';

/** What "as extreme" means. Exactly one of `sum` (fast path for sums over cells) and `corner` (2x2) may guide an engine;
 *  `place` is always right. */
export interface Ordering {
  readonly name: OrderingName;
  /** Exact place of a table (row-major live counts) relative to the observed one. */
  place(counts: ArrayLike<number>): Place;
  /** The ordering is that of a sum over cells: above means direction x (S - observed) > 0. */
  readonly sum?: { readonly cells: CellSum; readonly direction: 1 | -1 };
}

/** A probability that may be too small for a double: value is then 0 and log10 tells. log10 is -Infinity for mass 0. */
export interface Mass {
  readonly value: number;
  readonly log10: number;
}

export interface ExactCut {
  readonly kind: 'exact';
  readonly ordering: OrderingName;
  readonly below: Mass;
  readonly tied: Mass;
  readonly above: Mass;
  /** tied + above, added before rounding. */
  readonly atLeast: Mass;
  /** Stated bound on the relative error of every mass. */
  readonly relativeError: number;
}

export interface SampledCut {
  readonly kind: 'sampled';
  readonly ordering: OrderingName;
  /** Counts of draws; below + tied + above = draws. */
  readonly below: number;
  readonly tied: number;
  readonly above: number;
  readonly draws: number;
}

export type Cut = ExactCut | SampledCut;
