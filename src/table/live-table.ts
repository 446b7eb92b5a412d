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
    rowTotals: picked(table.rowTotals, rowIndex),
    columnTotals: picked(table.columnTotals, columnIndex),
    total: table.total,
    rowIndex,
    columnIndex,
  };
}

// Plain loops: a batch comes through here once for every table.
function indexesOfNonZero(totals: readonly number[]): number[] {
  const indexes: number[] = [];
  for (let k = 0; k < totals.length; k++) if (totals[k]! > 0) indexes.push(k);
  return indexes;
}

function picked(totals: readonly number[], index: readonly number[]): Float64Array {
  const values = new Float64Array(index.length);
  for (let k = 0; k < index.length; k++) values[k] = totals[index[k]!]!;
  return values;
}

/** True when the margins leave nothing to chance: one live row or one live column. */
export const hasOneTableOnly = (live: LiveTable): boolean => live.rows < 2 || live.columns < 2;

/** Expected count of a cell under independence, e = R C / n. */
export const expectedCount = (live: LiveTable, row: number, column: number): number =>
  (live.rowTotals[row]! / live.total) * live.columnTotals[column]!;
