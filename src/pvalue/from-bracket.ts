// Bracket -> p-value: the upper limit, which no rounding and no merging can have made too small.
import type { BracketCut, Mass } from '../null/contract.js';
import { orderedBy, smallestDouble, type PValueEntry, type Question } from './contract.js';

/** From the cut of the ordering that the question calls for. */
export const bracketPValue = (question: Question, cut: BracketCut, point: Mass): PValueEntry =>
  entry(question, cut, point, 1);

/** The doubled rule: twice the smaller one-tailed p, at most 1, lies between twice the smaller limits of either kind. */
export function bracketDoubled(question: Question, a: BracketCut, b: BracketCut, point: Mass): PValueEntry {
  const smaller = (x: Mass, y: Mass): Mass => (x.log10 <= y.log10 ? x : y);
  const both: BracketCut = {
    ...a,
    atLeast: {
      lower: smaller(a.atLeast.lower, b.atLeast.lower),
      upper: smaller(a.atLeast.upper, b.atLeast.upper),
    },
    above: { lower: smaller(a.above.lower, b.above.lower), upper: smaller(a.above.upper, b.above.upper) },
  };
  return entry(question, both, point, 2);
}

/**
 * Strict p is estimated by the middle of its own limits (the observed table is not in it), ties by what is known to tie, at
 * least the observed table, and mid-p by the two.
 */
function entry(question: Question, { atLeast, above }: BracketCut, point: Mass, times: 1 | 2): PValueEntry {
  const { tail, rule, statistic } = question;
  const log10P = Math.min(0, atLeast.upper.log10 + Math.log10(times));
  const upper = Math.min(1, times * atLeast.upper.value);
  const lower = Math.min(1, times * atLeast.lower.value);
  const underflow = upper < smallestDouble;
  const strict = (above.lower.value + Math.max(above.lower.value, atLeast.upper.value - point.value)) / 2;
  const tied = Math.max(point.value, atLeast.lower.value - above.upper.value);
  const share = (mass: number): number => Math.min(1, times * mass);
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: orderedBy(question),
    method: 'exact',
    statistic,
    p: underflow ? null : upper,
    log10P,
    ...(underflow ? { reason: 'underflow' as const } : {}),
    strict: share(strict),
    mid: share(strict + tied / 2),
    tied: share(tied),
    point: point.value,
    guaranteed: true,
    errors: [{ kind: 'bracket', lower, upper: underflow ? smallestDouble : upper }],
  };
}
