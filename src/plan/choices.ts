// Which statistic, and the settings that only some statistics read; an option without effect is refused, not ignored.
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
  if (!statistic.takes?.includes('scores')) return { choices: {}, echo: {} };
  const rows = scoresOf(options.rowScores, table.rowTotals, live.rowIndex, '--row-scores');
  const columns = scoresOf(options.columnScores, table.columnTotals, live.columnIndex, '--column-scores');
  return {
    choices: { rowScores: rows.exact, columnScores: columns.exact },
    echo: { rowScores: [...rows.asNumbers], columnScores: [...columns.asNumbers] },
  };
}
