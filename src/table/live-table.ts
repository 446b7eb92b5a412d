// The part of a table that conditional tests work on: empty rows and columns left out (they change no p),
// counts laid out flat, row after row, for the engines.
import type { Table } from './table.js';

export interface LiveTable {
  readonly rows: number;
  readonly columns: number;
  /** Row-major, length rows x columns. Engines must not write to it. */
  readonly counts: Float64Array;
  readonly rowTotals: Float64Array;
  readonly columnTotals: Float64Array;
  readonly total: number;
  /** For each live row or column, its index in the whole table. */
  readonly rowIndex: readonly number[];
  readonly columnIndex: readonly number[];
}

/** Leaves out the empty lines of a table. O(cells). */
export function liveTable(table: Table): LiveTable {
  const rowIndex = indexesOfNonZero(table.rowTotals);
  const columnIndex = indexesOfNonZero(table.columnTotals);
  const counts = new Float64Array(rowIndex.length * columnIndex.length);
  rowIndex.forEach((row, i) => {
    columnIndex.forEach((column, j) => {
      counts[i * columnIndex.length + j] = table.counts[row]![column]!;
    });
  });
  return {
    rows: rowIndex.length,
    columns: columnIndex.length,
    counts,
    rowTotals: Float64Array.from(rowIndex, (row) => table.rowTotals[row]!),
    columnTotals: Float64Array.from(columnIndex, (column) => table.columnTotals[column]!),
    total: table.total,
    rowIndex,
    columnIndex,
  };
}

const indexesOfNonZero = (totals: readonly number[]): number[] =>
  totals.flatMap((total, index) => (total > 0 ? [index] : []));

/** True when the margins leave nothing to chance: one live row or one live column. */
export const hasOneTableOnly = (live: LiveTable): boolean => live.rows < 2 || live.columns < 2;

/** Expected count of a cell under independence, e = R C / n. */
export const expectedCount = (live: LiveTable, row: number, column: number): number =>
  (live.rowTotals[row]! / live.total) * live.columnTotals[column]!;
