// A sum over cells by look-up: the value of every count that is likely to come up is worked out once.
import type { CellSum } from '../../statistic/contract.js';
import type { LiveTable } from '../../table/live-table.js';
import { leastOf, mostOf, rangeAround, spreadOf } from './hypergeometric/spread.js';
import type { Cells } from './cells.js';
import type { DrawPlan } from './draw-plan.js';
import { cellValueEntries } from './limits.js';

/** Counts within so many deviations of the expected one, and as many units more, have their value looked up. */
const reach = 8;
const margin = 8;

export class CellValues {
  private readonly terms: readonly Term[];

  /**
   * @param share one in so many of the look-up entries may be taken.
   */
  constructor(live: LiveTable, cells: CellSum, { positions, rowTotals, columnTotals }: DrawPlan, share: number) {
    const allowance = Math.floor(cellValueEntries / share / positions.length);
    const valueAt = positions.map((position): ValueOf => {
      const row = Math.floor(position / live.columns);
      const column = position % live.columns;
      return (count) => cells.cell(row, column, count);
    });
    if (rowTotals.length !== 2) {
      this.terms = positions.map((position, k) => new Term(live, valueAt[k]!, position, allowance));
      return;
    }
    // Of two rows the second follows from the first: one term for both cells of a column.
    this.terms = columnTotals.map((units, k) => {
      const below = valueAt[k + columnTotals.length]!;
      const both: ValueOf = (count) => valueAt[k]!(count) + below(units - count);
      return new Term(live, both, positions[k]!, 2 * allowance);
    });
  }

  /** S of a table whose cells come in the order of drawing; added in pairs. Any order is within the sum's slack. */
  sum(table: Cells): number {
    const { terms } = this;
    let sum = 0;
    let k = 0;
    for (; k < terms.length - 1; k += 2) sum += terms[k]!.at(table[k]!) + terms[k + 1]!.at(table[k + 1]!);
    return k < terms.length ? sum + terms[k]!.at(table[k]!) : sum;
  }
}

type ValueOf = (count: number) => number;

/** What one count adds to the sum. */
class Term {
  private readonly least: number;
  private readonly values: Float64Array;

  constructor(
    live: LiveTable,
    private readonly valueOf: ValueOf,
    position: number,
    allowance: number,
  ) {
    const row = live.rowTotals[Math.floor(position / live.columns)]!;
    const column = live.columnTotals[position % live.columns]!;
    const spread = spreadOf(live.total, row, column);
    const half = Math.min(rangeAround(spread, reach).length / 2 + margin, allowance / 2 - 1);
    this.least = Math.max(leastOf(live.total, row, column), Math.floor(spread.mean - half));
    const most = Math.min(mostOf(row, column), Math.floor(spread.mean + half));
    this.values = Float64Array.from({ length: Math.max(0, most - this.least + 1) }, (_, k) => valueOf(this.least + k));
  }

  at(count: number): number {
    const k = count - this.least;
    return k >= 0 && k < this.values.length ? this.values[k]! : this.valueOf(count);
  }
}
