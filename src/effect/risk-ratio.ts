// The ratio of two proportions, first over second, with the interval on the logarithm (Katz et al. 1978) and the score
// intervals of Koopman (1984) and Miettinen & Nurminen (1985). Nothing is added to an empty cell.
import { zOfConfidence } from '../numeric/normal-quantile.js';
import { lastWhere } from './conditional/root.js';
import type { Effect, EffectReason, Interval } from './contract.js';
import {
  approximateInterval,
  emptyGroup,
  estimateOf,
  noEvents,
  noInterval,
  onlyEvents,
  type EffectSettings,
  type TwoGroups,
} from './two-groups.js';

/** p1 / p2: 0 to infinity, 1 for none. */
export function riskRatio(groups: TwoGroups, settings: EffectSettings): Effect {
  return {
    name: 'risk-ratio',
    ...estimateOf(sampleRiskRatio(groups)),
    direction: 'first-over-second',
    intervals: [
      logInterval(groups, settings),
      scoreInterval('koopman', groups, settings, 1),
      scoreInterval('miettinen-nurminen', groups, settings, factorOf(groups)),
    ],
  };
}

const factorOf = ({ first, second }: TwoGroups): number => {
  const total = first.size + second.size;
  return total / (total - 1);
};

function sampleRiskRatio(groups: TwoGroups): number | EffectReason {
  const empty = emptyGroup(groups);
  if (empty !== undefined) return empty;
  if (noEvents(groups)) return 'no-events';
  const { first, second } = groups;
  return second.events === 0 ? Infinity : first.events / first.size / (second.events / second.size);
}

/** exp(ln RR +- z sqrt(1/x1 - 1/n1 + 1/x2 - 1/n2)); none where a group has no event. */
function logInterval(groups: TwoGroups, settings: EffectSettings): Interval {
  const { first, second } = groups;
  const empty = emptyGroup(groups);
  if (empty !== undefined) return noInterval('log', settings, empty);
  if (first.events === 0 || second.events === 0) {
    return noInterval('log', settings, noEvents(groups) ? 'no-events' : 'zero-cell');
  }
  if (onlyEvents(groups)) return noInterval('log', settings, 'zero-variance');
  const part = ({ events, size }: TwoGroups['first']): number => (size - events) / size / events;
  const centre = Math.log(first.events / first.size) - Math.log(second.events / second.size);
  const half = zOfConfidence(settings.confidence) * Math.sqrt(part(first) + part(second));
  return approximateInterval('log', settings, [Math.exp(centre - half), Math.exp(centre + half)]);
}

/** Ratios of up to e^100 either way are looked at; totals below 2^53 give none beyond. */
const widest = 100;

/** All ratios whose score statistic lies within z, its variance taken at the proportions most likely under that ratio. */
function scoreInterval(method: string, groups: TwoGroups, settings: EffectSettings, factor: number): Interval {
  const empty = emptyGroup(groups);
  if (empty !== undefined) return noInterval(method, settings, empty);
  const z = zOfConfidence(settings.confidence) * Math.sqrt(factor);
  const lower = lowerLimit(groups, z);
  // The groups exchanged turn the ratio upside down.
  const upper = 1 / lowerLimit({ first: groups.second, second: groups.first }, z);
  return approximateInterval(method, settings, [lower, upper], noEvents(groups) ? 'no-events' : 'zero-cell');
}

function lowerLimit(groups: TwoGroups, z: number): number {
  const { first, second } = groups;
  if (first.events === 0) return 0;
  const p1 = first.events / first.size;
  const p2 = second.events / second.size;
  const above = (logRatio: number): boolean => {
    const ratio = Math.exp(logRatio);
    const excess = p1 - ratio * p2;
    // At the ratio seen nothing is in excess, even where nothing but events leaves no variance either.
    return excess > 0 && excess >= z * Math.sqrt(varianceAt(groups, ratio));
  };
  return Math.exp(lastWhere(above, -widest, widest));
}

/** Variance of p1 - ratio x p2 at the most likely proportions with p1 = ratio x p2. */
function varianceAt({ first, second }: TwoGroups, ratio: number): number {
  const a = (first.size + second.size) * ratio;
  const b = first.size * ratio + first.events + second.size + second.events * ratio;
  const c = first.events + second.events;
  // The smaller root of a p^2 - b p + c, in the form that does not cancel.
  const p2 = Math.min(1, (2 * c) / (b + Math.sqrt(Math.max(0, b * b - 4 * a * c))));
  const p1 = Math.min(1, ratio * p2);
  return (p1 * (1 - p1)) / first.size + (ratio * ratio * p2 * (1 - p2)) / second.size;
}
