// The sorted list of the second half at the node where the halves meet, laid out for look-ups: running sums of weight, and
// a table by value that leads within a step or two to the place of any threshold.
import { runningSums, type SummedSide } from './level.js';
import type { SortedList } from './sorted-list.js';

export class MeetingList {
  length = 0;
  /** Rising, with Infinity at the end. */
  values = new Float64Array(1024);
  weights = new Float64Array(1024);
  keys = new Float64Array(1024);
  /** low: weight before an entry; high: of it and after it; settled weight included; one more element than entries. */
  sums = new Float64Array(1024);
  /** First entry whose cell is at least this one. */
  starts = new Int32Array(1024);
  least = 0;
  scale = 0;
  cells = 1;

  take(list: SortedList, side: SummedSide, settled: number): void {
    const { length } = list;
    this.makeRoom(length + 2);
    this.length = length;
    const { values, starts } = this;
    values.set(list.values.subarray(0, length));
    values[length] = Infinity;
    this.weights.set(list.weights.subarray(0, length));
    if (list.keys.length > 0) this.keys.set(list.keys.subarray(0, length));
    const whole = runningSums(this.weights, length, side, settled, this.sums, 0);
    this.sums[length] = side === 'low' ? whole : settled;
    this.least = length > 0 ? values[0]! : 0;
    const spread = length > 0 ? values[length - 1]! - this.least : 0;
    this.cells = Math.max(1, length);
    this.scale = spread > 0 ? (this.cells - 1) / spread : 0;
    let cell = 0;
    for (let i = 0; i < length; i++) {
      const of = ((values[i]! - this.least) * this.scale) | 0;
      while (cell <= of) starts[cell++] = i;
    }
    while (cell <= this.cells) starts[cell++] = length;
  }

  private makeRoom(size: number): void {
    if (size <= this.values.length) return;
    const larger = 2 * size;
    this.values = new Float64Array(larger);
    this.weights = new Float64Array(larger);
    this.keys = new Float64Array(larger);
    this.sums = new Float64Array(larger);
    this.starts = new Int32Array(larger);
  }
}
