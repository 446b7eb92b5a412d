// The exact interval of a difference or ratio of two proportions where the study fixed the sizes of both groups (Chan & Zhang
// 1999): the values that two one-tailed score-ordered unconditional tests do not reject, each at half of 1 - confidence.
import { exactLimits, limitWork } from '../null/unconditional/exact-limits.js';
import { extended, type Effect, type Interval } from './contract.js';
import { emptyGroup, noInterval, type TwoGroups } from './two-groups.js';

/** Counted work may come to this many times its forecast, where p rises and falls with the value. */
const mostOverrun = 15;

export interface ExactSettings {
  readonly confidence: number;
  /** Most counted work for each interval, in units of about 30 ns. */
  readonly effort: number;
}

/** The effect with that interval behind its others, or with the reason why there is none. */
export const withExactInterval = (
  effect: Effect,
  of: 'difference' | 'ratio',
  groups: TwoGroups,
  settings: ExactSettings,
): Effect => ({ ...effect, intervals: [...effect.intervals, exactInterval(of, groups, settings)] });

const method = 'chan-zhang';

function exactInterval(of: 'difference' | 'ratio', groups: TwoGroups, settings: ExactSettings): Interval {
  const { first, second } = groups;
  const empty = emptyGroup(groups);
  if (empty !== undefined) return noInterval(method, settings, empty);
  const seen = {
    firstSize: first.size,
    firstEvents: first.events,
    secondSize: second.size,
    secondEvents: second.events,
  };
  const { confidence, effort } = settings;
  // Two limits of this effect, and two of the other one.
  const isInReach = 4 * mostOverrun * limitWork(seen) <= effort;
  const limits = isInReach ? exactLimits(seen, of, (1 - confidence) / 2) : undefined;
  if (limits === undefined) return noInterval(method, settings, 'beyond-effort');
  const isOpen = !Number.isFinite(limits.upper);
  return {
    method,
    confidence,
    lower: extended(limits.lower),
    upper: extended(limits.upper),
    ...(isOpen ? { reason: 'at-boundary' as const } : {}),
    guaranteed: true,
  };
}
