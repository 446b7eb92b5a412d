// One stage of one half of the network: for every node the sorted list of what the columns so far can have added, with
// weights, and the running sums by which whole stretches of a list are counted at once.
import type { NodeIndex } from './node-index.js';
import type { NodeSpace } from './node-space.js';
import type { SortedList } from './sorted-list.js';
import { SourceRanges } from './source-ranges.js';

/** Which side of the observed value is added up; the other follows from the whole. */
export type SummedSide = 'low' | 'high';

export class Level {
  nodes = 0;
  /** Entries of node p: starts[p] to starts[p + 1]. */
  starts = new Int32Array(256);
  /** Weight at node p known to end on the summed side whatever follows; kept out of the list. */
  settled = new Float64Array(256);
  /** Smallest value at node p, Infinity where the list is empty. */
  lows = new Float64Array(256);
  /** Smallest value at any node. */
  least = Infinity;
  values: Float64Array;
  weights: Float64Array;
  keys: Float64Array;
  /** low: weight of the node's entries before this one; high: of this one and those after it. */
  sums: Float64Array;
  length = 0;

  constructor(
    readonly index: NodeIndex,
    readonly ranges: SourceRanges,
    /** Sum of the totals of the columns so far. */
    public size: number,
    private readonly side: SummedSide,
    private readonly keyed: boolean,
  ) {
    this.values = new Float64Array(1024);
    this.weights = new Float64Array(1024);
    this.sums = new Float64Array(1024);
    this.keys = new Float64Array(keyed ? 1024 : 0);
  }

  /** The level before any column: one node, one empty partial table. */
  static root(space: NodeSpace, side: SummedSide, keyed: boolean): Level {
    const level = new Level(space.newIndex(), new SourceRanges(space), 0, side, keyed);
    level.index.set(0, 0);
    level.ranges.note(new Float64Array(space.rows));
    level.weights[0] = 1;
    level.sums[0] = side === 'high' ? 1 : 0;
    level.length = 1;
    level.starts[1] = 1;
    level.nodes = 1;
    level.least = 0;
    return level;
  }

  append(sums: Float64Array, number: number, list: SortedList, settled: number): void {
    const { length } = list;
    this.makeRoom(length);
    this.index.set(number, this.nodes);
    this.ranges.note(sums);
    const from = this.length;
    this.values.set(list.values.subarray(0, length), from);
    this.weights.set(list.weights.subarray(0, length), from);
    if (this.keyed) this.keys.set(list.keys.subarray(0, length), from);
    runningSums(list.weights, length, this.side, 0, this.sums, from);
    this.length += length;
    const node = this.nodes++;
    this.starts[node + 1] = this.length;
    this.settled[node] = settled;
    const low = length > 0 ? list.values[0]! : Infinity;
    this.lows[node] = low;
    if (low < this.least) this.least = low;
  }

  private makeRoom(more: number): void {
    if (this.nodes + 2 > this.starts.length) {
      const { starts, settled, lows } = this;
      this.starts = new Int32Array(4 * starts.length);
      this.starts.set(starts);
      this.settled = new Float64Array(4 * starts.length);
      this.settled.set(settled);
      this.lows = new Float64Array(4 * starts.length);
      this.lows.set(lows);
    }
    if (this.length + more <= this.values.length) return;
    const size = (this.length < 2 ** 16 ? 4 : 2) * (this.length + more);
    const grown = (old: Float64Array): Float64Array => {
      const larger = new Float64Array(size);
      larger.set(old.subarray(0, this.length));
      return larger;
    };
    this.values = grown(this.values);
    this.weights = grown(this.weights);
    this.sums = grown(this.sums);
    if (this.keyed) this.keys = grown(this.keys);
  }
}

/** Compensated running sums (Kahan 1965): each within two units in the last place. Returns the whole sum. */
export function runningSums(
  weights: Float64Array,
  length: number,
  side: SummedSide,
  start: number,
  sums: Float64Array,
  from: number,
): number {
  let sum = start;
  let lost = 0;
  if (side === 'low') {
    for (let i = 0; i < length; i++) {
      sums[from + i] = sum;
      const next = weights[i]! - lost;
      const total = sum + next;
      lost = total - sum - next;
      sum = total;
    }
  } else {
    for (let i = length - 1; i >= 0; i--) {
      const next = weights[i]! - lost;
      const total = sum + next;
      lost = total - sum - next;
      sum = total;
      sums[from + i] = sum;
    }
  }
  return sum;
}
