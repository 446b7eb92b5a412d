// The law of one cell of a 2x2 table with both margins held: the hypergeometric distribution (Fisher 1935), walked
// outward from its middle by the ratio of neighbouring probabilities in double-double.
import { beyondEntropy, devianceTerm } from '../../numeric/saddle-point.js';
import type { WideSum } from '../../numeric/wide-number.js';
import { CornerTerms } from './corner-terms.js';

export interface CornerLaw {
  /** Total of the corner's row, of its column, and of the table. */
  readonly row: number;
  readonly column: number;
  readonly total: number;
  /** Smallest and largest possible corner count. */
  readonly lowest: number;
  readonly highest: number;
  /** floor of the mean: extremeness falls (or rises) on each side of the gap after it. */
  readonly middle: number;
}

export function cornerLaw(row: number, column: number, total: number): CornerLaw {
  const lowest = Math.max(0, row - (total - column));
  const highest = Math.min(row, column);
  const middle = Number((BigInt(row) * BigInt(column)) / BigInt(total));
  return { row, column, total, lowest, highest, middle: Math.min(highest, Math.max(lowest, middle)) };
}

/** A stretch of corner counts on one side, in walking order: from nearer the middle to further out, both included. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly mass: WideSum;
}

const checkEvery = 64;
/** Below this share of the middle, a mass is no double any more and only its logarithm is reported. */
const beyondDoubles = -1100;

/**
 * Walks one side of the law from the middle outward, adding P(k)/P(middle) to each stretch.
 * `settled(stretch, log2Rest)` is asked now and then, with log2 of a bound on all that is still to come; true ends the
 * walk. Each step multiplies by one ratio of whole numbers: relative error of the k-th term below k 2^-100.
 * Where the terms have left the range of doubles and the rest of a stretch cannot change it, the walk leaps to the next
 * stretch by logarithms: at most about 39 standard deviations are walked, whatever the total.
 */
export function walk(
  law: CornerLaw,
  direction: 1 | -1,
  stretches: readonly Stretch[],
  settled: (stretch: number, log2Rest: number) => boolean,
): void {
  const terms = new CornerTerms(law, direction);
  for (let s = 0; s < stretches.length; s++) {
    const { from, to, mass } = stretches[s]!;
    if (Math.abs(from - terms.at) > 1) terms.leapTo(from, (logLaw(law, from) - logLaw(law, law.middle)) / Math.LN2);
    let k = from;
    while (direction > 0 ? k <= to : k >= to) {
      const pause = direction > 0 ? Math.min(to, nextCheck(k)) : Math.max(to, lastCheck(k));
      k = terms.addThrough(k, pause, mass) + direction;
      if (terms.at !== pause || pause % checkEvery !== 0) continue;
      const ratio = direction > 0 ? upRatio(law, pause) : downRatio(law, pause);
      if (ratio >= 1) continue;
      const log2Rest = terms.log2 + Math.log2(ratio / (1 - ratio));
      if (settled(s, log2Rest)) return;
      if (log2Rest < beyondDoubles && log2Rest < mass.log2 - 70) break;
    }
  }
}

/** The first multiple of `checkEvery` from k upward, and downward. */
const nextCheck = (k: number): number => Math.ceil(k / checkEvery) * checkEvery;
const lastCheck = (k: number): number => Math.floor(k / checkEvery) * checkEvery;

/** ln P(k) up to a constant of the law, by the saddle-point expansion (Loader 2000). */
export function logLaw({ row, column, total }: CornerLaw, k: number): number {
  const share = row / total;
  const others = total - column;
  return -(
    devianceTerm(k, column * share) +
    devianceTerm(row - k, others * share) +
    devianceTerm(column - k, column * (1 - share)) +
    devianceTerm(others - row + k, others * (1 - share)) +
    beyondEntropy(k) +
    beyondEntropy(row - k) +
    beyondEntropy(column - k) +
    beyondEntropy(others - row + k)
  );
}

/** P(k + 1) / P(k), falling in k. */
export const upRatio = ({ row, column, total }: CornerLaw, k: number): number =>
  (((row - k) / (k + 1)) * (column - k)) / (total - row - column + k + 1);

/** P(k - 1) / P(k), falling as k falls. */
export const downRatio = ({ row, column, total }: CornerLaw, k: number): number =>
  ((k / (row - k + 1)) * (total - row - column + k)) / (column - k + 1);
