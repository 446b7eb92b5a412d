// The table as the engine walks it: the side with fewer lines as rows (their remaining totals are the state of the walk),
// rows in rising order of total, so that rows with equal totals stand side by side and the largest comes last.
import type { LiveTable } from '../../../table/live-table.js';

export interface OrientedTable {
  readonly rows: number;
  readonly columns: number;
  /** Rising. */
  readonly rowTotals: readonly number[];
  readonly columnTotals: readonly number[];
  readonly total: number;
  /** Observed counts, [column][row]. */
  readonly observed: readonly (readonly number[])[];
  /** Row and column of the live table for a cell of this one. */
  place(row: number, column: number): readonly [row: number, column: number];
  /** Row-major counts of the live table, from counts given as [column][row]. */
  liveCounts(counts: readonly ArrayLike<number>[]): Float64Array;
}

export function orient(live: LiveTable): OrientedTable {
  const turned = live.rows > live.columns;
  const [rowTotals, columnTotals] = turned ? [live.columnTotals, live.rowTotals] : [live.rowTotals, live.columnTotals];
  const order = Array.from(rowTotals.keys()).sort((a, b) => rowTotals[a]! - rowTotals[b]! || a - b);
  const columns = columnTotals.length;
  const place = (row: number, column: number): readonly [number, number] =>
    turned ? [column, order[row]!] : [order[row]!, column];
  const indexOf = (row: number, column: number): number => {
    const [liveRow, liveColumn] = place(row, column);
    return liveRow * live.columns + liveColumn;
  };
  return {
    rows: order.length,
    columns,
    rowTotals: order.map((row) => rowTotals[row]!),
    columnTotals: Array.from(columnTotals),
    total: live.total,
    observed: Array.from(columnTotals, (_, column) => order.map((__, row) => live.counts[indexOf(row, column)]!)),
    place,
    liveCounts(counts) {
      const flat = new Float64Array(live.counts.length);
      for (let column = 0; column < columns; column++) {
        for (let row = 0; row < order.length; row++) flat[indexOf(row, column)] = counts[column]![row]!;
      }
      return flat;
    },
  };
}
