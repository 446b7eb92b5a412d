// Raw wishes in, one checked and frozen plan out: every default filled, the method settled, the reason said.
import { expectsBracket } from '../null/exact/network/bracket-forecast.js';
import { forecastExact, standardEffort, takesNetwork, type Forecast } from '../null/forecast.js';
import { usageProblem } from '../problem/problem.js';
import type { BoundStatistic, Choices, Statistic } from '../statistic/contract.js';
import { hasOneTableOnly, type LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import { chooseStatistic, choicesOf, refuseUnread } from './choices.js';
import { chanceOf, levelsOf, refuseEmptySeed } from './footing.js';
import { orderEcho } from './order-echo.js';
import { designOf, withDesign, type DesignKind } from './design.js';
import {
  methods,
  tails,
  twoSidedRules,
  type ChosenMethod,
  type Plan,
  type PlanOptions,
  type Tail,
  type TwoSidedRule,
} from './plan.js';
import { isTwoByTwo, noRoles, rolesOf, type NamedRoles } from './roles.js';
import { oneOf, positive, share, unused, wholeNumber } from './settings.js';
import { drawsOf } from './draws.js';
import { shardOf } from './shard-of.js';
import { settleMethod } from './settle-method.js';

export interface Prepared {
  readonly plan: Plan;
  readonly statistic: Statistic;
  /** null where these margins leave one table only. */
  readonly bound: BoundStatistic | null;
  /** The statistic there: 0, for there is no departure to measure; null when a whole group is missing. */
  readonly valueOfOnlyTable: number | null;
  /** null where there are no two groups to compare. */
  readonly named: NamedRoles | null;
  /** How the headline p is found, by what the study held fixed. */
  readonly design: DesignKind;
  /** How the p given both margins is found, the headline or beside it. */
  readonly conditional: { readonly method: ChosenMethod; readonly forecast: Forecast };
  /** Settings that the statistic reads, in exact form. */
  readonly choices: Choices;
}

/** @throws Problem: usage for wishes that make no sense together, effort for exact work over the bound. */
export function makePlan(table: Table, live: LiveTable, wishes: PlanOptions): Prepared {
  const options = withDesign(table, wishes);
  const statistic = chooseStatistic(options.statistic, options.paired ? table.rowLabels.length : undefined);
  const twoByTwo = !options.paired && isTwoByTwo(table, live);
  refuseUnread(statistic, options, twoByTwo);
  const { tail, rule } = tailOf(statistic, options);
  const named = statistic.shape === '2x2' || twoByTwo ? rolesOf(table, live, statistic, options) : null;
  const { choices, echo } = choicesOf(table, live, statistic, options);
  const bound = hasOneTableOnly(live) ? null : statistic.bind(live, named ?? noRoles, choices);
  const effort = positive(options.effort, standardEffort, '--effort');
  const asked = oneOf(options.method, 'auto', methods, '--method');
  const forecast = forecastExact(live, bound, statistic.name);
  const design = designOf({ table, live, statistic, tail, rule, asked, effort, roles: named ?? noRoles }, options);
  // Where both margins are not fixed, the conditional p stands beside, exact where that can be had.
  const beside = design.kind === 'conditional' ? asked : forecast.workUnits <= effort ? 'exact' : 'auto';
  const bracketPays = (): boolean =>
    design.kind === 'conditional' && takesNetwork(bound) && expectsBracket(live, statistic.name, effort);
  const conditional = settleMethod({ asked: beside, statistic, bound, rule, forecast, effort, bracketPays });
  const settled = Object.freeze({ ...forecast, engine: conditional.engine ?? forecast.engine });
  const alpha = share(options.alpha, 0.05, '--alpha');
  const drawing = design.kind === 'bootstrap' ? null : drawsOf(options, asked, alpha);
  refuseEmptySeed(options);
  // A sum of scores has a value whatever the margins allow.
  const valueOfOnlyTable =
    statistic.takes?.includes('scores') || options.paired
      ? definedOrNull(statistic.bind(live, noRoles, choices).value(live.counts))
      : statistic.shape === '2x2' && (named?.groups === 'columns' ? live.columns : live.rows) < 2
        ? null
        : 0;
  const method = design.echo.method ?? conditional.method;
  const sampled = method === 'sample';
  const bootstrap = bootstrapOf(options, twoByTwo, live);
  const drawsAnything = sampled || bootstrap !== undefined;
  const plan: Plan = Object.freeze({
    statistic: statistic.name,
    ...(options.paired ? { paired: true as const } : {}),
    tail,
    twoSidedRule: rule,
    method,
    methodAsked: asked,
    methodReason: conditional.reason,
    forecast: settled,
    groups: named?.groups ?? null,
    event: named?.eventLabel ?? null,
    reference: named?.referenceLabel ?? null,
    ...echo,
    ...(options.compare === undefined ? {} : { compare: options.compare }),
    ...(options.control === undefined ? {} : { control: options.control }),
    ...orderEcho(table, live, options, echo),
    fixed: 'both',
    ...(sampled && drawing !== null ? drawing : { draws: null }),
    ...(bootstrap === undefined ? {} : { bootstrap }),
    ...design.echo,
    ...shardOf(options, method, sampled && drawing !== null ? drawing.draws : null),
    ...chanceOf(options, drawsAnything, sampled),
    ...levelsOf(options, effort),
  });
  return {
    plan,
    statistic,
    bound,
    valueOfOnlyTable,
    named,
    design: design.kind,
    conditional: { method: conditional.method, forecast: settled },
    choices,
  };
}

const definedOrNull = (value: number): number | null => (Number.isNaN(value) ? null : value);

/** @throws Problem (usage) where there is no interval to bootstrap. */
function bootstrapOf({ bootstrap }: PlanOptions, twoByTwo: boolean, live: LiveTable): number | undefined {
  if (bootstrap === undefined) return undefined;
  wholeNumber(bootstrap, 100, 1e6, '--bootstrap');
  if (!twoByTwo && !hasOneTableOnly(live)) return bootstrap;
  throw unused(
    '--bootstrap',
    "with this table: it gives the interval of Cramer's V for more than two rows or columns",
    'leave it out',
  );
}

function tailOf(statistic: Statistic, options: PlanOptions): { tail: Tail; rule: TwoSidedRule | null } {
  const tail = oneOf(options.tail, statistic.sided === 'signed' ? 'both' : 'upper', tails, '--tail');
  if (statistic.sided === 'upper' && tail === 'both') {
    throw usageProblem({
      code: 'tail-of-upper-statistic',
      message: options.paired
        ? `${statistic.name} is tested for more agreement than by chance, in its upper tail`
        : `${statistic.name} grows with any departure from independence, so it has no two-sided p`,
      place: '--tail both',
      hint: options.paired
        ? 'use --tail upper (the default), or --tail lower for less agreement than by chance'
        : 'use --tail upper (the default): it already takes departures in every direction together',
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
