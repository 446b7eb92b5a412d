// The ordering by the smaller tail (Blaker 2000) of a linear statistic: gamma(s) = min(P(S <= s), P(S >= s)), smaller is more
// extreme. Doubles decide where they can; mirror images of a symmetric law tie; the rest is settled in whole numbers.
import type { LinearForm, Place } from '../../../statistic/contract.js';
import type { LiveTable } from '../../../table/live-table.js';
import type { DealtLaw } from './deal.js';
import { isSymmetric } from './linear-law.js';
import { scoredSides } from './scored-sides.js';
import { wholeCounts } from './whole-counts.js';

/** Place of each value of S. */
export function placesBySmallerTail(live: LiveTable, form: LinearForm, dealt: DealtLaw): Map<number, Place> {
  const sides = scoredSides(live, form);
  const law: [number, number][] = [];
  dealt.law.forEach((sum, value) => {
    if (value > 0) law.push([sum, value]);
  });
  const gammas = smallerTails(law, 0, (a, b) => a + b);
  const observed = gammas.get(form.observed)!;
  // Each tail adds up to as many terms as there are values, and is short by what was left out.
  const doubt = 4 * (dealt.roundings + law.length) * 2 ** -53 * observed + 2 * dealt.leftOut;
  const mirror = form.low + form.high - form.observed;
  const symmetric = isSymmetric(sides);
  let exact: Map<number, bigint> | undefined;
  const places = new Map<number, Place>();
  for (const [sum, gamma] of gammas) {
    if (sum === form.observed || (symmetric && sum === mirror)) places.set(sum, 0);
    else if (Math.abs(gamma - observed) > doubt) places.set(sum, gamma < observed ? 1 : -1);
    else {
      exact ??= smallerTails([...wholeCounts(sides)], 0n, (a, b) => a + b);
      const [ours, theirs] = [exact.get(sum)!, exact.get(form.observed)!];
      places.set(sum, ours < theirs ? 1 : ours > theirs ? -1 : 0);
    }
  }
  return places;
}

/** The smaller of the two tails that each value belongs to, itself included. */
function smallerTails<T extends number | bigint>(
  law: readonly (readonly [number, T])[],
  none: T,
  add: (a: T, b: T) => T,
): Map<number, T> {
  const sorted = [...law].sort(([a], [b]) => a - b);
  const smallest = new Map<number, T>();
  for (const values of [sorted, sorted.toReversed()]) {
    let tail = none;
    for (const [sum, value] of values) {
      tail = add(tail, value);
      const other = smallest.get(sum);
      smallest.set(sum, other === undefined || tail < other ? tail : other);
    }
  }
  return smallest;
}
