// Every table with the given margins and its probability, for a summary of the law. A walk of the plainest kind: for when
// tables are few, right to about 1e-12.
import { logFactorial } from '../../numeric/log-factorial.js';
import type { LiveTable } from '../../table/live-table.js';

/**
 * Calls `visit` once for each table with its counts (row-major, reused between calls) and its probability:
 * P = prod R_i! prod C_j! / (n! prod n_ij!) (Freeman & Halton 1951). Time grows with tables x cells.
 */
export function visitTables(live: LiveTable, visit: (counts: Float64Array, probability: number) => void): void {
  const { rows, columns, rowTotals, columnTotals, total } = live;
  const counts = new Float64Array(rows * columns);
  const left = Float64Array.from(columnTotals);
  const margins = sumOf(rowTotals, logFactorial) + sumOf(columnTotals, logFactorial) - logFactorial(total);

  const fill = (row: number, column: number, rowLeft: number, logP: number): void => {
    if (row === rows - 1) return lastRow(logP);
    const at = row * columns + column;
    let room = 0;
    for (let j = column + 1; j < columns; j++) room += left[j]!;
    for (let count = Math.max(0, rowLeft - room); count <= Math.min(rowLeft, left[column]!); count++) {
      counts[at] = count;
      left[column]! -= count;
      const after = logP - logFactorial(count);
      if (column < columns - 1) fill(row, column + 1, rowLeft - count, after);
      else fill(row + 1, 0, rowTotals[row + 1]!, after);
      left[column]! += count;
    }
  };

  const lastRow = (logP: number): void => {
    counts.set(left, (rows - 1) * columns);
    visit(counts, Math.exp(logP - sumOf(left, logFactorial)));
  };

  fill(0, 0, rowTotals[0]!, margins);
}

const sumOf = (values: Float64Array, of: (value: number) => number): number =>
  values.reduce((sum, value) => sum + of(value), 0);
