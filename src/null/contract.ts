// The one answer that every null gives: the cut. For an ordering of tables by extremeness, how much of the null law lies
// below, level with (tied) and above the observed table.
import type { CellLimits, CellSum, LinearForm, Place } from '../statistic/contract.js';

export type OrderingName = 'upper' | 'lower' | 'distance' | 'probability' | 'blaker';

/** What "as extreme" means. `sum`, `fold`, `linear` and `limits` are shorter ways to the same answer for engines that know
 *  them; `place` is always right. */
export interface Ordering {
  readonly name: OrderingName;
  /** Exact place of a table (row-major live counts) relative to the observed one. */
  place(counts: ArrayLike<number>): Place;
  /** The ordering is that of a sum over cells: above means direction x (S - observed) > 0. */
  readonly sum?: { readonly cells: CellSum; readonly direction: 1 | -1 };
  /** The ordering folds an exact sum over cells (slack 0) about a centre: above means S < low or S > high, level means S =
   *  low or S = high, below lies between. low <= high; both whole or half numbers. */
  readonly fold?: { readonly cells: CellSum; readonly low: number; readonly high: number };
  /** The ordering is one of the values of this sum (by the name of the ordering): its law alone decides. */
  readonly linear?: LinearForm;
  /** Nothing is known of the ordering but `place`: in a 2x2 table it may go up and down with the corner count. */
  readonly arbitrary?: true;
  /** The ordering is that of a largest over cells, by its name the upper or lower one. */
  readonly limits?: CellLimits;
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

/** Masses known to lie between two limits, rounding included. */
export interface BracketCut {
  readonly kind: 'bracket';
  readonly ordering: OrderingName;
  readonly atLeast: MassLimits;
  /** Of the tables more extreme than the observed one; its upper limit holds tables that may be level. */
  readonly above: MassLimits;
}

export interface MassLimits {
  readonly lower: Mass;
  readonly upper: Mass;
}

export type Cut = ExactCut | BracketCut | SampledCut;
