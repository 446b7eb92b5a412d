// Counts drawn until they were settled -> p-value that carries its error: the p of the sequence, its interval and risk, why
// drawing stopped. Strict and mid p are plain shares, as for a fixed number of draws.
import type { SampledCut } from '../../null/contract.js';
import { orderedBy, type PValueEntry, type Question, type SequentialError } from '../contract.js';
import type { SequenceState, StopReason } from './contract.js';

/** One tail, or two by distance or probability. @param cut the counts that `state` has seen */
export const sequentialPValue = (
  question: Question,
  cut: SampledCut,
  state: SequenceState,
  because: StopReason,
): PValueEntry => entry(question, cut, state, because, 1);

/** The doubled rule, from the cuts of both tails and the state of a doubled sequence. */
export const sequentialDoubled = (
  question: Question,
  upper: SampledCut,
  lower: SampledCut,
  state: SequenceState,
  because: StopReason,
): PValueEntry =>
  entry(question, upper.tied + upper.above <= lower.tied + lower.above ? upper : lower, state, because, 2);

function entry(
  question: Question,
  { tied, above, draws }: SampledCut,
  state: SequenceState,
  because: StopReason,
  times: 1 | 2,
): PValueEntry {
  const share = (counted: number): number => Math.min(1, (times * counted) / draws);
  const { tail, rule, statistic } = question;
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: orderedBy(question),
    method: 'sample',
    statistic,
    p: state.p,
    log10P: Math.log10(state.p),
    strict: share(above),
    mid: share(above + tied / 2),
    tied: share(tied),
    guaranteed: true,
    errors: [sequentialError(state, because)],
  };
}

function sequentialError(state: SequenceState, stoppedBecause: StopReason): SequentialError {
  const { rule, level, risk, atLeast, draws, estimate, lower, upper, drawsToSettle, tails } = state;
  return {
    kind: 'sequential',
    rule,
    level,
    risk,
    stoppedBecause,
    atLeast,
    draws,
    estimate,
    interval: [lower, upper],
    drawsToSettle,
    ...(tails === undefined ? {} : { tails }),
  };
}
