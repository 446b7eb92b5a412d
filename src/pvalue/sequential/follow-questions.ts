// Follows every question of a run block by block: the headline's sequence decides when to stop, the others are read then.
import type { OrderingName, SampledCut } from '../../null/contract.js';
import { orderingFor, type Plan } from '../../plan/plan.js';
import type { PValueEntry, Question } from '../contract.js';
import type { SequenceOptions, SequenceState, StopReason } from './contract.js';
import { sequentialDoubled, sequentialPValue } from './from-sequence.js';
import { startDoubledSequence, startSequence } from './stopping-rule.js';

/** Blocks made before the first stop is allowed: cheap, and a tiny p is then bounded more sharply. */
export const fewestBlocks = 100;

export interface Follower {
  /** One more block; true when drawing should stop. `atLeast` gives the block's count for an ordering. */
  settles(atLeast: (name: OrderingName) => number, draws: number): boolean;
  pValues(cutOf: (name: OrderingName) => SampledCut): PValueEntry[];
}

interface Followed {
  add(atLeast: (name: OrderingName) => number, draws: number): StopReason | null;
  pValue(cutOf: (name: OrderingName) => SampledCut, because: StopReason): PValueEntry;
}

/** @param plan a plan that draws until settled */
export function followQuestions(questions: readonly Question[], plan: Plan): Follower {
  const options: SequenceOptions = {
    alpha: plan.alpha,
    risk: plan.samplingRisk!,
    targetRelativeError: plan.relativeError!,
    limit: plan.mostDraws!,
    blockSize: plan.blockSize!,
  };
  const followed = questions.map((question) => follow(question, options));
  let blocks = 0;
  let because: StopReason = 'limit';
  return {
    settles(atLeast, draws) {
      blocks++;
      const decisions = followed.map((one) => one.add(atLeast, draws));
      const headline = decisions[0] ?? null;
      if (headline !== null) because = headline;
      return headline !== null && (blocks >= fewestBlocks || headline === 'limit');
    },
    pValues: (cutOf) => followed.map((one) => one.pValue(cutOf, because)),
  };
}

function follow(question: Question, options: SequenceOptions): Followed {
  const [first, second] = orderingFor(question.tail, question.rule) as [OrderingName, OrderingName?];
  if (second === undefined) {
    const sequence = startSequence(options);
    return {
      add: (atLeast, draws) => reason(sequence.add(atLeast(first), draws)),
      pValue: (cutOf, because) => sequentialPValue(question, cutOf(first), sequence.state(), because),
    };
  }
  const sequence = startDoubledSequence(options);
  return {
    add: (atLeast, draws) => reason(sequence.add({ upper: atLeast(first), lower: atLeast(second) }, draws)),
    pValue: (cutOf, because) => {
      const state: SequenceState = sequence.state();
      return sequentialDoubled(question, cutOf(first), cutOf(second), state, because);
    },
  };
}

const reason = (decision: { stop: false } | { stop: true; because: StopReason }): StopReason | null =>
  decision.stop ? decision.because : null;
