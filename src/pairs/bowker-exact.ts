// Exact test of symmetry by Bowker's statistic (1948), sum of (n_ij - n_ji)^2 / (n_ij + n_ji), given every n_ij + n_ji: fair coins, one
// set for each two levels. The pairs of levels are dealt into two halves; the law of each half's sum is worked out, and the halves are
// joined where they meet.
import { DoubleDouble } from '../numeric/double-double.js';
import type { ExactCut, Mass } from '../null/contract.js';
import { splitLaw } from './coin-law.js';
import { addPair, emptySum, type KeyList } from './sorted-keys.js';
import type { DiscordantPair } from './square-table.js';
import { compareKeys, lastOfSum, symmetryKeys, type SymmetryKeys } from './symmetry-keys.js';

/** A half of more sums than this would take too much memory. */
const mostSums = 3e6;
/** Statistics beyond this belong to probabilities near the end of the doubles. */
export const largestForDoubles = 900;

export interface HalvesForecast {
  readonly possible: boolean;
  readonly workUnits: number;
}

/** Differences of a pair that stay within the observed statistic. */
const mostDifference = (statistic: number, m: number): number => Math.min(m, Math.floor(Math.sqrt(statistic * m) + 1));

/** What the two halves would take, in units of one sum set and sorted. */
export function forecastBowker(pairs: readonly DiscordantPair[], statistic: number): HalvesForecast {
  const keys = symmetryKeys(pairs);
  if (keys === undefined || statistic > largestForDoubles) return { possible: false, workUnits: 0 };
  const sizes = halves(pairs, statistic).map((half) => {
    let size = 1;
    let work = 0;
    let wholeTotal = 0;
    for (const pair of half) {
      const m = pair.there + pair.back;
      const counts = Math.floor(mostDifference(statistic, m) / 2) + 1;
      wholeTotal += m * Number(keys.weights[pairs.indexOf(pair)]!) * m;
      work += size * counts * Math.ceil(Math.log2(counts) + 1);
      size = Math.min(size * counts, wholeTotal + 1, keys.observed.value + 1);
    }
    return { size, work };
  });
  return {
    possible: sizes.every(({ size }) => size <= mostSums),
    workUnits: sizes.reduce((sum, { work }) => sum + work, 100),
  };
}

/** The pairs dealt into two sets of about as many sums. */
function halves(pairs: readonly DiscordantPair[], statistic: number): [DiscordantPair[], DiscordantPair[]] {
  const sized = [...pairs].sort((a, b) => b.there + b.back - (a.there + a.back));
  const dealt: [DiscordantPair[], DiscordantPair[]] = [[], []];
  const sizes: [number, number] = [0, 0];
  for (const pair of sized) {
    const side = sizes[0] <= sizes[1] ? 0 : 1;
    dealt[side].push(pair);
    sizes[side] += Math.log(mostDifference(statistic, pair.there + pair.back) / 2 + 1);
  }
  return dealt;
}

/** The upper cut of the statistic. Call only where the forecast says that it is possible. */
export function exactBowker(pairs: readonly DiscordantPair[], statistic: number): ExactCut {
  const keys = symmetryKeys(pairs)!;
  const [one, other] = halves(pairs, statistic).map((half) =>
    half.reduce((list, pair) => {
      const m = pair.there + pair.back;
      return addPair(list, splitLaw(m, mostDifference(statistic, m)), keys.weights[pairs.indexOf(pair)]!, keys);
    }, emptySum),
  ) as [KeyList, KeyList];
  const { below, tied, above } = join(one, other, keys);
  const all = new DoubleDouble(above.high, above.low).addPair(tied.high, tied.low);
  // Per pair a product and a few sums, each rounded once; the sums over lists carry twice the digits.
  const relativeError = (pairs.length + 1) * 32 * 2 ** -53;
  return {
    kind: 'exact',
    ordering: 'upper',
    below: massOf(below.value),
    tied: massOf(tied.value),
    above: massOf(above.value),
    atLeast: below.value === 0 ? { value: 1, log10: 0 } : massOf(Math.min(1, all.value)),
    relativeError,
  };
}

const massOf = (value: number): Mass => ({ value, log10: value === 0 ? -Infinity : Math.log10(value) });

/** As sums of one half rise, the partner that reaches the observed sum falls. */
function join(one: KeyList, other: KeyList, { observed, slack }: SymmetryKeys): Record<Side, DoubleDouble> {
  const sums = { below: new DoubleDouble(), tied: new DoubleDouble(), above: new DoubleDouble() };
  const from = suffixSums(other, other.over);
  const upTo = prefixSums(other);
  const sideOf = (i: number, j: number): number =>
    compareKeys(
      one.values[i]! + other.values[j]!,
      lastOfSum(one.lasts[i]!, other.lasts[j]!),
      observed.value,
      observed.last,
      slack,
    );
  let j = other.length;
  for (let i = 0; i < one.length; i++) {
    // j: the first partner with which the sum is not below the observed one.
    while (j > 0 && sideOf(i, j - 1) >= 0) j--;
    const ties = j < other.length && sideOf(i, j) === 0 ? 1 : 0;
    const mass = one.masses[i]!;
    sums.below.add(mass * upTo[j]!);
    if (ties === 1) sums.tied.add(mass * other.masses[j]!);
    sums.above.add(mass * from[j + ties]!);
  }
  sums.above.add(one.over);
  return sums;
}

type Side = 'below' | 'tied' | 'above';

function suffixSums({ masses, length }: KeyList, beyond: number): Float64Array {
  const sums = new Float64Array(length + 1);
  const sum = new DoubleDouble(beyond);
  sums[length] = beyond;
  for (let k = length - 1; k >= 0; k--) sums[k] = sum.add(masses[k]!).value;
  return sums;
}

function prefixSums({ masses, length }: KeyList): Float64Array {
  const sums = new Float64Array(length + 1);
  const sum = new DoubleDouble();
  for (let k = 0; k < length; k++) sums[k + 1] = sum.add(masses[k]!).value;
  return sums;
}
