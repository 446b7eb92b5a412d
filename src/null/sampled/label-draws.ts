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

/** @param rows how many first rows to draw. */
export function labelDraws(rowTotals: readonly number[], columnTotals: readonly number[], rows: number): LabelDraws {
  const total = columnTotals.reduce((sum, units) => sum + units, 0);
  return total <= bagUnits
    ? new LabelBag(rowTotals, columnTotals, rows)
    : new LabelSearch(rowTotals, columnTotals.length, rows, total);
}

/** For small tables: the column of every unit, a byte each, drawn without putting back. */
class LabelBag implements LabelDraws {
  private readonly full: Int32Array;
  /** The same bytes, four at a time: filled anew for every table. */
  private readonly words: Int32Array;
  private readonly bag: Uint8Array;
  /** For each unit to be drawn, the first cell of its row. */
  private readonly rowStarts: Int32Array;
  private readonly lastRow: number;
  private readonly total: number;

  constructor(rowTotals: readonly number[], columnTotals: readonly number[], rows: number) {
    const columns = columnTotals.length;
    this.total = columnTotals.reduce((sum, units) => sum + units, 0);
    const labels = new Uint8Array((this.total + 3) & ~3);
    labels.set(columnTotals.flatMap((units, j) => new Array<number>(units).fill(j)));
    this.full = new Int32Array(labels.buffer);
    this.words = new Int32Array(this.full.length);
    this.bag = new Uint8Array(this.words.buffer);
    const drawn = rowTotals.slice(0, rows);
    this.rowStarts = Int32Array.from(drawn.flatMap((units, i) => new Array<number>(units).fill(i * columns)));
    this.lastRow = (rowTotals.length - 1) * columns;
  }

  draw(source: UniformSource, into: Cells): void {
    const { lastRow, bag, full, words, rowStarts } = this;
    for (let k = 0; k < full.length; k++) words[k] = full[k]!;
    let word = 0;
    for (let unit = 0, left = this.total; unit < rowStarts.length; unit++) {
      // Half a word for a unit. Where 16 bits cannot tell two places apart, 32 more decide, to the same chance for every place.
      if ((unit & 1) === 0) word = source.word();
      const scaled = ((unit & 1) === 0 ? word >>> 16 : word & 0xffff) * left;
      const place =
        (scaled & 0xffff) + left <= 0x10000 ? scaled >>> 16 : ((scaled + source.uniform() * left) / 0x10000) | 0;
      const label = bag[place]!;
      left--;
      bag[place] = bag[left]!;
      into[lastRow + label]!--;
      into[rowStarts[unit]! + label]!++;
    }
  }
}

/** For rows of few units in larger tables: the column is searched from the last one on, which is the largest. */
class LabelSearch implements LabelDraws {
  private readonly lastRow: number;
  private readonly units: readonly number[];

  constructor(
    rowTotals: readonly number[],
    private readonly columns: number,
    rows: number,
    private readonly total: number,
  ) {
    this.units = rowTotals.slice(0, rows);
    this.lastRow = (rowTotals.length - 1) * columns;
  }

  draw(source: UniformSource, into: Cells): void {
    const { lastRow, columns, units } = this;
    let left = this.total;
    for (let i = 0; i < units.length; i++) {
      for (let unit = units[i]!; unit > 0; unit--, left--) {
        let place = source.uniform() * left;
        let width = left * resolution;
        let j = columns - 1;
        for (;;) {
          const inColumn = into[lastRow + j]!;
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
        into[lastRow + j]!--;
        into[i * columns + j]!++;
      }
    }
  }
}
