// The smallest groups with which the test reaches a power. Power does not rise with every unit (discrete tests saw-tooth), so two
// answers are given: the first sizes that reach it, and those from which on none that was looked at falls short again.
import { toDouble } from '../numeric/rational.js';
import { bestPower } from './best-power.js';
import type { Sizes, TwoGroupTesting } from './design.js';
import { exactPower, type ExactPower } from './exact-power.js';

export interface SizedPower extends Sizes, ExactPower {}

export interface SmallestSizes {
  /** Undefined where none up to the largest allowed reaches the power. */
  readonly reached: SizedPower | undefined;
  /** From these on, all sizes looked at reach it. */
  readonly steady: SizedPower | undefined;
  /** First-group size up to which sizes were looked at. */
  readonly lookedAtTo: number;
  /** Sizes below this were left out because no test of this level can reach the power there. */
  readonly startedAt: number;
}

export interface SizeWishes {
  readonly proportions: readonly [number, number];
  readonly power: number;
  /** Second group over first. */
  readonly ratio: number;
  /** Largest first group to look at. */
  readonly largest: number;
  readonly testing: TwoGroupTesting;
  readonly onProgress?: (first: number) => void;
}

/** How far beyond the first sizes that reach it the power is looked at again. */
const lookAhead = (first: number): number => first + Math.max(10, Math.ceil(first / 5));

export const sizesAt = (first: number, ratio: number): Sizes => ({
  first,
  second: Math.max(1, Math.round(first * ratio)),
});

export function smallestSizes(wishes: SizeWishes): SmallestSizes {
  const { proportions, power, ratio, largest, testing, onProgress } = wishes;
  const startedAt = testing.test === 'mid' ? 1 : firstPossible(wishes);
  let reached: SizedPower | undefined;
  let steady: SizedPower | undefined;
  let end = largest;
  let first = startedAt;
  for (; first <= end; first++) {
    onProgress?.(first);
    const sizes = sizesAt(first, ratio);
    const found = { ...sizes, ...exactPower(sizes, proportions, testing) };
    if (found.power < power) {
      steady = undefined;
      continue;
    }
    steady ??= found;
    if (reached === undefined) {
      reached = found;
      end = Math.min(largest, lookAhead(first));
    }
  }
  return { reached, steady, lookedAtTo: Math.max(startedAt, first - 1), startedAt };
}

/** By halving, since the bound rises with the sizes. */
function firstPossible({ proportions, power, ratio, largest, testing }: SizeWishes): number {
  const alpha = toDouble(testing.alpha);
  const canReach = (first: number): boolean => bestPower(sizesAt(first, ratio), proportions, alpha) >= power;
  let [low, high] = [1, 1];
  while (high < largest && !canReach(high)) [low, high] = [high, Math.min(largest, 2 * high)];
  while (low + 1 < high) {
    const middle = (low + high) >> 1;
    if (canReach(middle)) high = middle;
    else low = middle;
  }
  return high === 1 ? 1 : low + 1;
}
