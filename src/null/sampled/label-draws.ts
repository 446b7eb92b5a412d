// Rows drawn unit by unit, each unit's column from what is left of the columns: for rows of few units.
import type { UniformSource } from '../../random/stream.js';
import type { Cells } from './cells.js';
import { bagUnits } from './limits.js';

const resolution = 2 ** -32;

/** Draws the first rows of a table. */
export interface LabelDraws {
  /**
   * @param into cells of these rows hold 0; those of the last row hold the column totals, and are lessened by what is drawn.
   */
  draw(source: UniformSource, into: Cells): void;
}

/** @param positions where cell (i, j) of the drawing lies in the table. @param rows how many first rows to draw. */
export function labelDraws(
  rowTotals: readonly number[],
  columnTotals: readonly number[],
  positions: Int32Array,
  rows: number,
): LabelDraws {
  const total = columnTotals.reduce((sum, units) => sum + units, 0);
  return total <= bagUnits
    ? new LabelBag(rowTotals, columnTotals, positions, rows)
    : new LabelSearch(rowTotals, total, positions, rows, columnTotals.length);
}

/** For small tables: the column of every unit, a byte each, drawn without putting back. */
class LabelBag implements LabelDraws {
  private readonly full: Int32Array;
  /** The same bytes, four at a time: filled anew for every table. */
  private readonly words: Int32Array;
  private readonly bag: Uint8Array;
  /** For each unit to be drawn, the start of its row in `positions`. */
  private readonly rowStarts: Int32Array;
  private readonly lastRow: Int32Array;
  private readonly total: number;

  constructor(
    rowTotals: readonly number[],
    columnTotals: readonly number[],
    private readonly positions: Int32Array,
    rows: number,
  ) {
    const columns = columnTotals.length;
    this.total = columnTotals.reduce((sum, units) => sum + units, 0);
    const labels = new Uint8Array((this.total + 3) & ~3);
    labels.set(columnTotals.flatMap((units, j) => new Array<number>(units).fill(j)));
    this.full = new Int32Array(labels.buffer);
    this.words = new Int32Array(this.full.length);
    this.bag = new Uint8Array(this.words.buffer);
    const drawn = rowTotals.slice(0, rows);
    this.rowStarts = Int32Array.from(drawn.flatMap((units, i) => new Array<number>(units).fill(i * columns)));
    this.lastRow = positions.slice(-columns);
  }

  draw(source: UniformSource, into: Cells): void {
    const { positions, lastRow, bag, full, words, rowStarts } = this;
    for (let k = 0; k < full.length; k++) words[k] = full[k]!;
    for (let unit = 0, left = this.total; unit < rowStarts.length; unit++, left--) {
      let place = source.uniform() * left;
      // Where 32 bits cannot tell two places apart, 32 more decide: every place has exactly the same chance.
      if (place - Math.floor(place) > 1 - left * resolution) place += source.uniform() * left * resolution;
      const label = bag[place | 0]!;
      bag[place | 0] = bag[left - 1]!;
      into[lastRow[label]!]!--;
      into[positions[rowStarts[unit]! + label]!]!++;
    }
  }
}

/** For rows of few units in larger tables: the column is searched from the last one on, which is the largest. */
class LabelSearch implements LabelDraws {
  private readonly lastRow: Int32Array;
  private readonly units: readonly number[];

  constructor(
    rowTotals: readonly number[],
    private readonly total: number,
    private readonly positions: Int32Array,
    rows: number,
    private readonly columns: number,
  ) {
    this.units = rowTotals.slice(0, rows);
    this.lastRow = positions.slice(-columns);
  }

  draw(source: UniformSource, into: Cells): void {
    const { positions, lastRow, columns, units } = this;
    let left = this.total;
    for (let i = 0; i < units.length; i++) {
      for (let unit = units[i]!; unit > 0; unit--, left--) {
        let place = source.uniform() * left;
        let width = left * resolution;
        let j = columns - 1;
        for (;;) {
          const inColumn = into[lastRow[j]!]!;
          if (place + width <= inColumn) break;
          if (place >= inColumn) {
            place -= inColumn;
            j--;
          } else if (width === 0) break;
          else {
            place += source.uniform() * width;
            width = 0;
          }
        }
        into[lastRow[j]!]!--;
        into[positions[i * columns + j]!]!++;
      }
    }
  }
}
