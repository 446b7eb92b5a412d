// Asymptotic p-values: the limiting law of a statistic in place of its law given the margins. An approximation, reported
// beside the answer and never instead of it.
import { chiSquareLowerTail, chiSquareUpperTail, normalUpperTail, type Tail } from '../numeric/chi-square-tail.js';
import { orderedBy, smallestDouble, type PValueEntry, type Question } from './contract.js';

/** Upper statistics: chi-square with (rows - 1)(columns - 1) degrees of freedom (at least 1). value >= 0. */
export function chiSquarePValue(question: Question, value: number, degreesOfFreedom: number): PValueEntry {
  const law = question.tail === 'lower' ? chiSquareLowerTail : chiSquareUpperTail;
  return { ...entry(question, law(value, degreesOfFreedom)), degreesOfFreedom };
}

/** Signed statistics: standard normal. All two-sided rules coincide for a law symmetric about 0. value finite. */
export function normalPValue(question: Question, value: number): PValueEntry {
  if (question.tail === 'upper') return entry(question, normalUpperTail(value));
  if (question.tail === 'lower') return entry(question, normalUpperTail(-value));
  const oneTail = normalUpperTail(Math.abs(value));
  return entry(question, { p: Math.min(1, 2 * oneTail.p), ln: Math.min(0, oneTail.ln + Math.LN2) });
}

function entry(question: Question, { p, ln }: Tail): PValueEntry {
  const { tail, rule, statistic } = question;
  const underflow = p < smallestDouble;
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: orderedBy(question),
    method: 'asymptotic',
    statistic,
    p: underflow ? null : p,
    log10P: ln === 0 ? 0 : ln / Math.LN10,
    ...(underflow ? { reason: 'underflow' as const } : {}),
    // A continuous law has no ties.
    strict: p,
    mid: p,
    tied: 0,
    guaranteed: false,
    errors: [{ kind: 'approximation' }],
  };
}
