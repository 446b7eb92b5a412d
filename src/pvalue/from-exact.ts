// Exact cut -> p-value: p = tied + above, strict = above, mid = above + tied/2 (Lancaster 1961, the whole tie mass).
import type { ExactCut, Mass } from '../null/contract.js';
import { orderedBy, smallestDouble, type PValueEntry, type Question } from './contract.js';

/** From the cut of the ordering that the question calls for. */
export function exactPValue(question: Question, cut: ExactCut, point: Mass): PValueEntry {
  return entry(question, point, cut.relativeError, {
    p: cut.atLeast,
    strict: cut.above.value,
    mid: cut.above.value + cut.tied.value / 2,
    tied: cut.tied.value,
  });
}

/** The doubled rule: twice the smaller one-tailed p, at most 1; strict, mid and tied are doubled in the same way. */
export function exactDoubled(question: Question, upper: ExactCut, lower: ExactCut, point: Mass): PValueEntry {
  const smaller = upper.atLeast.log10 <= lower.atLeast.log10 ? upper : lower;
  const log10 = Math.min(0, smaller.atLeast.log10 + Math.log10(2));
  return entry(question, point, smaller.relativeError, {
    p: { value: Math.min(1, 2 * smaller.atLeast.value), log10 },
    strict: Math.min(1, 2 * smaller.above.value),
    mid: Math.min(1, 2 * smaller.above.value + smaller.tied.value),
    tied: Math.min(1, 2 * smaller.tied.value),
  });
}

function entry(
  question: Question,
  point: Mass,
  relative: number,
  parts: { p: Mass; strict: number; mid: number; tied: number },
): PValueEntry {
  const { tail, rule, statistic } = question;
  const underflow = parts.p.value < smallestDouble;
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: orderedBy(question),
    method: 'exact',
    statistic,
    p: underflow ? null : parts.p.value,
    log10P: parts.p.log10,
    ...(underflow ? { reason: 'underflow' as const } : {}),
    strict: parts.strict,
    mid: parts.mid,
    tied: parts.tied,
    point: point.value,
    guaranteed: true,
    errors: [{ kind: 'rounding', relative }],
  };
}
