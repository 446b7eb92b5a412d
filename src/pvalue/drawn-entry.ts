// What every p-value found by drawing has in common, of a fixed number of draws or until settled.
import type { SampledCut } from '../null/contract.js';
import { orderedBy, type PValueEntry, type Question, type SamplingError, type SequentialError } from './contract.js';

/**
 * @param cut the counts; for the doubled rule those of the smaller tail
 * @param times 2 for the doubled rule: its strict, mid and tied are doubled shares, at most 1
 */
export function drawnEntry(
  question: Question,
  { tied, above, draws }: SampledCut,
  times: 1 | 2,
  p: number,
  error: SamplingError | SequentialError,
): PValueEntry {
  const share = (counted: number): number => Math.min(1, (times * counted) / draws);
  const { tail, rule, statistic } = question;
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: orderedBy(question),
    method: 'sample',
    statistic,
    p,
    log10P: Math.log10(p),
    strict: share(above),
    mid: share(above + tied / 2),
    tied: share(tied),
    guaranteed: true,
    errors: [error],
  };
}
