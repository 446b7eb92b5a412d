// Draws tables with both margins held: row by row, each row from what the rows before have left of the columns
// (Patefield 1981), so that no row is ever expanded. Order, orientation and samplers come from a plan.
import type { UniformSource } from '../../random/stream.js';
import { CellSampler } from './cell-sampler.js';
import { cellsFor, type Cells } from './cells.js';
import type { DrawPlan } from './draw-plan.js';
import { HypergeometricMass } from './hypergeometric/mass.js';
import { labelDraws, type LabelDraws } from './label-draws.js';

export class TableDrawer {
  private readonly rows: number;
  private readonly columns: number;
  private readonly rowTotals: Cells;
  private readonly columnTotals: Cells;
  private readonly total: number;
  private readonly positions: Int32Array;
  private readonly labelRows: number;
  private readonly labelUnits: number;
  private readonly labels: LabelDraws;
  /** Rows of cells, without the last column, from the first row after those of labels. */
  private readonly cells: readonly (readonly CellSampler[])[];

  constructor(plan: DrawPlan) {
    const { rowTotals, columnTotals, total, labelRows } = plan;
    this.rows = rowTotals.length;
    this.columns = columnTotals.length;
    this.total = total;
    this.rowTotals = cellsFor(total, rowTotals);
    this.columnTotals = cellsFor(total, columnTotals);
    this.positions = Int32Array.from(plan.positions);
    this.labelRows = labelRows;
    this.labelUnits = rowTotals.slice(0, labelRows).reduce((sum, units) => sum + units, 0);
    this.labels = labelDraws(rowTotals, columnTotals, labelRows);
    const mass = new HypergeometricMass(total);
    this.cells = plan.cells.map((row) => row.map((cell) => new CellSampler(cell, mass)));
  }

  /** A table of zeros to draw into: always one of these, so that its kind is the one that is fast. */
  newTable(): Cells {
    return cellsFor(this.total, new Array<number>(this.rows * this.columns).fill(0));
  }

  /** Draws one table, its cells in the plan's order of rows and columns; `arrange` puts them into the table's own. */
  draw(source: UniformSource, into: Cells): void {
    const { rows, columns, columnTotals, rowTotals, labelRows } = this;
    const last = (rows - 1) * columns;
    // The last row is kept at what the rows so far have left of the columns.
    for (let j = 0; j < columns; j++) into[last + j] = columnTotals[j]!;
    let left = this.total;
    if (labelRows > 0) {
      for (let cell = labelRows * columns - 1; cell >= 0; cell--) into[cell] = 0;
      this.labels.draw(source, into);
      left -= this.labelUnits;
    }
    for (let i = labelRows; i < rows - 1; i++) {
      this.drawRow(source, this.cells[i - labelRows]!, i * columns, left, rowTotals[i]!, into);
      left -= rowTotals[i]!;
    }
  }

  /** Copies a drawn table into row-major order over the live table. */
  arrange(drawn: Cells, into: { [cell: number]: number }): void {
    const { positions } = this;
    for (let cell = 0; cell < positions.length; cell++) into[positions[cell]!] = drawn[cell]!;
  }

  private drawRow(
    source: UniformSource,
    cells: readonly CellSampler[],
    start: number,
    total: number,
    rowTotal: number,
    into: Cells,
  ): void {
    const last = (this.rows - 1) * this.columns;
    let left = total;
    let drawn = rowTotal;
    let j = 0;
    for (; j < cells.length; j++) {
      const marked = into[last + j]!;
      const count = cells[j]!.draw(source, left, marked, drawn);
      into[start + j] = count;
      into[last + j] = marked - count;
      drawn -= count;
      left -= marked;
    }
    into[start + j] = drawn;
    into[last + j]! -= drawn;
  }
}
