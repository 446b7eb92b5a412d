// The ordering by the smaller tail (Blaker 2000) in a 2x2 table: gamma(k) = min(P(K <= k), P(K >= k)), and a count is as
// extreme as the observed a when gamma(k) <= gamma(a). On a's own side these are the counts beyond it; on the other side those
// from some m on, which is searched for with exact tails.
import type { Place } from '../../statistic/contract.js';
import { liveTable, type LiveTable } from '../../table/live-table.js';
import { makeTable } from '../../table/table.js';
import type { Mass, Ordering } from '../contract.js';
import { exactTwoByTwo } from './two-by-two.js';
import { countWithTailLike } from './tail-of-like-size.js';
import { cornerLaw, type CornerLaw } from './two-by-two-law.js';

/** Place of a table by its corner count, given the index of that corner. The search is made when first asked for. */
export function placesBySmallerTail(live: LiveTable, corner: number): (counts: ArrayLike<number>) => Place {
  let placeOf: ((k: number) => Place) | undefined;
  return (counts) => {
    placeOf ??= placesOf(live, corner);
    return placeOf(counts[corner]!);
  };
}

function placesOf(live: LiveTable, corner: number): (k: number) => Place {
  const row = live.rowTotals[corner < 2 ? 0 : 1]!;
  const column = live.columnTotals[corner % 2]!;
  const law = cornerLaw(row, column, live.total);
  const a = live.counts[corner]!;
  const { lower, upper } = tailsAt(law, a);
  if (lower.log10 <= upper.log10) return onLowerSide(law, a, lower);
  // The columns exchanged bring the observed count to the lower side.
  const exchanged = onLowerSide(cornerLaw(row, live.total - column, live.total), row - a, upper);
  return (k) => exchanged(row - k);
}

/** @param tail P(K <= a), the smaller of the two tails. */
function onLowerSide(law: CornerLaw, a: number, tail: Mass): (k: number) => Place {
  const compared = new Map<number, Place>();
  /** 1 where P(K >= k) is the smaller one, 0 where it equals P(K <= a). */
  const placeOfTail = (k: number): Place => {
    let place = compared.get(k);
    if (place === undefined) compared.set(k, (place = compareTails(law, a, tail, k)));
    return place;
  };
  const m = firstWhere(
    (k) => k > a && (k > law.highest || placeOfTail(k) >= 0),
    countWithTailLike(law, a),
    a + 1,
    law.highest + 1,
  );
  // Tails fall strictly from count to count: only the first of those counts can tie.
  return (k) => (k < a ? 1 : k === a ? 0 : k < m ? -1 : k === m && placeOfTail(k) === 0 ? 0 : 1);
}

/** The first whole number in [least, most] from which a claim holds (it holds at `most`); looked for around a guess. */
function firstWhere(holds: (k: number) => boolean, guess: number, least: number, most: number): number {
  let low = least - 1;
  let high = most;
  let at = Math.min(most, Math.max(least, guess));
  for (let stride = 1; low + 1 < high; stride *= 2) {
    if (holds(at)) high = at;
    else low = at;
    const next = high === at ? at - stride : at + stride;
    at = next > low && next < high ? next : low + Math.ceil((high - low) / 2);
  }
  return high;
}

/** Tails that differ by less than this share are compared in whole numbers. */
const doubt = 1e-12;

function compareTails(law: CornerLaw, a: number, tail: Mass, k: number): Place {
  const other = tailsAt(law, k).upper;
  const difference = (other.log10 - tail.log10) * Math.LN10;
  // The logarithms are right to a few units in the last place.
  const unsure = doubt + 1e-15 * Math.abs(tail.log10) * Math.LN10 * 4;
  if (difference < -unsure) return 1;
  if (difference > unsure) return -1;
  const isMirror =
    (2 * law.column === law.total && k === law.row - a) || (2 * law.row === law.total && k === law.column - a);
  return isMirror ? 0 : compareExactly(law, a, k);
}

/** Sign of P(K <= a) - P(K >= k) in whole numbers. */
function compareExactly({ row, column, total, lowest, highest }: CornerLaw, a: number, k: number): Place {
  let weight = binomial(row, lowest) * binomial(total - row, column - lowest);
  let difference = 0n;
  for (let j = lowest; j <= highest; j++) {
    if (j <= a) difference += weight;
    if (j >= k) difference -= weight;
    weight =
      (weight * BigInt(row - j) * BigInt(column - j)) / (BigInt(j + 1) * BigInt(total - row - column + j + 1) || 1n);
  }
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
}

function binomial(n: number, k: number): bigint {
  let result = 1n;
  for (let i = 1; i <= Math.min(k, n - k); i++) result = (result * BigInt(n - Math.min(k, n - k) + i)) / BigInt(i);
  return result;
}

/** P(K <= k) and P(K >= k), exact. */
function tailsAt({ row, column, total }: CornerLaw, k: number): { lower: Mass; upper: Mass } {
  const counts = [
    [k, row - k],
    [column - k, total - row - column + k],
  ];
  const byCount = (name: 'lower' | 'upper'): Ordering => {
    const direction = name === 'upper' ? 1 : -1;
    return { name, place: (other) => Math.sign((other[0]! - k) * direction) as Place };
  };
  const { cuts } = exactTwoByTwo(liveTable(makeTable({ counts })), [byCount('lower'), byCount('upper')]);
  return { lower: cuts[0]!.atLeast, upper: cuts[1]!.atLeast };
}
