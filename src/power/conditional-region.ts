// Where the test that holds both margins rejects: for every number of events on its own, the first-group counts whose p is at
// most alpha (Fisher 1935; mid: ties by half, Lancaster 1961). Doubles decide where they surely can, whole numbers elsewhere.
import { groupLaw } from '../null/unconditional/group-law.js';
import type { RejectionRegion, Sizes, TwoGroupTesting } from './design.js';

/** Relative nearness of p and alpha within which whole numbers decide; sums of the law are right to (5 n + 20) 2^-52. */
const near = 1e-9;

/** O(first x second x log). Sizes from 1. */
export function conditionalRegion({ first, second }: Sizes, testing: TwoGroupTesting): RejectionRegion {
  const inside = new Uint8Array((first + 1) * (second + 1));
  const alpha = Number(testing.alpha.numerator) / Number(testing.alpha.denominator);
  for (let events = 0; events <= first + second; events++) {
    const law = groupLaw(first, second, events);
    const ranks = ranksOf(first, second, events, law.lowest, law.weights, testing);
    const { weights, whole, lowest } = law;
    for (let k = 0; k < weights.length; k++) {
      const p = doubledShare(ranks, k, (other) => weights[other]!, testing) / (2 * whole);
      const rejected =
        Math.abs(p - alpha) > near * alpha
          ? p < alpha
          : rejectsExactly(first, second, events, lowest, ranks, k, testing);
      if (rejected) inside[(lowest + k) * (second + 1) + events - lowest - k] = 1;
    }
  }
  return { first, second, inside };
}

/** Extremeness of each count as ranks, equal where they tie exactly: one list for each tail that p is made of. */
type Ranks = readonly (readonly number[])[];

function ranksOf(
  first: number,
  second: number,
  events: number,
  lowest: number,
  weights: Float64Array,
  { tail, rule }: TwoGroupTesting,
): Ranks {
  const counts = Array.from(weights, (_, k) => lowest + k);
  if (tail === 'upper') return [counts];
  if (tail === 'lower') return [counts.map((x) => -x)];
  if (rule === 'doubled') return [counts, counts.map((x) => -x)];
  // |x n - n1 t|, whole numbers.
  if (rule === 'distance') return [counts.map((x) => Math.abs(x * (first + second) - first * events))];
  return [rarity(first, second, events, counts, weights)];
}

/** Rarer counts rank higher; counts of equal probability, told by whole numbers, share a rank. */
function rarity(
  first: number,
  second: number,
  events: number,
  counts: readonly number[],
  weights: Float64Array,
): number[] {
  const order = [...counts.keys()].sort((a, b) => weights[b]! - weights[a]!);
  const ranks = new Array<number>(counts.length);
  let rank = 0;
  order.forEach((k, place) => {
    const before = order[place - 1];
    if (before !== undefined && !isLevel(before, k)) rank++;
    ranks[k] = rank;
  });
  return ranks;

  function isLevel(a: number, b: number): boolean {
    if (Math.abs(weights[a]! - weights[b]!) > near * weights[a]!) return false;
    return weightOf(first, second, events, counts[a]!) === weightOf(first, second, events, counts[b]!);
  }
}

/** Twice the mass that makes p (mid: ties once, not twice); with two tails, twice the smaller of them. */
function doubledShare(ranks: Ranks, k: number, weight: (k: number) => number, { test }: TwoGroupTesting): number {
  const tails = ranks.map((list) => {
    let sum = 0;
    list.forEach((rank, other) => {
      if (rank > list[k]!) sum += 2 * weight(other);
      else if (rank === list[k]) sum += (test === 'mid' ? 1 : 2) * weight(other);
    });
    return sum;
  });
  return tails.length === 1 ? tails[0]! : 2 * Math.min(...tails);
}

/** p <= alpha in whole numbers. */
function rejectsExactly(
  first: number,
  second: number,
  events: number,
  lowest: number,
  ranks: Ranks,
  k: number,
  { test, alpha }: TwoGroupTesting,
): boolean {
  const tails = ranks.map((list) =>
    list.reduce((sum, rank, other) => {
      if (rank < list[k]!) return sum;
      const times = rank === list[k] && test === 'mid' ? 1n : 2n;
      return sum + times * weightOf(first, second, events, lowest + other);
    }, 0n),
  );
  const smallest = tails.reduce((a, b) => (a < b ? a : b)) * (tails.length === 1 ? 1n : 2n);
  return smallest * alpha.denominator <= 2n * alpha.numerator * choose(first + second, events);
}

const weightOf = (first: number, second: number, events: number, x: number): bigint =>
  choose(first, x) * choose(second, events - x);

const remembered = new Map<number, bigint[]>();

function choose(n: number, k: number): bigint {
  let row = remembered.get(n);
  if (row === undefined) {
    row = [1n];
    for (let i = 1; i <= n; i++) row.push((row[i - 1]! * BigInt(n - i + 1)) / BigInt(i));
    if (remembered.size > 50) remembered.clear();
    remembered.set(n, row);
  }
  return row[k]!;
}
