// The difference of two proportions seen on the same pairs: the share of a level in the rows minus its share in the columns, which is
// (b - c) / n. Intervals by the score method (Tango 1998), by squaring and adding Wilson limits (Newcombe 1998, method 10), and Wald's.
import type { Effect, Interval } from '../effect/contract.js';
import { rootOf } from './matched-odds-ratio.js';

/** A 2x2 table of pairs with respect to one level: both, first only (b), second only (c), neither. */
export interface OneLevel {
  readonly both: number;
  readonly there: number;
  readonly back: number;
  readonly neither: number;
}

/** @param z quantile of the standard normal law for the level; the table holds at least one pair. */
export function matchedDifference(level: OneLevel, event: string, confidence: number, z: number): Effect {
  const { both, there, back, neither } = level;
  const n = both + there + back + neither;
  const named = (method: string, [lower, upper]: readonly [number, number], invertsP?: string): Interval => ({
    method,
    confidence,
    lower,
    upper,
    ...(invertsP === undefined ? {} : { invertsP }),
    guaranteed: false,
  });
  return {
    name: 'matched-difference',
    estimate: (there - back) / n,
    groups: 'rows',
    event,
    direction: 'first-minus-second',
    intervals: [
      named('tango', tango(there, back, n, z), 'score'),
      named('newcombe', newcombe(level, n, z)),
      // Wald's has no width where no pair changed.
      there + back === 0
        ? { method: 'wald', confidence, lower: null, upper: null, reason: 'zero-variance' }
        : named('wald', wald(there, back, n, z)),
    ],
  };
}

/** Differences that the score test for pairs does not reject. Where b = c = 0 as well. */
function tango(there: number, back: number, n: number, z: number): [number, number] {
  /** The score statistic against the difference d, which falls as d rises from -1 to 1. */
  const score = (d: number): number => {
    const middle = -there - back + (2 * n - there + back) * d;
    // The likeliest probability of going back, given d: the larger root of 2n q^2 + middle q - c d (1 - d).
    const q = (Math.sqrt(middle * middle + 8 * n * back * d * (1 - d)) - middle) / (4 * n);
    const variance = n * (2 * q + d * (1 - d));
    const apart = there - back - n * d;
    return variance > 0 ? apart / Math.sqrt(variance) : apart === 0 ? 0 : Math.sign(apart) * Infinity;
  };
  const estimate = (there - back) / n;
  return [
    estimate === -1 ? -1 : rootOf((d) => z - score(d), -1, estimate),
    estimate === 1 ? 1 : rootOf((d) => -z - score(d), estimate, 1),
  ];
}

/** Limits of one proportion (Wilson 1927), no continuity correction. */
export function wilson(hits: number, n: number, z: number): [number, number] {
  const middle = hits + (z * z) / 2;
  const half = z * Math.sqrt((hits * (n - hits)) / n + (z * z) / 4);
  return [hits === 0 ? 0 : (middle - half) / (n + z * z), hits === n ? 1 : (middle + half) / (n + z * z)];
}

/** Newcombe's method 10: the correlation of the two proportions enters, its numerator shrunk by n/2 where it is positive. */
function newcombe({ both, there, back, neither }: OneLevel, n: number, z: number): [number, number] {
  const hits = [both + there, both + back] as const;
  const [p, q] = [hits[0] / n, hits[1] / n];
  const [low, high] = wilson(hits[0], n, z);
  const [otherLow, otherHigh] = wilson(hits[1], n, z);
  const product = (both + there) * (back + neither) * (both + back) * (there + neither);
  const cross = both * neither - there * back;
  const phi = product === 0 ? 0 : (cross > 0 ? Math.max(0, cross - n / 2) : cross) / Math.sqrt(product);
  const reach = (one: number, other: number): number =>
    Math.sqrt(Math.max(0, one * one - 2 * phi * one * other + other * other));
  const difference = (there - back) / n;
  return [difference - reach(p - low, otherHigh - q), difference + reach(high - p, q - otherLow)];
}

function wald(there: number, back: number, n: number, z: number): [number, number] {
  const half = (z * Math.sqrt(there + back - (there - back) ** 2 / n)) / n;
  const difference = (there - back) / n;
  return [Math.max(-1, difference - half), Math.min(1, difference + half)];
}
