// Which statistic, and the settings that only some statistics read; an option without effect is refused, not ignored.
import { fractionRational, rationalText, type Rational } from '../numeric/rational.js';
import { usageProblem } from '../problem/problem.js';
import { kappaStatistic } from '../statistic/kappa.js';
import { pairedNames } from '../statistic/paired.js';
import { standardLambda } from '../statistic/power-divergence.js';
import { statisticNamed, statisticNames, statistics } from '../statistic/registry.js';
import { stratifiedNames } from '../statistic/stratified.js';
import { ownStatistic, type OwnStatistic } from '../statistic/own.js';
import type { Choices, Statistic, Taken } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { Plan, PlanOptions } from './plan.js';
import { scoresOf } from './scores.js';
import { oneOf, unused } from './settings.js';

/**
 * A built-in one by name, or the user's own.
 * @param levels of a square table of pairs, for statistics of agreement. @throws Problem (usage).
 */
export function chooseStatistic(wish: string | OwnStatistic | undefined, levels?: number): Statistic {
  if (typeof wish === 'string' && pairedNames.includes(wish)) {
    if (levels !== undefined) return kappaStatistic(wish, levels);
    throw usageProblem({
      code: 'needs-pairs',
      message: `${wish} is a statistic of pairs: rows and columns must be two answers of the same units`,
      place: '--statistic',
      hint: 'add --paired if they are',
    });
  }
  if (typeof wish === 'string' && stratifiedNames.includes(wish)) throw needsStrata(wish);
  if (wish === undefined || typeof wish === 'string') return statisticNamed(wish ?? 'pearson');
  return ownStatistic(wish, statisticNames);
}

const needsStrata = (name: string): Error =>
  usageProblem({
    code: 'statistic-needs-strata',
    message: `${name} is for strata, and this is one table`,
    place: '--statistic',
    hint: `use ${name === 'common-odds-ratio' ? 'score' : name === 'any-association' ? 'pearson' : 'trend'}, or name the strata with --strata`,
  });

const readBy = {
  groups: ['roles', 'groups'],
  event: ['roles'],
  reference: ['roles'],
  rowScores: ['scores', 'response-scores'],
  columnScores: ['scores', 'response-scores'],
  lambda: ['lambda'],
} as const satisfies Partial<Record<keyof PlanOptions, readonly Taken[]>>;

/** By name, not by a loop: a batch asks it of every table. */
const takesNothing = ({ groups, event, reference, rowScores, columnScores, lambda }: PlanOptions): boolean =>
  (groups ?? event ?? reference ?? rowScores ?? columnScores ?? lambda) === undefined;

const reasons = {
  groups: 'which treats all rows and all columns alike',
  event: 'which treats all rows and all columns alike',
  reference: 'which treats all rows and all columns alike',
  rowScores: 'which knows no order of rows and columns',
  columnScores: 'which knows no order of rows and columns',
  lambda: 'which has no exponent to choose',
} as const satisfies Record<keyof typeof readBy, string>;

/** @throws Problem (usage) `option-without-effect`. `twoByTwo`: there are two groups to compare, whatever the statistic. */
export function refuseUnread(statistic: Statistic, options: PlanOptions, twoByTwo: boolean): void {
  if (takesNothing(options)) return;
  for (const [name, kinds] of Object.entries(readBy) as [keyof typeof readBy, readonly Taken[]][]) {
    if (options[name] === undefined) continue;
    const reads = ({ takes }: Statistic): boolean => kinds.some((kind) => takes?.includes(kind));
    // Declared scores of ordered sides are read by the questions that use the order.
    if (options.ordered !== undefined && (name === 'rowScores' || name === 'columnScores')) continue;
    if (reads(statistic)) continue;
    if (twoByTwo && readBy[name].some((kind) => kind === 'roles')) continue; // its effects read them
    const readers = statistics.filter(reads).map((one) => one.name);
    const option = `--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
    throw unused(option, `with ${statistic.name}, ${reasons[name]}`, `leave it out, or use ${readers.join(' or ')}`);
  }
}

/** The settings in exact form, and as the plan echoes them. */
export function choicesOf(
  table: Table,
  live: LiveTable,
  statistic: Statistic,
  options: PlanOptions,
): { choices: Choices; echo: Partial<Plan> } {
  if (statistic.own) {
    const { statisticDigest } = options;
    return { choices: {}, echo: statisticDigest === undefined ? {} : { statisticDigest } };
  }
  if (statistic.takes?.includes('lambda')) {
    const lambda = lambdaOf(options.lambda);
    return { choices: { lambda }, echo: { lambda: rationalText(lambda) } };
  }
  if (statistic.takes?.includes('response-scores')) return responsesOf(table, live, statistic, options);
  if (!statistic.takes?.includes('scores')) return { choices: {}, echo: {} };
  const rows = scoresOf(options.rowScores, table.rowTotals, live.rowIndex, '--row-scores');
  const columns = scoresOf(options.columnScores, table.columnTotals, live.columnIndex, '--column-scores');
  return {
    choices: { rowScores: rows.exact, columnScores: columns.exact },
    echo: { rowScores: [...rows.asNumbers], columnScores: [...columns.asNumbers] },
  };
}

/** Groups are rows unless told; the scores are those of the other side. */
function responsesOf(
  table: Table,
  live: LiveTable,
  { name, standardResponseScores }: Statistic,
  options: PlanOptions,
): { choices: Choices; echo: Partial<Plan> } {
  const groups = oneOf(options.groups, 'rows', ['rows', 'columns'] as const, '--groups');
  const [own, other] =
    groups === 'rows' ? (['rowScores', 'columnScores'] as const) : (['columnScores', 'rowScores'] as const);
  const flags = { rowScores: '--row-scores', columnScores: '--column-scores' } as const;
  if (options[own] !== undefined) {
    throw unused(
      flags[own],
      `with ${name}, whose groups are the ${groups}`,
      `give ${flags[other]} for the responses, or say which side the groups are with --groups`,
    );
  }
  const [totals, index] = groups === 'rows' ? [table.columnTotals, live.columnIndex] : [table.rowTotals, live.rowIndex];
  const wish = options[other] ?? (standardResponseScores === 'midranks' ? 'midranks' : undefined);
  const { exact, asNumbers } = scoresOf(wish, totals, index, flags[other]);
  return { choices: { groups, responseScores: exact }, echo: { groups, [other]: [...asNumbers] } };
}

/** Denominators and sizes beyond these say nothing more about a table and would only make ties slow to decide. */
const largestLambda = 20n;
const largestDenominator = 1000n;

/** @throws Problem (usage) `not-a-lambda`, `lambda-out-of-range`. */
function lambdaOf(wish: string | number | undefined): Rational {
  if (wish === undefined) return standardLambda;
  const lambda = fractionRational(String(wish));
  if (lambda === undefined) {
    throw usageProblem({
      code: 'not-a-lambda',
      message: `"${wish}" is not a number`,
      place: '--lambda',
      hint: 'give a decimal or a fraction, such as --lambda 2/3',
    });
  }
  const { numerator, denominator } = lambda;
  if (numerator > -denominator && numerator <= largestLambda * denominator && denominator <= largestDenominator) {
    return lambda;
  }
  throw usageProblem({
    code: 'lambda-out-of-range',
    message: `${wish} is not above -1, at most ${largestLambda} and a multiple of 1/k with k at most ${largestDenominator}`,
    place: '--lambda',
    hint:
      numerator <= -denominator
        ? 'with -1 or less every table with an empty cell would be infinitely far out; use --lambda=-1/2 or more'
        : 'for example --lambda 2/3',
  });
}
