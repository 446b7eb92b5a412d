// The plan of a test over strata: which statistic fits the tables, what of the wishes it reads, and the method, settled by what the
// strata stage forecasts.
import type { Forecast, StrataEngine } from '../null/forecast.js';
import { standardEffort } from '../null/forecast.js';
import { groupedDigits } from '../numeric/digit-groups.js';
import type { Rational } from '../numeric/rational.js';
import { effortProblem, usageProblem } from '../problem/problem.js';
import { nameHint } from '../problem/suggest.js';
import { stratifiedNames, stratifiedStatistics, type StratifiedStatistic } from '../statistic/stratified.js';
import { drawsOf } from './draws.js';
import { chanceOf, levelsOf, refuseEmptySeed } from './footing.js';
import { methods, tails, twoSidedRules, type ChosenMethod, type Plan, type PlanOptions } from './plan.js';
import type { NamedRoles } from './roles.js';
import { scoresOf, type ScoreWish } from './scores.js';
import { raisedBound } from './settle-method.js';
import { oneOf, positive, share, unused } from './settings.js';

export interface StrataWork {
  /** Infinity where the exact engine cannot answer at all. */
  readonly workUnits: number;
  /** Sets of tables, one a stratum, with these margins. */
  readonly tables: number;
}

/** @throws Problem (usage) for a statistic that is not for strata, or not for tables of this shape. */
export function stratifiedStatisticOf(options: PlanOptions, isTwoByTwo: boolean): StratifiedStatistic {
  const { statistic } = options;
  if (statistic === undefined) return named(isTwoByTwo ? 'common-odds-ratio' : 'any-association');
  if (typeof statistic !== 'string' || !stratifiedNames.includes(statistic)) {
    const name = typeof statistic === 'string' ? statistic : statistic.name;
    throw usageProblem({
      code: 'statistic-not-for-strata',
      message: `${name} is a statistic of one table, and these are strata`,
      place: '--statistic',
      hint: nameHint(name, stratifiedNames),
    });
  }
  if (statistic === 'common-odds-ratio' && !isTwoByTwo) {
    throw usageProblem({
      code: 'not-two-by-two',
      message: 'common-odds-ratio compares two groups with two outcomes; these tables are larger',
      place: '--statistic',
      hint: 'use any-association, mean-scores or correlation',
    });
  }
  return named(statistic);
}

const named = (name: string): StratifiedStatistic => stratifiedStatistics.find((one) => one.name === name)!;

const readBy: Readonly<Record<string, readonly string[]>> = {
  groups: ['common-odds-ratio', 'mean-scores'],
  event: ['common-odds-ratio'],
  reference: ['common-odds-ratio'],
  rowScores: ['mean-scores', 'score-correlation'],
  columnScores: ['mean-scores', 'score-correlation'],
  lambda: [],
  ordered: [],
  paired: [],
  cells: [],
  compare: [],
  control: [],
  fixed: [],
  outcomeOrder: [],
  nuisanceRisk: [],
  nullValue: [],
  statisticDigest: [],
};

