// A list of (value, key, weight) gathered in any order, then sorted by value with equal entries merged. Where most entries
// turn out equal they are merged on arrival (open addressing), else after sorting. Values of one node spread evenly enough
// for one pass of distribution into as many cells as entries, finished by insertion; crowded cells are sorted apart, so
// that the time stays n log n whatever the values.
import { perEntry } from './costs.js';
import { sortCrowd } from './crowd-sort.js';
import { insertInPlace } from './insert-in-place.js';
import type { Level } from './level.js';
import { mergeEqual } from './merge-equal.js';
import type { Transitions } from './transitions.js';

/** Shorter lists are sorted by insertion alone. */
const shortList = 32;
/** Entries are merged on arrival while fewer than this share of them are different. */
const fewDifferent = 0.4;

export class SortedList {
  length = 0;
  /** Entries gathered before equal ones were merged. */
  gathered = 0;
  values: Float64Array = new Float64Array(4096);
  weights: Float64Array = new Float64Array(4096);
  keys: Float64Array;
  private spareValues: Float64Array = new Float64Array(4096);
  private spareWeights: Float64Array = new Float64Array(4096);
  private spareKeys: Float64Array;
  private starts = new Int32Array(4097);

  /** What taking up, sorting and merging an entry costs, in the units of the forecast. */
  get unitsPerEntry(): number {
    return perEntry;
  }

  /** Bound on what adding in this list, beyond two units in the last place, does to a weight. */
  get relativeError(): number {
    return 0;
  }

  private most = 0;
  // For merging on arrival: entry + 1 by slot, and the slots in use.
  private slots = new Int32Array(0);
  private used = new Int32Array(0);
  /** What rounding took from the weights merged on arrival. */
  private lost = new Float64Array(0);
  private merging = false;
  private arrived = 0;
  private different = 0;

  constructor(private readonly keyed: boolean) {
    this.keys = new Float64Array(keyed ? 4096 : 0);
    this.spareKeys = new Float64Array(keyed ? 4096 : 0);
  }

  /** Begins a new list, for values up to `most`. */
  clear(most: number): void {
    this.length = 0;
    this.most = most;
    if (this.arrived < 4096) return;
    this.merging = this.different < fewDifferent * this.arrived;
    if (this.arrived > 2 ** 20) this.arrived = this.different = 0;
  }

  /**
   * Adds the level's entries from..end by transition t (shifted by its value and key, scaled by its weight), up to the value
   * `most`; returns the first entry left out. Takes whole numbers only, which cost nothing to hand over.
   */
  addShifted(level: Level, from: number, end: number, transitions: Transitions, t: number): number {
    this.makeRoom(end - from);
    if (this.merging) return this.mergeShifted(level, from, end, transitions, t);
    const { values, weights, keys } = this;
    const { values: theirValues, weights: theirWeights, keys: theirKeys } = level;
    const value = transitions.values[t]!;
    const weight = transitions.weights[t]!;
    const most = this.most - value;
    let at = this.length;
    let i = from;
    for (; i < end; i++) {
      const v = theirValues[i]!;
      if (v > most) break;
      values[at] = v + value;
      weights[at] = theirWeights[i]! * weight;
      at++;
    }
    if (this.keyed) {
      const key = transitions.keys[t]!;
      for (let to = this.length, k = from; k < i; k++) keys[to++] = theirKeys[k]! + key;
    }
    this.length = at;
    return i;
  }

  private mergeShifted(level: Level, from: number, end: number, transitions: Transitions, t: number): number {
    const { values, weights, keys, slots, used, lost, keyed, most } = this;
    const { values: theirValues, weights: theirWeights, keys: theirKeys } = level;
    const value = transitions.values[t]!;
    const weight = transitions.weights[t]!;
    const key = transitions.keys[t]!;
    const mask = slots.length - 1;
    let { length } = this;
    let i = from;
    for (; i < end; i++) {
      const v = theirValues[i]! + value;
      if (v > most) break;
      const k = keyed ? theirKeys[i]! + key : 0;
      let slot = Math.imul(v | 0, 0x9e3779b1) ^ Math.imul((v / 4294967296) | 0, 0x85ebca6b);
      slot = (slot ^ (slot >>> 15)) & mask;
      let entry = slots[slot]!;
      while (entry !== 0 && (values[entry - 1] !== v || (keyed && keys[entry - 1] !== k))) {
        slot = (slot + 1) & mask;
        entry = slots[slot]!;
      }
      if (entry !== 0) {
        const sum = weights[entry - 1]!;
        const next = theirWeights[i]! * weight;
        const total = sum + next;
        lost[entry - 1]! += sum >= next ? sum - total + next : next - total + sum;
        weights[entry - 1] = total;
        continue;
      }
      values[length] = v;
      weights[length] = theirWeights[i]! * weight;
      if (keyed) keys[length] = k;
      lost[length] = 0;
      used[length] = slot;
      slots[slot] = ++length;
    }
    this.arrived += i - from;
    this.different += length - this.length;
    this.length = length;
    return i;
  }

