// Which of two cells' p-values is the smaller, decided exactly: within one law by distance, between laws by their logarithms
// and, where these are too close, by whole-number sums of binomial products over one denominator.
import type { CellLaw } from './cell-law.js';

export interface PlacedCount {
  readonly law: CellLaw;
  /** A count of the folded law. */
  readonly k: number;
}

/** Both logarithms are right to a tenth of this. */
const near = 1e-10;

/** Up to this total near ties between different laws are settled in whole numbers. */
export const largestSettled = 4096;

/** log2 of the p of a count; counts left off the law are deeper than any double. */
export const log2POf = ({ law, k }: PlacedCount): number => law.log2P[k - law.lowest] ?? -Infinity;

/**
 * Sign of p(a) - p(b). Beyond `largestSettled`, p-values of different laws that agree to ten digits count as tied, which can
 * only make an adjusted p larger.
 */
export function compareP(a: PlacedCount, b: PlacedCount): -1 | 0 | 1 {
  if (a.law === b.law) return closer(b) < closer(a) ? -1 : closer(b) > closer(a) ? 1 : 0;
  const difference = log2POf(a) - log2POf(b);
  if (Math.abs(difference) > near) return difference > 0 ? 1 : -1;
  if (a.law.total > largestSettled) return 0;
  const [one, other] = [tailOf(a) * wholeOf(b.law), tailOf(b) * wholeOf(a.law)];
  return one > other ? 1 : one < other ? -1 : 0;
}

/** Distance from the mean, times the total: exact. */
const closer = ({ law, k }: PlacedCount): bigint => {
  const apart = BigInt(k) * BigInt(law.total) - BigInt(law.row) * BigInt(law.column);
  return apart < 0n ? -apart : apart;
};

interface Exact {
  readonly whole: bigint;
  /** Ways for each k from 0 to row. */
  readonly ways: readonly bigint[];
}

const exactForms = new WeakMap<CellLaw, Exact>();

function exactForm(law: CellLaw): Exact {
  const known = exactForms.get(law);
  if (known !== undefined) return known;
  const { row, column, total } = law;
  const ways = [choose(total - row, column)];
  for (let k = 0; k < row; k++) {
    const [more, fewer] = [(row - k) * (column - k), (k + 1) * (total - row - column + k + 1)];
    ways.push((ways[k]! * BigInt(more)) / BigInt(fewer));
  }
  const form = { whole: choose(total, column), ways };
  exactForms.set(law, form);
  return form;
}

const wholeOf = (law: CellLaw): bigint => exactForm(law).whole;

function tailOf(place: PlacedCount): bigint {
  const least = closer(place);
  return exactForm(place.law).ways.reduce(
    (sum, ways, k) => (closer({ law: place.law, k }) >= least ? sum + ways : sum),
    0n,
  );
}

function choose(n: number, k: number): bigint {
  let ways = 1n;
  for (let i = 1; i <= k; i++) ways = (ways * BigInt(n - k + i)) / BigInt(i);
  return ways;
}
