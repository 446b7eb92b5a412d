// Exact keys for Bowker's statistic. Times the least common multiple L of the pair totals it is a whole number, often longer than a
// double holds. A key is its value rounded to a double, beside its last 52 bits: where two values lie within the bound on rounding,
// the last bits tell their exact difference.
import { greatestCommonDivisor } from '../numeric/greatest-common-divisor.js';
import type { DiscordantPair } from './square-table.js';

const window = 2 ** 52;

export interface SymmetryKeys {
  /** L / m for each pair: its part of the statistic is d^2 L / m. */
  readonly weights: readonly bigint[];
  /** Differences of values beyond this are certain; 0 where all are exact. */
  readonly slack: number;
  readonly observed: Key;
  /** L, as a double: values over it are the statistic. */
  readonly scale: number;
}

export interface Key {
  readonly value: number;
  /** The last 52 bits. */
  readonly last: number;
}

/** Undefined where even this form does not reach: L (sum of m) at 2^96 or more. */
export function symmetryKeys(pairs: readonly DiscordantPair[]): SymmetryKeys | undefined {
  const totals = pairs.map(({ there, back }) => BigInt(there + back));
  const multiple = totals.reduce((all, m) => (all / greatestCommonDivisor(all, m)) * m, 1n);
  const largest = multiple * totals.reduce((sum, m) => sum + m, 0n);
  if (largest >= 2n ** 96n || pairs.length > 40) return undefined;
  const weights = totals.map((m) => multiple / m);
  const observed = pairs.reduce((sum, { there, back }, k) => sum + BigInt(there - back) ** 2n * weights[k]!, 0n);
  return {
    weights,
    // Each part and each sum rounded once, on both sides of a comparison; twice for good measure.
    slack: largest < 2n ** 52n ? 0 : 4 * (pairs.length + 2) * 2 ** -53 * Number(largest),
    observed: keyOf(observed),
    scale: Number(multiple),
  };
}

export const keyOf = (whole: bigint): Key => ({ value: Number(whole), last: Number(whole & (2n ** 52n - 1n)) });

/** Last bits of a sum. */
export const lastOfSum = (a: number, b: number): number => (a + b >= window ? a + b - window : a + b);

/** Exact sign of one key minus another. */
export function compareKeys(value: number, last: number, other: number, otherLast: number, slack: number): number {
  const difference = value - other;
  if (difference > slack) return 1;
  if (difference < -slack) return -1;
  if (slack === 0) return 0;
  const apart = last - otherLast;
  return apart === 0 ? 0 : apart > window / 2 || (apart < 0 && apart >= -window / 2) ? -1 : 1;
}
