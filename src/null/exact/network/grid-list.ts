// A list whose values are rounded to a grid as they are gathered, all up or all down: one addition to a cell an entry, and
// nothing to sort. Lists that are no longer than the grid has steps are kept as they are.
import { perGridEntry } from './costs.js';
import type { Level } from './level.js';
import { SortedList } from './sorted-list.js';
import type { Transitions } from './transitions.js';

/** How partial sums are taken to a grid: `down` never to more than they are, `up` never to less. */
export interface Rounding {
  /** A power of two, in units of the encoding. */
  readonly step: number;
  readonly toward: 'down' | 'up';
  /** Lists of at most so many entries are not rounded. */
  readonly keptApart: number;
}

export class GridList extends SortedList {
  private mostAdded = 0;
  private onGrid = false;
  /** The grid's greatest value; cell k stands for the value k steps below it. */
  private anchor = 0;
  private limit = 0;
  private cells = new Float64Array(4096);
  private filled = 0;
  private added = 0;

  constructor(private readonly rounding: Rounding) {
    super(false);
  }

  override get unitsPerEntry(): number {
    return this.onGrid ? perGridEntry : super.unitsPerEntry;
  }

  /** Entries of a cell are added without compensation. */
  override get relativeError(): number {
    return 2 ** -53 * this.mostAdded;
  }

  /** Told before a list is begun what transitions will bring to it: whether it will be long. */
  foresee(from: Level, transitions: Transitions): void {
    let foreseen = 0;
    for (let t = 0; t < transitions.length; t++) {
      const node = transitions.sources[t]!;
      foreseen += from.starts[node + 1]! - from.starts[node]!;
    }
    this.onGrid = foreseen > this.rounding.keptApart;
  }

  override clear(most: number): void {
    super.clear(most);
    if (!this.onGrid) return;
    const { step } = this.rounding;
    this.limit = most;
    this.anchor = Math.ceil(most / step) * step;
    this.filled = 0;
    this.added = 0;
  }

  override addShifted(level: Level, from: number, end: number, transitions: Transitions, t: number): number {
    if (!this.onGrid) return super.addShifted(level, from, end, transitions, t);
    if (from >= end) return from;
    const { values, weights } = level;
    const { step, toward } = this.rounding;
    const value = transitions.values[t]!;
    const weight = transitions.weights[t]!;
    const perStep = 1 / step;
    // Values and steps are whole numbers and the step is a power of two, so that this division is exact.
    const from0 = this.anchor - value + (toward === 'down' ? step - 1 : 0);
    const most = this.limit - value;
    if (values[from]! > most) return from;
    this.reach(((from0 - values[from]!) * perStep) | 0);
    const { cells } = this;
    let i = from;
    for (; i < end; i++) {
      const v = values[i]!;
      if (v > most) break;
      cells[((from0 - v) * perStep) | 0]! += weights[i]! * weight;
    }
    this.added += i - from;
    return i;
  }

  private reach(cell: number): void {
    if (cell < this.filled) return;
    if (cell >= this.cells.length) {
      const larger = new Float64Array(2 * cell);
      larger.set(this.cells.subarray(0, this.filled));
      this.cells = larger;
    } else this.cells.fill(0, this.filled, cell + 1);
    this.filled = cell + 1;
  }

  override sortAndMerge(): void {
    if (!this.onGrid) {
      super.sortAndMerge();
      return;
    }
    const { cells, filled, anchor } = this;
    const { step } = this.rounding;
    if (this.added > this.mostAdded) this.mostAdded = this.added;
    this.provideRoom(filled);
    const { values, weights } = this;
    let length = 0;
    for (let k = filled - 1; k >= 0; k--) {
      if (cells[k] === 0) continue;
      values[length] = anchor - k * step;
      weights[length++] = cells[k]!;
    }
    this.length = length;
  }
}
