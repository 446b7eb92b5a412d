// What the study held fixed, and what follows for p: the conditional p, an unconditional one, or a parametric bootstrap.
import { groupedDigits } from '../numeric/digit-groups.js';
import { secondsPerUnit, type PlannedForecast } from '../null/forecast.js';
import { multinomialWork } from '../null/unconditional/multinomial-work.js';
import { unconditionalWork } from '../null/unconditional/unconditional-work.js';
import { effortProblem, usageProblem, type Problem } from '../problem/problem.js';
import type { Roles, Statistic } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import { bootstrapDraws } from './bootstrap-draws.js';
import { statedValue, statedWork, withNullValue } from './null-value.js';
import type { ChosenMethod, Method, Plan, PlanOptions, Tail, TwoSidedRule } from './plan.js';
import { oneOf, share, unused } from './settings.js';

export const fixedSides = ['both', 'rows', 'columns', 'total'] as const;
export type FixedSide = (typeof fixedSides)[number];

/** What makes an outcome of two groups as extreme: the statistic itself, or its conditional p (Boschloo 1970). */
export const outcomeOrders = ['statistic', 'conditional-p'] as const;
export type OutcomeOrder = (typeof outcomeOrders)[number];

/** How the headline p is found. */
export type DesignKind = 'conditional' | 'two-groups' | 'multinomial' | 'bootstrap' | 'null-value';

export interface Design {
  readonly kind: DesignKind;
  /** The fields of the plan that the design decides; empty for `conditional`. */
  readonly echo: Partial<Plan>;
}

export const isTwoByTwo = (table: Table): boolean => table.rowLabels.length === 2 && table.columnLabels.length === 2;

/** Statistics whose own value orders the outcomes of two groups. */
const ordersTwoGroups = ['pearson', 'score', 'wald'];
const ordersByConditionalP = ['probability', 'score', 'wald'];

export const fixedOf = (options: PlanOptions): FixedSide => oneOf(options.fixed, 'both', fixedSides, '--fixed');

/** Defaults that the design brings with it. @throws Problem (usage) for options that it leaves unread. */
export function withDesign(table: Table, wishes: PlanOptions): PlanOptions {
  const fixed = fixedOf(wishes);
  const options = wishes.nullValue === undefined ? wishes : withNullValue(table, wishes, wishes.nullValue);
  const isTwoGroups = (fixed === 'rows' || fixed === 'columns') && isTwoByTwo(table);
  const order = oneOf(options.outcomeOrder, 'statistic', outcomeOrders, '--outcome-order');
  const unread = isTwoGroups
    ? undefined
    : options.outcomeOrder !== undefined
      ? '--outcome-order'
      : options.nuisanceRisk !== undefined
        ? '--nuisance-risk'
        : undefined;
  if (unread !== undefined) {
    throw unused(
      unread,
      'unless two groups of fixed size are compared',
      'leave it out, or use --fixed rows or --fixed columns with a 2x2 table',
    );
  }
  if (!isTwoGroups) return options;
  if (options.groups !== undefined && options.groups !== fixed) throw groupsNotFixed(options.groups, fixed);
  const statistic = options.statistic ?? (order === 'conditional-p' ? 'probability' : 'pearson');
  const isSigned = statistic === 'score' || statistic === 'wald';
  const isBoth = options.tail === undefined || options.tail === 'both';
  return {
    ...options,
    statistic,
    groups: fixed,
    ...(order === 'conditional-p' && isSigned && isBoth ? { twoSidedRule: options.twoSidedRule ?? 'probability' } : {}),
  };
}

const groupsNotFixed = (groups: string, fixed: string): Problem =>
  usageProblem({
    code: 'groups-not-fixed',
    message: `--groups ${groups} with --fixed ${fixed}: the groups are the lines whose totals were fixed`,
    place: '--groups',
    hint: `leave --groups out, or use --fixed ${groups}`,
  });

