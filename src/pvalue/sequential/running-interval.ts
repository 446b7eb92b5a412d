// The interval of a probability while draws come in: what every look so far agrees on. It may be read, and drawing may be
// stopped, at any look, for any reason that rests on the counts seen.
import { mixtureAround, type BetaMixture } from './beta-mixture.js';
import { limitsAt } from './limits.js';

export interface RunningInterval {
  readonly mixture: BetaMixture;
  readonly risk: number;
  /** Draws at least as extreme, of all draws so far. */
  readonly hits: number;
  readonly draws: number;
  readonly lower: number;
  readonly upper: number;
}

/** Nothing drawn yet: from 0 to 1. @param level the prior is centred there; any level is valid */
export const startInterval = (level: number, risk: number): RunningInterval => ({
  mixture: mixtureAround(level),
  risk,
  hits: 0,
  draws: 0,
  lower: 0,
  upper: 1,
});

/** One more look, after `draws` more draws with `hits` more hits. */
export function look(before: RunningInterval, hits: number, draws: number): RunningInterval {
  const after = { ...before, hits: before.hits + hits, draws: before.draws + draws };
  const [low, high] = limitsAt(after.mixture, after.risk, after.hits, after.draws);
  const lower = Math.max(before.lower, low);
  const upper = Math.min(before.upper, high);
  // Two looks that exclude each other: one of them missed, which happens with probability at most `risk` and is paid for.
  // The latest look knows most and starts afresh.
  return lower <= upper ? { ...after, lower, upper } : { ...after, lower: low, upper: high };
}
