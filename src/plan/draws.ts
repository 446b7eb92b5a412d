// How many tables to draw: a fixed number, or until p is settled, with what that stop needs to be told.
import { blockSize } from '../null/sampled/limits.js';
import type { Method, Plan, PlanOptions } from './plan.js';
import { share, unused, wholeNumber } from './settings.js';

export const standardMostDraws = 10_000_000;
export const standardRelativeError = 0.02;
/** A sixth more draws at a true p a tenth above alpha than alpha / 100 takes, for a p that can be five times as small. */
export const standardRiskShare = 1 / 500;

/** @throws Problem (usage) for numbers out of range, and for options that the method or a fixed number leaves unread. */
export function drawsOf(
  options: PlanOptions,
  asked: Method,
  alpha: number,
): Pick<Plan, 'draws' | 'mostDraws' | 'samplingRisk' | 'relativeError'> {
  const { mostDraws, samplingRisk, relativeError } = options;
  const given: string[] = options.draws === undefined ? [] : ['--draws'];
  if (mostDraws !== undefined) given.push('--most-draws');
  if (samplingRisk !== undefined) given.push('--sampling-risk');
  if (relativeError !== undefined) given.push('--relative-error');
  if (given.length > 0 && (asked === 'exact' || asked === 'asymptotic')) {
    throw unused(given[0]!, `with --method ${asked}`, 'leave it out, or use --method sample');
  }
  const { draws = 'auto' } = options;
  if (draws !== 'auto') {
    wholeNumber(draws, 1, 1e12, '--draws');
    if (given.length > 1) throw unused(given[1]!, 'with a fixed number of draws', 'leave it out, or use --draws auto');
    return { draws };
  }
  const risk = share(options.samplingRisk, alpha * standardRiskShare, '--sampling-risk');
  if (risk >= alpha) {
    throw unused(
      '--sampling-risk',
      `at ${risk}: it is not below the level ${alpha}, so no p could be settled`,
      `for example --sampling-risk ${alpha / 500}`,
    );
  }
  return {
    draws,
    mostDraws: wholeNumber(options.mostDraws ?? standardMostDraws, blockSize, 1e12, '--most-draws'),
    samplingRisk: risk,
    relativeError: share(options.relativeError, standardRelativeError, '--relative-error'),
  };
}
