// Counts drawn until they were settled -> p-value that carries its error: the p of the sequence, its interval and risk, why
// drawing stopped. Strict and mid p are plain shares, as for a fixed number of draws.
import type { SampledCut } from '../../null/contract.js';
import type { PValueEntry, Question, SequentialError } from '../contract.js';
import { drawnEntry } from '../drawn-entry.js';
import type { SequenceState, StopReason } from './contract.js';

/** One tail, or two by distance or probability. @param cut the counts that `state` has seen */
export const sequentialPValue = (
  question: Question,
  cut: SampledCut,
  state: SequenceState,
  because: StopReason,
): PValueEntry => drawnEntry(question, cut, 1, state.p, sequentialError(state, because));

/** The doubled rule, from the cuts of both tails and the state of a doubled sequence. */
export const sequentialDoubled = (
  question: Question,
  upper: SampledCut,
  lower: SampledCut,
  state: SequenceState,
  because: StopReason,
): PValueEntry =>
  drawnEntry(
    question,
    upper.tied + upper.above <= lower.tied + lower.above ? upper : lower,
    2,
    state.p,
    sequentialError(state, because),
  );

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
