// Sampled cut -> p-value that carries its error: the guaranteed p (b + 1)/(m + 1) (Phipson & Smyth 2010), the estimate
// b/m with its standard error and its Clopper-Pearson interval. For a number of draws fixed beforehand only.
import type { SampledCut } from '../null/contract.js';
import { clopperPearson } from './clopper-pearson.js';
import type { PValueEntry, Question, SamplingError } from './contract.js';
import { drawnEntry } from './drawn-entry.js';

/** From the cut of the ordering that the question calls for. */
export async function sampledPValue(question: Question, cut: SampledCut, confidence: number): Promise<PValueEntry> {
  const atLeast = cut.tied + cut.above;
  return drawnEntry(question, cut, 1, (atLeast + 1) / (cut.draws + 1), {
    kind: 'sampling',
    atLeast,
    draws: cut.draws,
    ...spread(atLeast, cut.draws, 1),
    interval: await clopperPearson(atLeast, cut.draws, confidence),
    confidence,
  });
}

/**
 * min(1, 2 (smaller b + 1)/(m + 1)). The interval doubles the smaller ends of two one-tailed intervals, each at a level
 * that leaves half the risk, so that together they hold with the stated confidence.
 */
export async function sampledDoubled(
  question: Question,
  upper: SampledCut,
  lower: SampledCut,
  confidence: number,
): Promise<PValueEntry> {
  const tails = { upper: upper.tied + upper.above, lower: lower.tied + lower.above };
  const smaller = tails.upper <= tails.lower ? upper : lower;
  const atLeast = Math.min(tails.upper, tails.lower);
  const { draws } = smaller;
  const each = 1 - (1 - confidence) / 2;
  const [one, other] = await Promise.all([
    clopperPearson(tails.upper, draws, each),
    clopperPearson(tails.lower, draws, each),
  ]);
  const capped = (x: number): number => Math.min(1, 2 * x);
  return drawnEntry(question, smaller, 2, capped((atLeast + 1) / (draws + 1)), {
    kind: 'sampling',
    atLeast,
    draws,
    ...spread(atLeast, draws, 2),
    interval: [capped(Math.min(one[0], other[0])), capped(Math.min(one[1], other[1]))],
    confidence,
    tails,
  });
}

/** Estimate and standard error of a multiple of b/m; no standard error where every draw fell on one side. */
function spread(
  atLeast: number,
  draws: number,
  times: number,
): Pick<SamplingError, 'estimate' | 'standardError' | 'reason'> {
  const share = atLeast / draws;
  const estimate = Math.min(1, times * share);
  if (atLeast === 0 || atLeast === draws) return { estimate, standardError: null, reason: 'no-spread-seen' };
  return { estimate, standardError: times * Math.sqrt((share * (1 - share)) / draws) };
}
