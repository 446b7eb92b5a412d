// A sum over cells by look-up: the value of every count that is likely to come up is worked out once.
import type { CellSum } from '../../statistic/contract.js';
import type { LiveTable } from '../../table/live-table.js';
import { leastOf, mostOf, rangeAround, spreadOf } from './hypergeometric/spread.js';
import { cellsFor, type Cells } from './cells.js';
import { cellValueEntries } from './limits.js';

/** Counts within so many deviations of the expected one, and as many units more, have their value looked up. */
const reach = 8;
const margin = 8;

export class CellValues {
  private readonly columns: number;
  /** For each cell three numbers: its least count with a value, how many have one, where they start. */
  private readonly windows: Cells;
  private readonly values: Float64Array;

  /** @param share one in so many of the look-up entries may be taken. */
  constructor(
    live: LiveTable,
    private readonly cells: CellSum,
    share: number,
  ) {
    const { rows, columns, rowTotals, columnTotals, total } = live;
    const allowance = Math.floor(cellValueEntries / share / (rows * columns));
    const windows: number[] = [];
    const values: number[] = [];
    for (let i = 0; i < rows; i++) {
      for (let j = 0; j < columns; j++) {
        const row = rowTotals[i]!;
        const column = columnTotals[j]!;
        const spread = spreadOf(total, row, column);
        const around = rangeAround(spread, reach);
        const half = Math.min(around.length / 2 + margin, allowance / 2 - 1);
        const from = Math.max(leastOf(total, row, column), Math.floor(spread.mean - half));
        const length = Math.max(0, Math.min(mostOf(row, column), Math.floor(spread.mean + half)) - from + 1);
        windows.push(from, length, values.length);
        for (let k = 0; k < length; k++) values.push(cells.cell(i, j, from + k));
      }
    }
    this.columns = columns;
    this.windows = cellsFor(total, windows);
    this.values = Float64Array.from(values);
  }

  /** S(table), added cell by cell in row-major order. */
  sum(table: Cells): number {
    const { windows, values } = this;
    let sum = 0;
    for (let cell = 0, w = 0; w < windows.length; cell++, w += 3) {
      const count = table[cell]!;
      const k = count - windows[w]!;
      sum += k >= 0 && k < windows[w + 1]! ? values[windows[w + 2]! + k]! : this.beyond(cell, count);
    }
    return sum;
  }

  private beyond(cell: number, count: number): number {
    return this.cells.cell(Math.floor(cell / this.columns), cell % this.columns, count);
  }
}
