// All ways to set one column below a node: for each, the node it comes from, what the column adds to the value (and key) and
// the factor it puts on the weight. Laid out in typed arrays that are used again for every node.
import type { NodeIndex } from './node-index.js';
import type { NodeSpace } from './node-space.js';
import type { SourceRanges } from './source-ranges.js';

export interface ColumnTerms {
  readonly total: number;
  /** [row][count] */
  readonly values: readonly Float64Array[];
  readonly keys: readonly Float64Array[] | null;
  readonly weights: readonly Float64Array[];
  /** [row][amount]: what the rows from this one on add at least. */
  readonly leastRest: readonly Float64Array[];
}

/** What is asked of the level that transitions come from. */
export interface Sources {
  readonly index: NodeIndex;
  readonly ranges: SourceRanges;
  /** Smallest value by place. */
  readonly lows: Float64Array;
  /** The smallest of them. */
  readonly least: number;
}

export class Transitions {
  length = 0;
  /** Place of the source in its level. */
  sources = new Int32Array(1024);
  values: Float64Array = new Float64Array(1024);
  weights: Float64Array = new Float64Array(1024);
  keys: Float64Array = new Float64Array(1024);
  // One slot per row for the column as far as it is set.
  private readonly counts: Float64Array;
  private readonly amounts: Float64Array;
  private readonly partValues: Float64Array;
  private readonly partWeights: Float64Array;
  private readonly partKeys: Float64Array;
  private readonly partNumbers: Float64Array;
  private readonly partPlaces: Float64Array;
  private readonly most: Float64Array;
  private readonly roomAfter: Float64Array;
  private mostValue = Infinity;
  private sought = -1;
  private found: readonly number[] = [];

  constructor(private readonly space: NodeSpace) {
    const slots = (): Float64Array => new Float64Array(space.rows + 1);
    this.counts = slots();
    this.amounts = slots();
    this.partValues = slots();
    this.partWeights = slots();
    this.partKeys = slots();
    this.partNumbers = slots();
    this.partPlaces = slots();
    this.most = slots();
    this.roomAfter = slots();
  }

  /**
   * Finds the sources, among those of the level, from which the column leads to the node with these row sums. Neighbouring
   * interchangeable rows with equal sums take their counts in rising order only, weighted by the ways to arrange them.
   * Left out are transitions that can only lead to values above `mostValue`.
   */
  collect(from: Sources, column: ColumnTerms, sums: ArrayLike<number>, mostValue: number): void {
    const { counts, amounts, partValues, partWeights, partKeys, partNumbers, partPlaces, roomAfter, most } = this;
    const { rows, codes, blockOf } = this.space;
    // The bounds on the rest are right to a unit or two a row.
    const mostAdded = mostValue - from.least + 4 * rows;
    const { leastRest } = column;
    for (let i = rows - 1; i >= 0; i--) roomAfter[i] = roomAfter[i + 1]! + sums[i]!;
    this.length = 0;
    this.mostValue = mostValue;
    amounts[0] = column.total;
    partWeights[0] = 1;
    this.begin(0, 0, from.ranges, sums);
    let row = 0;
    while (row >= 0) {
      if (row === rows - 2) {
        this.finish(from, column, sums);
        row--;
        continue;
      }
      const n = ++counts[row]!;
      if (n > most[row]!) {
        row--;
        continue;
      }
      const value = partValues[row]! + column.values[row]![n]!;
      if (value + leastRest[row + 1]![amounts[row]! - n]! > mostAdded) continue;
      partValues[row + 1] = value;
      if (column.keys !== null) partKeys[row + 1] = partKeys[row]! + column.keys[row]![n]!;
      partNumbers[row + 1] = partNumbers[row]! + codes[row]![sums[row]! - n]!;
      let ways = 1;
      if (row > 0 && blockOf[row] !== row && sums[row] === sums[row - 1]) ways = this.arrangements(row, n, sums);
      partWeights[row + 1] = partWeights[row]! * column.weights[row]![n]! * ways;
      amounts[row + 1] = amounts[row]! - n;
      partPlaces[row + 1] = partPlaces[row]! + (sums[row]! - n) * from.ranges.strides[row]!;
      row++;
      this.begin(row, blockOf[row] !== row && sums[row] === sums[row - 1] ? n : 0, from.ranges, sums);
    }
  }

