// Draws tables with both margins held: row by row, each row from what the rows before have left of the columns
// (Patefield 1981), so that no row is ever expanded. Order, orientation and samplers come from a plan.
import type { UniformSource } from '../../random/stream.js';
import { CellSamplers } from './cell-samplers.js';
import { cellsFor, type Cells } from './cells.js';
import type { DrawPlan } from './draw-plan.js';
import { labelDraws, type LabelDraws } from './label-draws.js';

export class TableDrawer {
  private readonly rows: number;
  private readonly columns: number;
  private readonly rowTotals: Cells;
  private readonly columnTotals: Cells;
  private readonly positions: Int32Array;
  private readonly labelRows: number;
  private readonly labels: LabelDraws;
  private readonly cells: CellSamplers;
  private readonly total: number;

  constructor(plan: DrawPlan) {
    this.rows = plan.rowTotals.length;
    this.columns = plan.columnTotals.length;
    this.total = plan.total;
    this.rowTotals = cellsFor(plan.total, plan.rowTotals);
    this.columnTotals = cellsFor(plan.total, plan.columnTotals);
    this.positions = Int32Array.from(plan.positions);
    this.labelRows = plan.labelRows;
    this.labels = labelDraws(plan.rowTotals, plan.columnTotals, this.positions, plan.labelRows);
    this.cells = new CellSamplers(plan);
  }

  /** A table of zeros to draw into; always pass the same kind, for speed. */
  newTable(): Cells {
    return cellsFor(this.total, new Array<number>(this.rows * this.columns).fill(0));
  }

  /** Writes one table, row-major over the live table, into `into` (length rows x columns). */
  draw(source: UniformSource, into: Cells): void {
    const { rows, columns, positions, columnTotals, rowTotals, labelRows } = this;
    const last = (rows - 1) * columns;
    // The last row is kept at what the rows so far have left of the columns.
    for (let j = 0; j < columns; j++) into[positions[last + j]!] = columnTotals[j]!;
    let left = this.total;
    if (labelRows > 0) {
      for (let cell = 0; cell < labelRows * columns; cell++) into[positions[cell]!] = 0;
      this.labels.draw(source, into);
      for (let i = 0; i < labelRows; i++) left -= rowTotals[i]!;
    }
    for (let i = labelRows; i < rows - 1; i++) {
      this.drawRow(source, i, left, into);
      left -= rowTotals[i]!;
    }
  }

  private drawRow(source: UniformSource, i: number, total: number, into: Cells): void {
    const { positions, columns, cells } = this;
    const start = i * columns;
    const last = (this.rows - 1) * columns;
    let left = total;
    let drawn = this.rowTotals[i]!;
    for (let j = 0; j < columns - 1; j++) {
      const rest = positions[last + j]!;
      const marked = into[rest]!;
      const count = cells.draw(source, start + j, left, marked, drawn);
      into[positions[start + j]!] = count;
      into[rest] = marked - count;
      drawn -= count;
      left -= marked;
    }
    into[positions[start + columns - 1]!] = drawn;
    into[positions[last + columns - 1]!]! -= drawn;
  }
}