export interface DesignQuestion {
  readonly table: Table;
  readonly live: LiveTable;
  readonly statistic: Statistic;
  readonly tail: Tail;
  readonly rule: TwoSidedRule | null;
  readonly asked: Method;
  readonly effort: number;
  /** Of two groups, as indexes into the whole table. */
  readonly roles: Roles;
}

/** @param options as `withDesign` left them. @throws Problem: usage, or effort where exact work is over the bound. */
export function designOf(question: DesignQuestion, options: PlanOptions): Design {
  const fixed = fixedOf(options);
  const { table, asked } = question;
  if (options.nullValue !== undefined) return nullValueDesign(question, options.nullValue, fixed);
  if (fixed === 'both') return { kind: 'conditional', echo: {} };
  const isSmall = isTwoByTwo(table);
  if (asked === 'asymptotic' || (fixed !== 'total' && !isSmall)) return { kind: 'conditional', echo: { fixed } };
  if (fixed === 'total') return totalFixed(question, options);
  const { rowTotals, columnTotals } = table;
  const [firstSize, secondSize] = (fixed === 'rows' ? rowTotals : columnTotals) as readonly [number, number];
  if (asked === 'sample') throw notSampled(fixed);
  const order = options.outcomeOrder ?? 'statistic';
  refuseOrder(question, order);
  const outcomes = (firstSize + 1) * (secondSize + 1);
  const echo = withinBound(
    question,
    unconditionalWork({ firstSize, secondSize }),
    'unconditional',
    outcomes,
    `p is the largest over the proportion common to both groups; ${groupedDigits(outcomes)} outcomes have these group sizes`,
  );
  const nuisanceRisk =
    options.nuisanceRisk === undefined ? {} : { nuisanceRisk: share(options.nuisanceRisk, 1e-6, '--nuisance-risk') };
  return { kind: 'two-groups', echo: { fixed, outcomeOrder: order, ...nuisanceRisk, ...echo } };
}

function nullValueDesign(question: DesignQuestion, text: string, fixed: FixedSide): Design {
  const stated = statedValue(text);
  const isOdds = stated.of === 'odds-ratio';
  const { workUnits, tables } = statedWork(stated, { cells: question.table.counts, ...question.roles });
  const many = groupedDigits(tables);
  const what = isOdds
    ? `${many} ${tables === 1 ? 'table has' : 'tables have'} these margins`
    : `p is the largest over the proportions that the stated ${stated.of} allows; ${many} outcomes have these group sizes`;
  const echo = withinBound(question, workUnits, isOdds ? 'two-by-two' : 'unconditional', tables, what);
  const isPair = 'between' in stated;
  return { kind: 'null-value', echo: { fixed, nullValue: stated, ...(isPair ? { twoSidedRule: null } : {}), ...echo } };
}

function totalFixed(question: DesignQuestion, options: PlanOptions): Design {
  const { table, live, statistic, tail, rule, asked, effort } = question;
  if (asked !== 'exact' && (statistic.own || (rule !== null && rule !== 'distance' && rule !== 'doubled'))) {
    throw noBootstrap(statistic, rule);
  }
  const { total } = table;
  const work = multinomialWork(total);
  const isOrdered = ['pearson', 'score'].includes(statistic.name) && tailFits(statistic, tail, rule);
  const canBeExact = isTwoByTwo(table) && isOrdered;
  if (asked === 'exact' || (asked === 'auto' && canBeExact && work <= effort)) {
    if (!canBeExact) throw noExactTotal();
    const tables = ((total + 3) * (total + 2) * (total + 1)) / 6;
    const echo = withinBound(
      question,
      work,
      'multinomial',
      tables,
      `p is the largest over the proportions of the first row and the first column; ${groupedDigits(tables)} tables have this total`,
    );
    return { kind: 'multinomial', echo: { fixed: 'total', ...echo } };
  }
  const draws = bootstrapDraws(options, live);
  const why = canBeExact
    ? `exact work is forecast at ${inWords(work)} units, the bound is ${inWords(effort)}`
    : 'with the total alone fixed, p is exact only for a 2x2 table ordered by pearson or score';
  return {
    kind: 'bootstrap',
    echo: { fixed: 'total', method: 'sample', methodReason: asked === 'sample' ? `asked for` : why, draws },
  };
}

