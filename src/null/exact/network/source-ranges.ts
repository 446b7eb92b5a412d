// Where the nodes of a level lie: for every beginning of a vector of row sums, the range of the next one. The nodes fill a
// ball in a much larger box, and the ranges keep the search for sources from wandering through the empty corners.
import type { NodeSpace } from './node-space.js';

/** A longer table of ranges is not kept; that row is then searched from end to end. */
const largestTable = 2 ** 20;

export class SourceRanges {
  /** Multiplier of each row sum in the number of a beginning. */
  readonly strides: Float64Array;
  /** [row][number of the sums before it]; null where there are too many. */
  readonly least: readonly (Int32Array | null)[];
  readonly most: readonly (Int32Array | null)[];
  private readonly arranged: Float64Array;

  constructor(private readonly space: NodeSpace) {
    const { rows, table } = space;
    this.strides = new Float64Array(rows);
    this.arranged = new Float64Array(rows);
    const least: (Int32Array | null)[] = [];
    const most: (Int32Array | null)[] = [];
    let size = 1;
    for (let row = 0; row < rows - 1; row++) {
      // Shared lists would need the ranges of every arrangement: their tables are sparse, and their boxes full.
      const kept = size <= largestTable && !space.allAlike;
      least.push(kept ? new Int32Array(size).fill(2 ** 30) : null);
      most.push(kept ? new Int32Array(size).fill(-1) : null);
      this.strides[row] = size;
      size *= table.rowTotals[row]! + 1;
    }
    this.least = least;
    this.most = most;
  }

  /** Takes note of a node, in every arrangement of its interchangeable rows. */
  note(sums: ArrayLike<number>): void {
    if (this.space.allAlike) return;
    for (let i = 0; i < this.arranged.length; i++) this.arranged[i] = sums[i]!;
    this.arrange(0);
  }

  /** Settles rows from `row` on: each in turn takes the place of the first of its block not yet settled. */
  private arrange(row: number): void {
    const { arranged, space } = this;
    if (row >= arranged.length - 1) {
      this.widen();
      return;
    }
    this.arrange(row + 1);
    for (let other = row + 1; other < arranged.length && space.blockOf[other] === space.blockOf[row]; other++) {
      if (arranged[other] === arranged[row]) continue;
      const held = arranged[row]!;
      arranged[row] = arranged[other]!;
      arranged[other] = held;
      this.arrange(row + 1);
      arranged[other] = arranged[row]!;
      arranged[row] = held;
    }
  }

  private widen(): void {
    const { arranged, strides } = this;
    let number = 0;
    for (let row = 0; row < arranged.length - 1; row++) {
      const least = this.least[row]!;
      const most = this.most[row]!;
      if (least === null || most === null) return;
      const sum = arranged[row]!;
      if (sum < least[number]!) least[number] = sum;
      if (sum > most[number]!) most[number] = sum;
      number += sum * strides[row]!;
    }
  }
}
