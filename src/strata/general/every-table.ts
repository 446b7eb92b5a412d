// Every table with given margins, with its probability up to a constant: for the laws of single strata.
import { cellFactors } from '../../null/exact/cell-factors.js';
import type { LiveTable } from '../../table/live-table.js';

/** Calls `visit` with the counts (row-major, not to be kept) and weight = mantissa 2^exponent. Weights are right to cells x 2^-52. */
export function everyTable(
  live: LiveTable,
  visit: (counts: Float64Array, mantissa: number, exponent: number) => void,
): void {
  const { rows, columns } = live;
  const factors = cellFactors(live);
  const counts = new Float64Array(rows * columns);
  const left = Float64Array.from(live.columnTotals);
  const set = (cell: number, rowLeft: number, room: number, mantissa: number, exponent: number): void => {
    const column = cell % columns;
    const lastRow = cell >= (rows - 1) * columns;
    const capacity = left[column]!;
    // Room: what the columns after this one can still take of the row.
    const after = room - capacity;
    const from = lastRow ? capacity : Math.max(0, rowLeft - after);
    const to = lastRow ? capacity : Math.min(rowLeft, capacity);
    const { start, lowest } = factors.cells[cell]!;
    for (let count = from; count <= to; count++) {
      counts[cell] = count;
      const m = mantissa * factors.mantissas[start + count - lowest]!;
      const e = exponent + factors.exponents[start + count - lowest]!;
      left[column] = capacity - count;
      if (cell === rows * columns - 1) visit(counts, m, e);
      else if (column < columns - 1) set(cell + 1, rowLeft - count, after, m, e);
      else {
        const next = (cell + 1) / columns;
        let all = 0;
        for (const x of left) all += x;
        set(cell + 1, live.rowTotals[next]!, all, m, e);
      }
    }
    left[column] = capacity;
  };
  set(0, live.rowTotals[0]!, live.total, 1, 0);
}
