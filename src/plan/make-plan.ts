// Raw wishes in, one checked and frozen plan out: every default filled, the method settled, the reason said.
import { forecastExact, standardEffort, type Forecast } from '../null/forecast.js';
import { blockSize } from '../null/sampled/limits.js';
import { effortProblem, usageProblem } from '../problem/problem.js';
import { generatorName } from '../random/stream.js';
import type { Roles, Statistic } from '../statistic/contract.js';
import { statisticNamed } from '../statistic/registry.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import { freshSeed } from './fresh-seed.js';
import {
  methods,
  tails,
  twoSidedRules,
  type ChosenMethod,
  type Method,
  type Plan,
  type PlanOptions,
  type Tail,
  type TwoSidedRule,
} from './plan.js';
import { noRoles, refuseRoleOptions, rolesOf, type NamedRoles } from './roles.js';
import { oneOf, positive, share, unused, wholeNumber } from './settings.js';

export const standardDraws = 100_000;

export interface Prepared {
  readonly plan: Plan;
  readonly statistic: Statistic;
  readonly roles: Roles;
  /** null for statistics that treat all rows and all columns alike. */
  readonly named: NamedRoles | null;
}

/** @throws Problem: usage for wishes that make no sense together, effort for exact work over the bound. */
export function makePlan(table: Table, live: LiveTable, options: PlanOptions): Prepared {
  const statistic = statisticNamed(options.statistic ?? 'pearson');
  const { tail, rule } = tailOf(statistic, options);
  const signed = statistic.shape === '2x2';
  if (!signed) refuseRoleOptions(statistic, options);
  const named = signed ? rolesOf(table, live, statistic, options) : null;
  const effort = positive(options.effort, standardEffort, '--effort');
  const asked = oneOf(options.method, 'auto', methods, '--method');
  const forecast = forecastExact(live);
  const { method, reason } = settleMethod(asked, statistic, forecast, effort);
  if (options.draws !== undefined) {
    wholeNumber(options.draws, 1, 1e12, '--draws');
    if (asked === 'exact' || asked === 'asymptotic') {
      throw unused('--draws', `with --method ${asked}`, 'leave it out, or use --method sample');
    }
  }
  if (options.seed === '') {
    throw usageProblem({
      code: 'empty-seed',
      message: 'the seed is empty',
      place: '--seed',
      hint: 'give any text, such as --seed 2026-ward-3, or leave the option out and one is made and printed',
    });
  }
  const sampled = method === 'sample';
  const plan: Plan = Object.freeze({
    statistic: statistic.name,
    tail,
    twoSidedRule: rule,
    method,
    methodAsked: asked,
    methodReason: reason,
    forecast: Object.freeze(forecast),
    groups: named?.groups ?? null,
    event: named?.eventLabel ?? null,
    reference: named?.referenceLabel ?? null,
    fixed: 'both',
    draws: sampled ? (options.draws ?? standardDraws) : null,
    seed: sampled ? (options.seed ?? freshSeed()) : null,
    tableKey: '',
    generator: sampled ? generatorName : null,
    blockSize: sampled ? blockSize : null,
    effort,
    alpha: share(options.alpha, 0.05, '--alpha'),
    confidence: share(options.confidence, 0.95, '--confidence'),
    samplingConfidence: share(options.samplingConfidence, 0.99, '--sampling-confidence'),
  });
  return { plan, statistic, roles: named ?? noRoles, named };
}

function tailOf(statistic: Statistic, options: PlanOptions): { tail: Tail; rule: TwoSidedRule | null } {
  const tail = oneOf(options.tail, statistic.sided === 'signed' ? 'both' : 'upper', tails, '--tail');
  if (statistic.sided === 'upper' && tail === 'both') {
    throw usageProblem({
      code: 'tail-of-upper-statistic',
      message: `${statistic.name} grows with any departure from independence, so it has no two-sided p`,
      place: '--tail both',
      hint: 'use --tail upper (the default): it already takes departures in every direction together',
    });
  }
  if (tail !== 'both') {
    if (options.twoSidedRule !== undefined) {
      throw unused(
        '--two-sided-rule',
        `with --tail ${tail}`,
        'leave it out, or use a signed statistic with --tail both',
      );
    }
    return { tail, rule: null };
  }
  return { tail, rule: oneOf(options.twoSidedRule, 'distance', twoSidedRules, '--two-sided-rule') };
}

function settleMethod(
  asked: Method,
  statistic: Statistic,
  forecast: Forecast,
  effort: number,
): { method: ChosenMethod; reason: string } {
  const tables = `${forecast.tablesAreCounted ? '' : 'about '}${inWords(forecast.tables)} ${forecast.tables === 1 ? 'table has' : 'tables have'} these margins`;
  const work = `exact work is forecast at ${inWords(forecast.workUnits)} units (${timeInWords(forecast.seconds)}), the bound is ${inWords(effort)}`;
  const fits = forecast.workUnits <= effort;
  if (asked === 'asymptotic' && statistic.name === 'probability') {
    throw usageProblem({
      code: 'no-asymptotic-form',
      message: 'probability has no asymptotic p of its own',
      place: '--method asymptotic',
      hint: 'use --statistic pearson or likelihood-ratio with --method asymptotic, or --method auto',
    });
  }
  if (asked === 'exact' && !fits) {
    throw effortProblem({
      code: 'exact-over-bound',
      message: `exact work is over the bound: ${tables}; ${work}`,
      place: '--method exact',
      hint: `use --method sample, or raise the bound with --effort ${(forecast.workUnits * 1.1).toPrecision(2)}`,
    });
  }
  if (asked === 'asymptotic' || asked === 'sample') return { method: asked, reason: `asked for; ${tables}` };
  if (asked === 'exact') return { method: 'exact', reason: `asked for; ${tables}; ${work}` };
  return fits
    ? { method: 'exact', reason: `${tables}; ${work}` }
    : { method: 'sample', reason: `exact is out of reach: ${tables}; ${work}` };
}

/** 1,234 in full, larger numbers to two digits. */
const inWords = (value: number): string =>
  value < 1e7
    ? value.toLocaleString('en-US', { maximumSignificantDigits: 9 })
    : value.toExponential(1).replace('e+', 'e');

const timeInWords = (seconds: number): string => {
  if (seconds < 1) return 'under a second';
  const [size, unit] =
    seconds < 120 ? [1, 's'] : seconds < 7200 ? [60, 'min'] : seconds < 2e5 ? [3600, 'h'] : [86_400, 'days'];
  const amount = seconds / Number(size);
  return `about ${amount < 1e4 ? Number(amount.toPrecision(2)) : amount.toExponential(0).replace('e+', 'e')} ${unit}`;
};