/** @throws Problem (usage) `option-without-effect`. */
export function refuseUnreadByStrata({ name }: StratifiedStatistic, options: PlanOptions): void {
  for (const [option, readers] of Object.entries(readBy)) {
    if (options[option as keyof PlanOptions] === undefined || readers.includes(name)) continue;
    const flag = `--${option.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
    throw unused(
      flag,
      `with ${name}`,
      readers.length === 0 ? 'leave it out' : `leave it out, or use ${readers.join(' or ')}`,
    );
  }
  if (name !== 'mean-scores') return;
  const [unread, flag] =
    options.groups === 'columns'
      ? (['columnScores', '--column-scores'] as const)
      : (['rowScores', '--row-scores'] as const);
  if (options[unread] !== undefined)
    throw unused(flag, 'on the side of the groups', 'score the other side, or swap them with --groups');
}

export type ChosenStrataScores = 'midranks' | 'pooled-midranks' | readonly Rational[];

export type ShownScores = 'midranks' | 'pooled-midranks' | number[];

/** Scores of one side, and how the plan shows them. @throws Problem (usage) of `scoresOf`. */
export function strataScoresOf(
  wish: ScoreWish | undefined,
  totals: readonly number[],
  option: '--row-scores' | '--column-scores',
): { exact: ChosenStrataScores; shown: ShownScores } {
  if (wish === undefined || wish === 'midranks') return { exact: 'midranks', shown: 'midranks' };
  if (wish === 'pooled-midranks') return { exact: wish, shown: wish };
  const everyLine = totals.map((_, line) => line);
  const { exact, asNumbers } = scoresOf(wish, totals, everyLine, option);
  return { exact, shown: [...asNumbers] };
}

export function planStrata(
  options: PlanOptions,
  { name, sided }: StratifiedStatistic,
  work: StrataWork,
  roles: NamedRoles | null,
  shown: { readonly rows: ShownScores; readonly columns: ShownScores } | null,
): Plan {
  const tail = oneOf(options.tail, sided === 'signed' ? 'both' : 'upper', tails, '--tail');
  if (sided === 'upper' && tail === 'both') {
    throw usageProblem({
      code: 'tail-of-upper-statistic',
      message: `${name} grows with any departure from independence, so it has no two-sided p`,
      place: '--tail both',
      hint: 'use --tail upper (the default)',
    });
  }
  if (tail !== 'both' && options.twoSidedRule !== undefined)
    throw unused('--two-sided-rule', `with --tail ${tail}`, 'leave it out');
  const rule = tail === 'both' ? oneOf(options.twoSidedRule, 'distance', twoSidedRules, '--two-sided-rule') : null;
  refuseEmptySeed(options);
  const asked = oneOf(options.method, 'auto', methods, '--method');
  const effort = positive(options.effort, standardEffort, '--effort');
  const alpha = share(options.alpha, 0.05, '--alpha');
  const drawing = drawsOf(options, asked, alpha);
  const needsLaw = rule !== null && rule !== 'distance' && rule !== 'doubled';
  if (needsLaw && (name !== 'common-odds-ratio' || rule !== 'probability')) {
    throw usageProblem({
      code: 'rule-without-law',
      message:
        rule === 'probability'
          ? 'the rule probability is worked out for common-odds-ratio only'
          : `the rule ${rule} is not worked out over strata`,
      place: '--two-sided-rule',
      hint: 'use --two-sided-rule distance or doubled',
    });
  }
  const { method, reason } = settle(asked, work, effort, needsLaw ? rule : null);
  const sampled = method === 'sample';
  return Object.freeze({
    statistic: name,
    tail,
    twoSidedRule: rule,
    method,
    methodAsked: asked,
    methodReason: reason,
    forecast: forecastOf(work),
    groups: roles?.groups ?? (name === 'mean-scores' ? (options.groups ?? 'rows') : null),
    event: roles?.eventLabel ?? null,
    reference: roles?.referenceLabel ?? null,
    ...(shown !== null && (name === 'score-correlation' || options.groups === 'columns') ? rowEcho(shown.rows) : {}),
    ...(shown !== null && (name === 'score-correlation' || options.groups !== 'columns')
      ? columnEcho(shown.columns)
      : {}),
    fixed: 'strata' as const,
    ...(sampled ? drawing : { draws: null }),
    ...chanceOf(options, sampled),
    ...levelsOf(options, effort),
  });
}

const rowEcho = (scores: ShownScores): Partial<Plan> =>
  typeof scores === 'string' ? { rowRanks: scores } : { rowScores: scores };
const columnEcho = (scores: ShownScores): Partial<Plan> =>
  typeof scores === 'string' ? { columnRanks: scores } : { columnScores: scores };

const secondsPerUnit = 3e-8;

const forecastOf = ({ workUnits, tables }: StrataWork): Forecast<StrataEngine> =>
  Object.freeze({
    engine: 'convolution',
    workUnits: Math.round(Math.min(workUnits, Number.MAX_VALUE)),
    tables: tables < Number.MAX_SAFE_INTEGER ? tables : Number(Math.min(tables, Number.MAX_VALUE).toPrecision(3)),
    tablesAreCounted: tables < Number.MAX_SAFE_INTEGER,
    seconds: Number((Math.min(workUnits, Number.MAX_VALUE) * secondsPerUnit).toPrecision(2)),
  });

function settle(
  asked: Plan['methodAsked'],
  { workUnits }: StrataWork,
  effort: number,
  rule: string | null,
): { method: ChosenMethod; reason: string } {
  const possible = workUnits < Infinity;
  const cost = `exact work over all strata is forecast at ${inWords(workUnits)} units, the bound is ${inWords(effort)}`;
  const beyond = 'the law over all strata would take more memory than is allowed for';
  const fits = possible && workUnits <= effort;
  const more = possible ? raisedBound(workUnits) : '';
  if (rule !== null && (asked === 'sample' || (asked === 'auto' && !fits))) {
    throw usageProblem({
      code: 'rule-needs-exact',
      message: `the rule ${rule} needs the probability of every value, which random tables do not give`,
      place: '--two-sided-rule',
      hint: `use --two-sided-rule distance or doubled${asked === 'auto' ? more : ', or --method exact'}`,
    });
  }
  if (asked === 'exact' && !fits) {
    throw effortProblem({
      code: 'exact-over-bound',
      message: possible ? cost : beyond,
      place: '--method exact',
      hint: `use --method sample${more}`,
    });
  }
  if (asked === 'asymptotic') return { method: asked, reason: 'asked for' };
  if (asked !== 'auto') return { method: asked, reason: `asked for; ${possible ? cost : beyond}` };
  return fits
    ? { method: 'exact', reason: cost }
    : { method: 'sample', reason: `exact is out of reach: ${possible ? cost : beyond}` };
}

const inWords = (value: number): string =>
  value < 1e7 ? groupedDigits(Math.round(value)) : value.toExponential(1).replace('e+', 'e');
