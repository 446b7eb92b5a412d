// The wishes that a run again needs: what differs from the defaults, and the seed where anything was drawn.
import { standardEffort } from '../null/forecast.js';
import { standardMostDraws, standardRelativeError } from './draws.js';
import type { Plan, PlanOptions } from './plan.js';

/** As they stand in a line or a record: a statistic of the user's own by its name. */
export type KeptWishes = Omit<PlanOptions, 'statistic' | 'tableKey'> & { readonly statistic?: string };

const standard: PlanOptions = {
  statistic: 'pearson',
  twoSidedRule: 'distance',
  groups: 'rows',
  method: 'auto',
  draws: 'auto',
  mostDraws: standardMostDraws,
  relativeError: standardRelativeError,
  effort: standardEffort,
  alpha: 0.05,
  confidence: 0.95,
  samplingConfidence: 0.99,
};

/** @param seed what the draws came from; null where there were none. */
export function keptWishes(wishes: PlanOptions, plan: Pick<Plan, 'statistic'>, seed: string | null): KeptWishes {
  const kept: Record<string, unknown> = {};
  for (const name in wishes) {
    const wish = wishes[name as keyof PlanOptions];
    if (name === 'seed' || name === 'tableKey' || wish === undefined) continue;
    if (wish === standard[name as keyof PlanOptions]) continue;
    kept[name] = typeof wish === 'object' && 'value' in wish ? plan.statistic : wish;
  }
  if (seed !== null) kept['seed'] = seed;
  return kept as KeptWishes;
}
