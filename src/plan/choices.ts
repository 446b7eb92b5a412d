// Which statistic, and the settings that only some statistics read; an option without effect is refused, not ignored.
import { fractionRational, rationalText, type Rational } from '../numeric/rational.js';
import { usageProblem } from '../problem/problem.js';
import { standardLambda } from '../statistic/power-divergence.js';
import { statisticNamed, statisticNames, statistics } from '../statistic/registry.js';
import { ownStatistic, type OwnStatistic } from '../statistic/own.js';
import type { Choices, Statistic, Taken } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { Plan, PlanOptions } from './plan.js';
import { scoresOf } from './scores.js';
import { unused } from './settings.js';

/** A built-in one by name, or the user's own. @throws Problem (usage). */
export function chooseStatistic(wish: string | OwnStatistic | undefined): Statistic {
  if (wish === undefined || typeof wish === 'string') return statisticNamed(wish ?? 'pearson');
  return ownStatistic(wish, statisticNames);
}

const readBy = {
  groups: 'roles',
  event: 'roles',
  reference: 'roles',
  rowScores: 'scores',
  columnScores: 'scores',
  lambda: 'lambda',
} as const satisfies Partial<Record<keyof PlanOptions, Taken>>;

const reasons: Readonly<Record<Taken, string>> = {
  roles: 'which treats all rows and all columns alike',
  scores: 'which knows no order of rows and columns',
  lambda: 'which has no exponent to choose',
};

/** @throws Problem (usage) `option-without-effect`. */
export function refuseUnread(statistic: Statistic, options: PlanOptions): void {
  for (const [name, kind] of Object.entries(readBy) as [keyof typeof readBy, Taken][]) {
    if (options[name] === undefined || statistic.takes?.includes(kind)) continue;
    const readers = statistics.filter(({ takes }) => takes?.includes(kind)).map((one) => one.name);
    const option = `--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
    throw unused(option, `with ${statistic.name}, ${reasons[kind]}`, `leave it out, or use ${readers.join(' or ')}`);
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
  if (!statistic.takes?.includes('scores')) return { choices: {}, echo: {} };
  const rows = scoresOf(options.rowScores, table.rowTotals, live.rowIndex, '--row-scores');
  const columns = scoresOf(options.columnScores, table.columnTotals, live.columnIndex, '--column-scores');
  return {
    choices: { rowScores: rows.exact, columnScores: columns.exact },
    echo: { rowScores: [...rows.asNumbers], columnScores: [...columns.asNumbers] },
  };
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
