// The plan of a test that permutes clusters: the same wishes, the method settled by the table of groups by kinds of cluster.
import { forecastExact, standardEffort } from '../null/forecast.js';
import { usageProblem } from '../problem/problem.js';
import { nameHint } from '../problem/suggest.js';
import type { BoundStatistic, Statistic } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import { drawsOf } from './draws.js';
import { chanceOf, levelsOf, refuseEmptySeed } from './footing.js';
import { methods, tails, twoSidedRules, type Plan, type PlanOptions } from './plan.js';
import type { NamedRoles } from './roles.js';
import { oneOf, positive, share, unused } from './settings.js';
import { settleMethod } from './settle-method.js';

/** The one asked for, or the usual one. @throws Problem (usage) `statistic-not-for-clusters`. */
export function statisticForClusters<Name extends string>(
  options: PlanOptions,
  known: readonly Name[],
  usual: Name,
): Name {
  const { statistic } = options;
  if (statistic === undefined) return usual;
  const found = known.find((name) => name === statistic);
  if (found !== undefined) return found;
  const name = typeof statistic === 'string' ? statistic : statistic.name;
  throw usageProblem({
    code: 'statistic-not-for-clusters',
    message: `${name} is not worked out for clusters that are permuted whole`,
    place: '--statistic',
    hint: nameHint(name, known),
  });
}

export function planClusters(
  options: PlanOptions,
  statistic: Statistic,
  bound: BoundStatistic | null,
  kinds: LiveTable,
  named: NamedRoles | null,
  echo: Partial<Plan>,
): Plan {
  if (options.ordered !== undefined)
    throw unused('--ordered', 'with --cluster', 'leave it out, or use --statistic trend');
  if (options.paired) throw unused('--paired', 'with --cluster', 'leave one of the two out');
  if (options.cells) throw unused('--cells', 'with --cluster', 'leave it out');
  if (options.compare !== undefined) throw unused('--compare', 'with --cluster', 'leave it out');
  if (options.fixed !== undefined) throw unused('--fixed', 'with --cluster', 'leave it out');
  if (options.nullValue !== undefined) throw unused('--null-value', 'with --cluster', 'leave it out');
  const signed = statistic.sided === 'signed';
  const tail = oneOf(options.tail, signed ? 'both' : 'upper', tails, '--tail');
  if (!signed && tail === 'both') {
    throw usageProblem({
      code: 'tail-of-upper-statistic',
      message: `${statistic.name} grows with any departure from independence, so it has no two-sided p`,
      place: '--tail both',
      hint: 'use --tail upper (the default)',
    });
  }
  if (tail !== 'both' && options.twoSidedRule !== undefined)
    throw unused('--two-sided-rule', `with --tail ${tail}`, 'leave it out');
  const rule = tail === 'both' ? oneOf(options.twoSidedRule, 'distance', twoSidedRules, '--two-sided-rule') : null;
  if (rule !== null && rule !== 'distance' && rule !== 'doubled' && statistic.name !== 'trend') {
    throw usageProblem({
      code: 'rule-without-law',
      message: `the rule ${rule} needs the law of ${statistic.name}, which is not worked out for clusters`,
      place: '--two-sided-rule',
      hint: 'use --two-sided-rule distance or doubled',
    });
  }
  const asked = oneOf(options.method, 'auto', methods, '--method');
  if (asked === 'asymptotic' && statistic.name !== 'trend') {
    throw usageProblem({
      code: 'no-asymptotic-form',
      message: `the asymptotic p of ${statistic.name} takes every unit as independent, and clusters are not`,
      place: '--method asymptotic',
      hint: 'use --method auto, exact or sample',
    });
  }
  refuseEmptySeed(options);
  const effort = positive(options.effort, standardEffort, '--effort');
  const forecast = forecastExact(kinds, bound, statistic.name);
  const { method, reason } = settleMethod({ asked, statistic, bound, rule, forecast, effort });
  const alpha = share(options.alpha, 0.05, '--alpha');
  const drawing = drawsOf(options, asked, alpha);
  const sampled = method === 'sample';
  return Object.freeze({
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
    ...echo,
    fixed: 'clusters' as const,
    ...(sampled ? drawing : { draws: null }),
    ...chanceOf(options, sampled),
    ...levelsOf(options, effort),
  });
}
