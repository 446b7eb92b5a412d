// A declared order as the plan echoes it, with the declared scores that only its questions read.
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { Plan, PlanOptions } from './plan.js';
import { scoresOf } from './scores.js';
import { oneOf } from './settings.js';

/** @throws Problem (usage) for an unknown side or unfit scores. */
export function orderEcho(table: Table, live: LiveTable, options: PlanOptions, echo: Partial<Plan>): Partial<Plan> {
  if (options.ordered === undefined) return {};
  const ordered = oneOf(options.ordered, 'both', ['rows', 'columns', 'both'] as const, '--ordered');
  const { rowScores, columnScores } = options;
  return {
    ordered,
    ...(rowScores === undefined || echo.rowScores !== undefined
      ? {}
      : { rowScores: [...scoresOf(rowScores, table.rowTotals, live.rowIndex, '--row-scores').asNumbers] }),
    ...(columnScores === undefined || echo.columnScores !== undefined
      ? {}
      : {
          columnScores: [...scoresOf(columnScores, table.columnTotals, live.columnIndex, '--column-scores').asNumbers],
        }),
  };
}
