// The difference of two proportions, first minus second, with the hybrid of Wilson limits (Newcombe 1998, method 10) and
// the score interval of Miettinen & Nurminen (1985). Neither promises its level at every pair of proportions.
import { zOfConfidence } from '../numeric/normal-quantile.js';
import { lastWhere } from './conditional/root.js';
import type { Effect } from './contract.js';
import {
  approximateInterval,
  emptyGroup,
  estimateOf,
  noInterval,
  type EffectSettings,
  type Group,
  type TwoGroups,
} from './two-groups.js';

/** p1 - p2: -1 to 1, 0 for none. */
export function riskDifference(groups: TwoGroups, settings: EffectSettings): Effect {
  const empty = emptyGroup(groups);
  const { first, second } = groups;
  return {
    name: 'risk-difference',
    ...estimateOf(empty ?? first.events / first.size - second.events / second.size),
    direction: 'first-minus-second',
    intervals:
      empty === undefined
        ? [
            approximateInterval('newcombe', settings, newcombe(groups, settings.confidence)),
            approximateInterval('miettinen-nurminen', settings, scoreLimits(groups, settings.confidence)),
          ]
        : ['newcombe', 'miettinen-nurminen'].map((method) => noInterval(method, settings, empty)),
  };
}

/** Wilson (1927), without correction; ends at 0 and 1 exactly where the count does. */
export function wilson({ events, size }: Group, z: number): [number, number] {
  const square = z * z;
  const root = z * Math.sqrt(square + (4 * events * (size - events)) / size);
  const upper = (2 * events + square + root) / (2 * (size + square));
  // The product of the two is x^2 / (n (n + z^2)); the difference that also gives the lower one would cancel.
  const lower = (events / size) * (events / (size + square) / upper);
  return [lower, events === size ? 1 : upper];
}

function newcombe({ first, second }: TwoGroups, confidence: number): [number, number] {
  const z = zOfConfidence(confidence);
  const [p1, p2] = [first.events / first.size, second.events / second.size];
  const [l1, u1] = wilson(first, z);
  const [l2, u2] = wilson(second, z);
  return [p1 - p2 - Math.hypot(p1 - l1, u2 - p2), p1 - p2 + Math.hypot(u1 - p1, p2 - l2)];
}

/** All differences whose score statistic lies within z, its variance taken at the proportions most likely under that
 *  difference and multiplied by n / (n - 1). */
function scoreLimits(groups: TwoGroups, confidence: number): [number, number] {
  const { first, second } = groups;
  const total = first.size + second.size;
  const z = zOfConfidence(confidence) * Math.sqrt(total / (total - 1));
  const seen = first.events / first.size - second.events / second.size;
  const reach = (difference: number): number => z * Math.sqrt(varianceAt(groups, difference));
  const lower = lastWhere((difference) => seen - difference >= reach(difference), -1, seen);
  const upper = -lastWhere((negative) => -negative - seen >= reach(-negative), -1, -seen);
  return [lower, upper];
}

function varianceAt(groups: TwoGroups, difference: number): number {
  const { first, second } = groups;
  const p2 = restrictedSecond(groups, difference);
  const p1 = Math.min(1, Math.max(0, p2 + difference));
  return (p1 * (1 - p1)) / first.size + (p2 * (1 - p2)) / second.size;
}

/** The second proportion that makes the counts most likely when the first is `difference` more: where the slope of the
 *  log-likelihood, which falls, passes 0. */
export function restrictedSecond({ first, second }: TwoGroups, difference: number): number {
  const lowest = Math.max(0, -difference);
  const highest = Math.min(1, 1 - difference);
  const share = (count: number, p: number): number => (count === 0 ? 0 : count / p);
  const rises = (p: number): boolean =>
    share(first.events, p + difference) -
      share(first.size - first.events, 1 - p - difference) +
      share(second.events, p) -
      share(second.size - second.events, 1 - p) >
    0;
  return lastWhere(rises, lowest, highest);
}
