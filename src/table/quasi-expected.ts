// Expected counts under quasi-independence, e_ij = a_i b_j in the possible cells, by iterative proportional fitting (Deming & Stephan 1940).
import { dataProblem } from '../problem/problem.js';
import type { FreeCells } from './free-cells.js';
import type { Table } from './table.js';

const mostRounds = 200_000;

/**
 * Row-major over the whole table; 0 in impossible cells and in those held at 0. Every other one is positive, so that the rounds converge
 * geometrically; they end when no margin is off by more than 1e-13 of itself.
 * @throws Problem (data) `no-fit` where that takes more than 200,000 rounds.
 */
export function quasiExpected(table: Table, { blocks }: FreeCells): Float64Array {
  const width = table.columnLabels.length;
  const expected = new Float64Array(table.rowLabels.length * width);
  for (const { cells } of blocks) {
    for (const cell of cells) expected[cell] = 1;
    for (let round = 0; scaleOnce(table, cells, expected, width) > 1e-13; round++) {
      if (round < mostRounds) continue;
      throw dataProblem({
        code: 'no-fit',
        message: 'the expected counts were not fitted in 200,000 rounds: the table all but falls apart',
        hint: 'leave out rows or columns that are tied to the others by next to nothing',
      });
    }
  }
  return expected;
}

/** Rows, then columns; returns by how much a line was off, relatively. */
function scaleOnce(table: Table, cells: readonly number[], expected: Float64Array, width: number): number {
  let off = 0;
  for (const side of ['rows', 'columns'] as const) {
    const lineOf = (cell: number): number => (side === 'rows' ? Math.floor(cell / width) : cell % width);
    const totals = side === 'rows' ? table.rowTotals : table.columnTotals;
    const sums = new Float64Array(totals.length);
    for (const cell of cells) sums[lineOf(cell)]! += expected[cell]!;
    for (const cell of cells) {
      const factor = totals[lineOf(cell)]! / sums[lineOf(cell)]!;
      expected[cell]! *= factor;
      off = Math.max(off, Math.abs(factor - 1));
    }
  }
  return off;
}