  /** Room for so many entries altogether. */
  protected provideRoom(entries: number): void {
    this.makeRoom(Math.max(0, entries - this.length));
  }

  private makeRoom(more: number): void {
    const needed = this.length + more;
    if (needed > this.values.length) {
      const size = 2 * needed;
      const grown = (old: Float64Array): Float64Array => {
        const larger = new Float64Array(size);
        larger.set(old.subarray(0, this.length));
        return larger;
      };
      this.values = grown(this.values);
      this.weights = grown(this.weights);
      this.spareValues = new Float64Array(size);
      this.spareWeights = new Float64Array(size);
      if (this.keyed) {
        this.keys = grown(this.keys);
        this.spareKeys = new Float64Array(size);
      }
      this.starts = new Int32Array(size + 1);
    }
    if (this.merging && 2 * needed > this.slots.length) this.makeSlots(needed);
  }

  private makeSlots(needed: number): void {
    const slots = new Int32Array(2 ** Math.ceil(Math.log2(4 * needed)));
    const used = new Int32Array(slots.length);
    const lost = new Float64Array(slots.length);
    lost.set(this.lost.subarray(0, this.length));
    const mask = slots.length - 1;
    for (let entry = 0; entry < this.length; entry++) {
      const v = this.values[entry]!;
      let slot = Math.imul(v | 0, 0x9e3779b1) ^ Math.imul((v / 4294967296) | 0, 0x85ebca6b);
      slot = (slot ^ (slot >>> 15)) & mask;
      while (slots[slot] !== 0) slot = (slot + 1) & mask;
      slots[slot] = entry + 1;
      used[entry] = slot;
    }
    this.slots = slots;
    this.used = used;
    this.lost = lost;
  }

  sortAndMerge(): void {
    const { length } = this;
    if (this.merging) {
      const { slots, used, lost, weights } = this;
      for (let entry = 0; entry < length; entry++) {
        slots[used[entry]!] = 0;
        weights[entry]! += lost[entry]!;
      }
    }
    if (length > shortList) this.distribute();
    insertInPlace(this.values, this.weights, this.keyed ? this.keys : null, length);
    if (this.merging) return;
    this.merge();
    this.arrived += length;
    this.different += this.length;
  }

  private distribute(): void {
    const { length, values, weights, keys, spareValues, spareWeights, spareKeys, starts, keyed } = this;
    let least = Infinity;
    let most = -Infinity;
    for (let i = 0; i < length; i++) {
      const value = values[i]!;
      if (value < least) least = value;
      if (value > most) most = value;
    }
    if (most === least) return;
    const scale = (length - 1) / (most - least);
    starts.fill(0, 0, length + 1);
    for (let i = 0; i < length; i++) starts[(((values[i]! - least) * scale) | 0) + 1]!++;
    let crowd = 0;
    for (let cell = 0; cell < length; cell++) {
      if (starts[cell + 1]! > crowd) crowd = starts[cell + 1]!;
      starts[cell + 1]! += starts[cell]!;
    }
    for (let i = 0; i < length; i++) {
      const value = values[i]!;
      const to = starts[((value - least) * scale) | 0]!++;
      spareValues[to] = value;
      spareWeights[to] = weights[i]!;
      if (keyed) spareKeys[to] = keys[i]!;
    }
    this.swap();
    if (crowd <= shortList) return;
    for (let cell = 0, from = 0; cell < length; cell++) {
      const to = starts[cell]!;
      if (to - from > shortList) sortCrowd(this.values, this.weights, this.keyed ? this.keys : null, from, to);
      from = to;
    }
  }

  private swap(): void {
    [this.values, this.spareValues] = [this.spareValues, this.values];
    [this.weights, this.spareWeights] = [this.spareWeights, this.weights];
    [this.keys, this.spareKeys] = [this.spareKeys, this.keys];
  }

  private merge(): void {
    this.length = mergeEqual(this.length, this.values, this.weights, this.keyed ? this.keys : null);
  }
}
