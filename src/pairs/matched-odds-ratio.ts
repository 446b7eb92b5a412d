// The matched odds ratio of a 2x2 table of pairs: of the pairs that changed, those that went one way over those that went the other.
// Limits follow from those of the share q of a binomial law, as q / (1 - q).
import { extended, type Effect, type Interval } from '../effect/contract.js';
import { clopperPearson } from '../pvalue/clopper-pearson.js';

/** @param there pairs that left the first level, @param back those that came to it. */
export async function matchedOddsRatio(there: number, back: number, confidence: number): Promise<Effect> {
  const name = 'matched-odds-ratio';
  const direction = 'first-over-second';
  const m = there + back;
  if (m === 0) {
    const reason = 'no-discordant-pairs' as const;
    const missing = (method: string): Interval => ({ method, confidence, lower: null, upper: null, reason });
    return { name, estimate: null, reason, direction, intervals: [missing('clopper-pearson'), missing('mid-p')] };
  }
  const odds = (q: number): number => q / (1 - q);
  const interval = (method: string, [low, high]: readonly [number, number], guaranteed: boolean): Interval => ({
    method,
    confidence,
    lower: extended(odds(low)),
    upper: extended(odds(high)),
    ...(guaranteed ? { invertsP: 'doubled' } : { guaranteed: false }),
  });
  return {
    name,
    estimate: extended(there / back),
    direction,
    intervals: [
      interval('clopper-pearson', await clopperPearson(there, m, confidence), true),
      interval('mid-p', await midLimits(there, m, confidence), false),
    ],
  };
}

/** Shares q at which the tail, the observed count itself counted by half (Lancaster 1961), is (1 - confidence) / 2. */
async function midLimits(hits: number, trials: number, confidence: number): Promise<[number, number]> {
  const { default: cephes } = await import('cephes');
  await cephes.compiled;
  /** P(X >= k) for X binomial (trials, q), 0 < q < 1. */
  const atLeast = (k: number, q: number): number => (k <= 0 ? 1 : k > trials ? 0 : cephes.incbet(k, trials - k + 1, q));
  const risk = (1 - confidence) / 2;
  const midUpper = (q: number): number => (atLeast(hits, q) + atLeast(hits + 1, q)) / 2;
  return [
    hits === 0 ? 0 : rootOf((q) => midUpper(q) - risk),
    hits === trials ? 1 : rootOf((q) => midUpper(q) - (1 - risk)),
  ];
}

/** Where a function that rises over (0, 1) from below 0 to above it passes 0, to the last bit. */
export function rootOf(f: (x: number) => number, low = 0, high = 1): number {
  let [below, above] = [low, high];
  for (;;) {
    const middle = (below + above) / 2;
    if (middle <= below || middle >= above) return middle;
    if (f(middle) < 0) below = middle;
    else above = middle;
  }
}
