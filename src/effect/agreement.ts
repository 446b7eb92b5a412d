// Do p and interval say the same? The two-sided rules beside each other at the value of no effect, and the intervals whose verdict
// on that value differs from that of p (Fay 2010).
import { exactCuts } from '../null/exact/exact-cuts.js';
import { forecastExact } from '../null/forecast.js';
import { orderingFor } from '../null/ordering.js';
import { twoSidedRules, type Plan, type TwoSidedRule } from '../plan/plan.js';
import type { PValueEntry } from '../pvalue/contract.js';
import { conditionalPValues, orderingsNeeded } from '../pvalue/p-values.js';
import { score } from '../statistic/score.js';
import type { BoundStatistic, Roles, Statistic } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import { asNumber, type Effect, type Interval } from './contract.js';

export interface RuleP {
  readonly rule: TwoSidedRule;
  readonly p: number;
}

/** The exact p of a 2x2 table under each two-sided rule; of the statistic itself where it is signed, else of `score`. */
export async function pByRule(
  live: LiveTable,
  statistic: Statistic,
  bound: BoundStatistic,
  roles: Roles,
  plan: Plan,
): Promise<RuleP[]> {
  const signed = bound.corner === undefined ? score.bind(live, roles) : bound;
  const { engine, workUnits } = forecastExact(live, signed);
  if (workUnits > plan.effort) return [];
  const questions = twoSidedRules.map((rule) => ({ tail: 'both' as const, rule, statistic: statistic.name }));
  const orderings = orderingsNeeded(questions).map((name) => orderingFor(live, signed, name));
  const { cuts, point } = await exactCuts(live, orderings, engine, statistic.name);
  const entries = await conditionalPValues(questions, cuts, point, plan.samplingConfidence);
  return entries.map(({ p }, k) => ({ rule: twoSidedRules[k]!, p: p ?? 0 }));
}

/** An interval whose verdict on "no effect" is not that of p. */
export interface Disagreement {
  readonly effect: string;
  readonly method: string;
}

const noEffect: Readonly<Record<string, number>> = {
  'risk-difference': 0,
  'risk-ratio': 1,
  'odds-ratio': 1,
  'conditional-odds-ratio': 1,
};

/**
 * Those at level 1 - alpha that hold the value of no effect although p <= alpha, or leave it out although p > alpha. The one
 * that inverts p is left out: it cannot disagree, unless its set has a gap at that value.
 */
export function disagreements(
  effects: readonly Effect[],
  headline: PValueEntry,
  { alpha, confidence }: Plan,
): Disagreement[] {
  if (Math.abs(1 - confidence - alpha) > 1e-12) return [];
  const rejects = headline.p === null || headline.p <= alpha;
  return effects.flatMap(({ name, intervals }) => {
    const value = noEffect[name];
    if (value === undefined) return [];
    return intervals
      .filter((interval) => interval.invertsP !== pairedRule(headline) || interval.setHasGap)
      .filter((interval) => {
        const inside = holds(interval, value);
        return inside !== undefined && inside === rejects;
      })
      .map(({ method }) => ({ effect: name, method }));
  });
}

/** The rule whose interval inverts this p: for the statistic `probability` the rule of that name, else its own. */
export const pairedRule = ({ rule, statistic }: Pick<PValueEntry, 'rule' | 'statistic'>): string | undefined =>
  rule ?? (statistic === 'probability' ? 'probability' : 'none');

function holds({ lower, upper }: Interval, value: number): boolean | undefined {
  return lower === null || upper === null ? undefined : asNumber(lower) <= value && value <= asNumber(upper);
}
