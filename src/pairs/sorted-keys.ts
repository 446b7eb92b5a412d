// Sorted lists of exact keys with their probabilities: shifted copies merged into one, equal keys joined.
import { compareKeys, keyOf, lastOfSum, type Key, type SymmetryKeys } from './symmetry-keys.js';
import type { SplitLaw } from './coin-law.js';

export interface KeyList {
  readonly length: number;
  readonly values: Float64Array;
  readonly lasts: Float64Array;
  readonly masses: Float64Array;
  /** Probability of sums beyond the observed one: whatever is added, they stay beyond. */
  readonly over: number;
}

/** The sum over no pairs at all. */
export const emptySum: KeyList = {
  length: 1,
  values: new Float64Array(1),
  lasts: new Float64Array(1),
  masses: new Float64Array([1]),
  over: 0,
};

/** Adds one pair: its difference d adds d^2 x weight. */
export function addPair(list: KeyList, law: SplitLaw, weight: bigint, keys: SymmetryKeys): KeyList {
  let over = list.over + sumOf(list.masses, list.length) * law.beyond;
  const shifted = (k: number): KeyList => {
    const part = shiftedBy(list, keyOf(BigInt(law.differences[k]!) ** 2n * weight), law.masses[k]!, keys);
    over += part.over;
    return part;
  };
  const merged = (from: number, to: number): KeyList => {
    if (to - from === 1) return shifted(from);
    const middle = (from + to) >> 1;
    return mergeTwo(merged(from, middle), merged(middle, to), keys.slack);
  };
  const count = law.differences.length;
  // Nothing of this pair stays within the observed sum: all of it is over.
  if (count === 0) return { ...emptySum, length: 0, over };
  return { ...merged(0, count), over };
}

/** `over` of the copy: what the shift pushed beyond the observed sum. */
function shiftedBy(list: KeyList, by: Key, times: number, { observed, slack }: SymmetryKeys): KeyList {
  const values = new Float64Array(list.length);
  const lasts = new Float64Array(list.length);
  const masses = new Float64Array(list.length);
  let length = 0;
  let over = 0;
  for (let k = 0; k < list.length; k++) {
    const value = list.values[k]! + by.value;
    const last = lastOfSum(list.lasts[k]!, by.last);
    const mass = list.masses[k]! * times;
    if (compareKeys(value, last, observed.value, observed.last, slack) > 0) over += mass;
    else {
      values[length] = value;
      lasts[length] = last;
      masses[length++] = mass;
    }
  }
  return { length, values, lasts, masses, over };
}

function mergeTwo(one: KeyList, other: KeyList, slack: number): KeyList {
  const most = one.length + other.length;
  const values = new Float64Array(most);
  const lasts = new Float64Array(most);
  const masses = new Float64Array(most);
  let length = 0;
  let i = 0;
  let j = 0;
  while (i < one.length || j < other.length) {
    const order =
      i >= one.length
        ? 1
        : j >= other.length
          ? -1
          : compareKeys(one.values[i]!, one.lasts[i]!, other.values[j]!, other.lasts[j]!, slack);
    const from = order <= 0 ? one : other;
    const at = order <= 0 ? i : j;
    values[length] = from.values[at]!;
    lasts[length] = from.lasts[at]!;
    masses[length] = from.masses[at]! + (order === 0 ? other.masses[j]! : 0);
    length++;
    if (order <= 0) i++;
    if (order >= 0) j++;
  }
  return { length, values, lasts, masses, over: 0 };
}

export function sumOf(masses: Float64Array, length: number): number {
  let sum = 0;
  for (let k = length - 1; k >= 0; k--) sum += masses[k]!;
  return sum;
}
