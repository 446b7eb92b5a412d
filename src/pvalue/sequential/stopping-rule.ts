// When to stop drawing, and what p is then. Clopper-Pearson limits and (b + 1)/(m + 1) hold for a number of draws fixed
// beforehand only; stopped when they exclude the level they miss many times as often as they say. These hold at every look.
import { usageProblem } from '../../problem/problem.js';
import {
  sequentialRule,
  type Decision,
  type DoubledSequence,
  type Sequence,
  type SequenceOptions,
  type SequenceState,
} from './contract.js';
import { drawsStillNeeded } from './draws-still-needed.js';
import { look, startInterval, type RunningInterval } from './running-interval.js';

/**
 * A sequence for one tail. The promise, for every true p, every number of looks and every way to stop:
 * - all intervals hold the true p with probability at least 1 - risk;
 * - so it is settled on the wrong side (below while p > alpha, above while p <= alpha) with probability at most risk;
 * - the reported p, upper limit + risk, is smaller than the true p + risk with probability at most risk. Under the null the true
 *   p falls at or below x with probability at most x, so P(reported <= a) <= P(true <= a - risk) + risk <= a.
 * A stop of its own for clearly large p (Besag & Clifford 1991) would save nothing: from twice alpha on, the first few blocks settle it.
 * @throws Problem (usage) `out-of-range` for a risk that is not below alpha, or a limit below one block
 */
export function startSequence(options: SequenceOptions): Sequence {
  checkOptions(options);
  const { alpha, risk, blockSize } = options;
  let interval = startInterval(alpha, risk);
  const state = (): SequenceState => {
    const { hits, draws, lower, upper } = drawn(interval);
    const seen = { atLeast: hits, draws, estimate: hits / draws, lower, upper };
    return summary(options, seen, () =>
      drawsStillNeeded(interval, { settledBelow: alpha - risk, settledAbove: alpha }, blockSize),
    );
  };
  return {
    add(atLeast, draws) {
      checkBlock(atLeast, draws, blockSize);
      interval = look(interval, atLeast, draws);
      return decide(interval, options);
    },
    state,
  };
}

/**
 * The same for twice the smaller of two one-tailed p. Each tail has its own sequence at half the risk, around half of alpha;
 * together they hold, and so does twice the smaller of their limits.
 */
export function startDoubledSequence(options: SequenceOptions): DoubledSequence {
  checkOptions(options);
  const { alpha, risk, blockSize } = options;
  let tails = { upper: startInterval(alpha / 2, risk / 2), lower: startInterval(alpha / 2, risk / 2) };
  const both = (): { lower: number; upper: number; draws: number } => ({
    lower: Math.min(1, 2 * Math.min(tails.upper.lower, tails.lower.lower)),
    upper: Math.min(1, 2 * Math.min(tails.upper.upper, tails.lower.upper)),
    draws: tails.upper.draws,
  });
  const bounds = { settledBelow: (alpha - risk) / 2, settledAbove: alpha / 2 };
  return {
    add(atLeast, draws) {
      checkBlock(atLeast.upper, draws, blockSize);
      checkBlock(atLeast.lower, draws, blockSize);
      tails = { upper: look(tails.upper, atLeast.upper, draws), lower: look(tails.lower, atLeast.lower, draws) };
      return decide(both(), options);
    },
    state() {
      const smaller = drawn(tails.upper.hits <= tails.lower.hits ? tails.upper : tails.lower);
      const estimate = Math.min(1, (2 * smaller.hits) / smaller.draws);
      const seen = { atLeast: smaller.hits, estimate, ...both() };
      return {
        ...summary(options, seen, () => drawsStillNeeded(smaller, bounds, blockSize)),
        tails: { upper: tails.upper.hits, lower: tails.lower.hits },
      };
    },
  };
}

const reportedP = (upper: number, risk: number): number => Math.min(1, upper + risk);

/** Which side of alpha p is on, if that is settled. Below: the reported p itself is at or below alpha, so that p and verdict agree. */
function verdict(
  { lower, upper }: { lower: number; upper: number },
  { alpha, risk }: SequenceOptions,
): 'settled-below' | 'settled-above' | undefined {
  if (reportedP(upper, risk) <= alpha) return 'settled-below';
  return lower > alpha ? 'settled-above' : undefined;
}

function decide(seen: { lower: number; upper: number; draws: number }, options: SequenceOptions): Decision {
  const settled = verdict(seen, options);
  if (settled !== undefined) return { stop: true, because: settled };
  const { lower, upper, draws } = seen;
  if (upper - lower <= options.targetRelativeError * (upper + lower)) return { stop: true, because: 'precise-enough' };
  return draws + options.blockSize > options.limit ? { stop: true, because: 'limit' } : { stop: false };
}

function summary(
  options: SequenceOptions,
  seen: Pick<SequenceState, 'atLeast' | 'draws' | 'estimate' | 'lower' | 'upper'>,
  stillNeeded: () => number | null,
): SequenceState {
  const { risk } = options;
  return {
    rule: sequentialRule,
    level: 1 - risk,
    risk,
    ...seen,
    p: reportedP(seen.upper, risk),
    drawsToSettle: verdict(seen, options) === undefined ? stillNeeded() : 0,
  };
}

function drawn(interval: RunningInterval): RunningInterval {
  if (interval.draws === 0) throw new RangeError('a sequence has no state before its first block');
  return interval;
}

function checkBlock(atLeast: number, draws: number, blockSize: number): void {
  const sound = Number.isInteger(draws) && draws >= 1 && draws <= blockSize;
  if (sound && Number.isInteger(atLeast) && atLeast >= 0 && atLeast <= draws) return;
  throw new RangeError(`a look takes one block: 1 to ${blockSize} draws, not ${atLeast} of ${draws}`);
}

function checkOptions({ alpha, risk, limit, blockSize }: SequenceOptions): void {
  if (!(risk > 0 && risk < alpha)) {
    throw usageProblem({
      code: 'out-of-range',
      message: `a risk of ${risk} is not between 0 and the level ${alpha}, so no p could be settled below it`,
      hint: `take a risk far below the level, for example ${alpha / 100}`,
    });
  }
  if (!(limit >= blockSize)) {
    throw usageProblem({
      code: 'out-of-range',
      message: `a limit of ${limit} draws is less than one block of ${blockSize}`,
      hint: `allow at least ${blockSize} draws, or give a fixed number of draws`,
    });
  }
}