function withinBound(
  { asked, effort }: DesignQuestion,
  workUnits: number,
  engine: PlannedForecast['engine'],
  tables: number,
  what: string,
): { method: ChosenMethod; methodReason: string; forecast: PlannedForecast } {
  const work = `the work is forecast at ${inWords(workUnits)} units, the bound is ${inWords(effort)}`;
  if (workUnits > effort) {
    throw effortProblem({
      code: 'exact-over-bound',
      message: `exact work is over the bound: ${what}; ${work}`,
      place: '--fixed',
      hint: `raise the bound with --effort ${(workUnits * 1.1).toPrecision(2)}, or use --fixed both`,
    });
  }
  const seconds = Number((workUnits * secondsPerUnit).toPrecision(2));
  return {
    method: 'exact',
    methodReason: `${asked === 'exact' ? 'asked for; ' : ''}${what}; ${work}`,
    forecast: Object.freeze({ engine, workUnits, tables, tablesAreCounted: true, seconds }),
  };
}

/** Two-sided rules of an unconditional p depend on what orders the outcomes. */
function refuseOrder({ statistic, tail, rule }: DesignQuestion, order: OutcomeOrder): void {
  const known = order === 'statistic' ? ordersTwoGroups : ordersByConditionalP;
  if (!known.includes(statistic.name) || (statistic.sided === 'upper' && tail === 'lower')) {
    throw usageProblem({
      code: 'no-unconditional-order',
      message: `${statistic.name}${tail === 'lower' ? ' with --tail lower' : ''} does not order the outcomes of two groups${order === 'statistic' ? '' : ' by conditional p'}`,
      place: '--statistic',
      hint: `use --statistic ${known.join(', ')}, or --fixed both`,
    });
  }
  const rules = order === 'statistic' ? ['distance', 'doubled'] : ['probability', 'doubled'];
  if (rule === null || rules.includes(rule)) return;
  throw usageProblem({
    code: 'rule-without-order',
    message: `the two-sided rule ${rule} does not order outcomes by ${order === 'statistic' ? 'the statistic' : 'conditional p'}`,
    place: '--two-sided-rule',
    hint: `use --two-sided-rule ${rules.join(' or ')}`,
  });
}

const tailFits = (statistic: Statistic, tail: Tail, rule: TwoSidedRule | null): boolean =>
  statistic.sided === 'upper' ? tail === 'upper' : rule === null || rule === 'distance' || rule === 'doubled';

const notSampled = (fixed: string): Problem =>
  usageProblem({
    code: 'unconditional-not-sampled',
    message: `the unconditional p with --fixed ${fixed} is exact; it is not sampled`,
    place: '--method sample',
    hint: 'leave --method out, or use --fixed both',
  });

const noBootstrap = (statistic: Statistic, rule: TwoSidedRule | null): Problem =>
  usageProblem({
    code: 'no-bootstrap',
    message: `with the total alone fixed, there is no p for ${statistic.own ? 'a statistic of your own' : `the two-sided rule ${rule ?? ''}`}`,
    place: statistic.own ? '--statistic' : '--two-sided-rule',
    hint: statistic.own
      ? 'use --fixed both, or a built-in statistic'
      : 'use --two-sided-rule distance or doubled, or --fixed both',
  });

const noExactTotal = (): Problem =>
  usageProblem({
    code: 'no-exact-total',
    message:
      'with the total alone fixed, an exact p is there only for a 2x2 table ordered by pearson (upper tail) or score',
    place: '--method exact',
    hint: 'use --method auto: a parametric bootstrap, or --fixed both',
  });

const inWords = (value: number): string =>
  value < 1e7 ? groupedDigits(Math.round(value)) : value.toExponential(1).replace('e+', 'e');
