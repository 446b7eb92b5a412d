// All ways to set one column below a node: for each, the node it comes from, what the column adds to the value (and key) and
// the factor it puts on the weight. Laid out in typed arrays that are used again for every node.
import type { NodeIndex, NodeSpace } from './node-space.js';

export interface ColumnTerms {
  readonly total: number;
  /** [row][count] */
  readonly values: readonly Float64Array[];
  readonly keys: readonly Float64Array[] | null;
  readonly weights: readonly Float64Array[];
}

export class Transitions {
  length = 0;
  /** Place of the source in its level. */
  sources = new Int32Array(1024);
  values: Float64Array = new Float64Array(1024);
  weights: Float64Array = new Float64Array(1024);
  keys: Float64Array = new Float64Array(1024);
  /** The column's counts but the last, as one number in the node space's mixed radix. */
  columns: Float64Array = new Float64Array(1024);
  private left: Float64Array;
  private roomAfter: Float64Array;

  constructor(private readonly space: NodeSpace) {
    this.left = new Float64Array(space.rows);
    this.roomAfter = new Float64Array(space.rows + 1);
  }

  /** Finds the sources, among those in `index`, from which the column leads to the node with these row sums. */
  collect(index: NodeIndex, column: ColumnTerms, sums: ArrayLike<number>): void {
    const { rows, strides, blocks } = this.space;
    const { left, roomAfter } = this;
    this.length = 0;
    let number = 0;
    for (let i = 0; i < rows; i++) {
      left[i] = sums[i]!;
      number += sums[i]! * strides[i]!;
    }
    for (let i = rows - 1; i >= 0; i--) roomAfter[i] = roomAfter[i + 1]! + sums[i]!;
    this.descend(index, column, sums, blocks.length > 0, 0, column.total, number, number, 0, 1, 0);
  }

  private descend(
    index: NodeIndex,
    column: ColumnTerms,
    sums: ArrayLike<number>,
    permuted: boolean,
    row: number,
    amount: number,
    number: number,
    whole: number,
    value: number,
    weight: number,
    key: number,
  ): void {
    const { space, left } = this;
    const lastButOne = space.rows - 2;
    const values = column.values[row]!;
    const weights = column.weights[row]!;
    const keys = column.keys === null ? null : column.keys[row]!;
    const stride = space.strides[row]!;
    const most = Math.min(sums[row]!, amount);
    let n = Math.max(0, amount - this.roomAfter[row + 1]!);
    if (row < lastButOne) {
      for (; n <= most; n++) {
        left[row] = sums[row]! - n;
        this.descend(
          index,
          column,
          sums,
          permuted,
          row + 1,
          amount - n,
          number - n * stride,
          whole,
          value + values[n]!,
          weight * weights[n]!,
          keys === null ? 0 : key + keys[n]!,
        );
      }
      return;
    }
    this.makeRoom(most - n + 1);
    const lastValues = column.values[row + 1]!;
    const lastWeights = column.weights[row + 1]!;
    const lastKeys = column.keys === null ? null : column.keys[row + 1]!;
    let at = this.length;
    for (; n <= most; n++) {
      const rest = amount - n;
      let source: number;
      if (permuted) {
        left[row] = sums[row]! - n;
        left[row + 1] = sums[row + 1]! - rest;
        source = index.get(space.numberOf(left));
      } else {
        source = index.get(number - n * stride);
      }
      if (source < 0) continue;
      this.sources[at] = source;
      this.values[at] = value + values[n]! + lastValues[rest]!;
      this.weights[at] = weight * weights[n]! * lastWeights[rest]!;
      if (keys !== null) this.keys[at] = key + keys[n]! + lastKeys![rest]!;
      this.columns[at] = whole - number + n * stride;
      at++;
    }
    this.length = at;
  }

  private makeRoom(more: number): void {
    if (this.length + more <= this.sources.length) return;
    const size = 2 * (this.length + more);
    const grown = (old: Float64Array): Float64Array => {
      const larger = new Float64Array(size);
      larger.set(old);
      return larger;
    };
    const sources = new Int32Array(size);
    sources.set(this.sources);
    this.sources = sources;
    this.values = grown(this.values);
    this.weights = grown(this.weights);
    this.keys = grown(this.keys);
    this.columns = grown(this.columns);
  }
}