  /** Sets the range of a row's count, from `least` on, to what fits and can lead to a source. */
  private begin(row: number, least: number, ranges: SourceRanges, sums: ArrayLike<number>): void {
    const sum = sums[row]!;
    const amount = this.amounts[row]!;
    let from = Math.max(least, amount - this.roomAfter[row + 1]!);
    let to = Math.min(sum, amount);
    const low = ranges.least[row];
    if (low !== null && low !== undefined) {
      const place = this.partPlaces[row]!;
      from = Math.max(from, sum - ranges.most[row]![place]!);
      to = Math.min(to, sum - low[place]!);
    }
    this.counts[row] = from - 1;
    this.most[row] = to;
  }

  /** The column's counts for transition t of a collection with the same arguments. */
  countsAt(t: number, from: Sources, column: ColumnTerms, sums: ArrayLike<number>): readonly number[] {
    this.sought = t;
    this.collect(from, column, sums, this.mostValue);
    this.sought = -1;
    return this.found;
  }

  /** Factor by which one more row of a stretch of equal ones multiplies the ways to arrange their counts. */
  private arrangements(row: number, n: number, sums: ArrayLike<number>): number {
    const { blockOf } = this.space;
    let stretch = 1;
    let same = 1;
    let stillSame = true;
    for (let i = row; i > 0 && blockOf[i] !== i && sums[i] === sums[i - 1]; i--) {
      stretch++;
      stillSame &&= this.counts[i - 1] === n;
      if (stillSame) same++;
    }
    return stretch / same;
  }

  /** The last two rows: one count settles the other. */
  private finish(from: Sources, column: ColumnTerms, sums: ArrayLike<number>): void {
    const { space, counts } = this;
    const { codes, blockOf, rows } = space;
    const row = rows - 2;
    const sum = sums[row]!;
    const lastSum = sums[row + 1]!;
    const amount = this.amounts[row]!;
    const most = this.most[row]!;
    const least = counts[row]! + 1;
    if (most < least) return;
    this.makeRoom(most - least + 1);
    const { sources, values, weights, keys } = this;
    const columnValues = column.values[row]!;
    const lastValues = column.values[row + 1]!;
    const columnWeights = column.weights[row]!;
    const lastWeights = column.weights[row + 1]!;
    const columnKeys = column.keys === null ? null : column.keys[row]!;
    const lastKeys = column.keys === null ? null : column.keys[row + 1]!;
    const code = codes[row]!;
    const lastCode = codes[row + 1]!;
    const value = this.partValues[row]!;
    const weight = this.partWeights[row]!;
    const key = this.partKeys[row]!;
    const number = this.partNumbers[row]!;
    const { index, lows } = from;
    const { plain } = index;
    const { mostValue } = this;
    const mostAdded = mostValue - from.least;
    const joins = row > 0 && blockOf[row] !== row && sum === sums[row - 1];
    const lastJoins = blockOf[row + 1] !== row + 1 && lastSum === sum;
    let lastAdded = Infinity;
    let at = this.length;
    for (let n = least; n <= most; n++) {
      const rest = amount - n;
      if (lastJoins && rest < n) break;
      const added = value + columnValues[n]! + lastValues[rest]!;
      if (added > mostAdded) {
        // Convex in the count but for rounding: past the least it only rises.
        if (added > lastAdded && added > mostAdded + 2) break;
        lastAdded = added;
        continue;
      }
      const node = number + code[sum - n]! + lastCode[lastSum - rest]!;
      const source = plain !== null ? plain[node]! : index.get(node);
      if (source < 0 || added + lows[source]! > mostValue) continue;
      let ways = 1;
      if (joins || lastJoins) {
        counts[row] = n;
        if (joins) ways = this.arrangements(row, n, sums);
        if (lastJoins) ways *= this.arrangements(row + 1, rest, sums);
      }
      sources[at] = source;
      values[at] = added;
      weights[at] = weight * columnWeights[n]! * lastWeights[rest]! * ways;
      if (columnKeys !== null) keys[at] = key + columnKeys[n]! + lastKeys![rest]!;
      if (at === this.sought) this.found = [...Array.from(counts.subarray(0, row)), n, rest];
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
  }
}
