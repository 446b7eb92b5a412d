// A list of (value, key, weight) that is gathered in any order, then sorted by value with equal entries merged. Values of
// one node spread evenly enough for one pass of distribution into as many cells as entries, finished by insertion;
// crowded cells are sorted apart, so that the time stays n log n whatever the values.

/** Shorter lists are sorted by insertion alone. */
const shortList = 32;

export class SortedList {
  length = 0;
  values: Float64Array = new Float64Array(4096);
  weights: Float64Array = new Float64Array(4096);
  keys: Float64Array;
  private spareValues: Float64Array = new Float64Array(4096);
  private spareWeights: Float64Array = new Float64Array(4096);
  private spareKeys: Float64Array;
  private starts = new Int32Array(4097);

  constructor(private readonly keyed: boolean) {
    this.keys = new Float64Array(keyed ? 4096 : 0);
    this.spareKeys = new Float64Array(keyed ? 4096 : 0);
  }

  makeRoom(more: number): void {
    if (this.length + more <= this.values.length) return;
    const size = 2 * (this.length + more);
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

  sortAndMerge(): void {
    if (this.length > shortList) this.distribute();
    this.insert(0, this.length);
    this.merge();
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
      if (to - from > shortList && !this.allEqual(from, to)) this.heapSort(from, to);
      from = to;
    }
  }

  private swap(): void {
    [this.values, this.spareValues] = [this.spareValues, this.values];
    [this.weights, this.spareWeights] = [this.spareWeights, this.weights];
    [this.keys, this.spareKeys] = [this.spareKeys, this.keys];
  }

  private insert(from: number, to: number): void {
    const { values, weights, keys, keyed } = this;
    for (let i = from + 1; i < to; i++) {
      const value = values[i]!;
      if (value >= values[i - 1]!) continue;
      const weight = weights[i]!;
      const key = keyed ? keys[i]! : 0;
      let at = i;
      do {
        values[at] = values[at - 1]!;
        weights[at] = weights[at - 1]!;
        if (keyed) keys[at] = keys[at - 1]!;
        at--;
      } while (at > from && values[at - 1]! > value);
      values[at] = value;
      weights[at] = weight;
      if (keyed) keys[at] = key;
    }
  }

  private heapSort(from: number, to: number): void {
    const size = to - from;
    for (let root = (size >> 1) - 1; root >= 0; root--) this.sink(from, root, size);
    for (let end = size - 1; end > 0; end--) {
      this.exchange(from, from + end);
      this.sink(from, 0, end);
    }
  }

  private sink(from: number, start: number, size: number): void {
    const { values } = this;
    for (let root = start; ;) {
      let child = 2 * root + 1;
      if (child >= size) return;
      if (child + 1 < size && values[from + child + 1]! > values[from + child]!) child++;
      if (values[from + root]! >= values[from + child]!) return;
      this.exchange(from + root, from + child);
      root = child;
    }
  }

  private exchange(a: number, b: number): void {
    const { values, weights, keys } = this;
    const value = values[a]!;
    values[a] = values[b]!;
    values[b] = value;
    const weight = weights[a]!;
    weights[a] = weights[b]!;
    weights[b] = weight;
    if (!this.keyed) return;
    const key = keys[a]!;
    keys[a] = keys[b]!;
    keys[b] = key;
  }

  private allEqual(from: number, to: number): boolean {
    const value = this.values[from]!;
    for (let i = from + 1; i < to; i++) if (this.values[i] !== value) return false;
    return true;
  }

  /** Adds up neighbours with equal value (and key), with a compensated sum (Neumaier's form, all terms being positive). */
  private merge(): void {
    const { length, values, weights, keys, keyed } = this;
    let kept = 0;
    for (let i = 0; i < length;) {
      const value = values[i]!;
      const key = keyed ? keys[i]! : 0;
      let sum = weights[i]!;
      let lost = 0;
      for (i++; i < length && values[i] === value && (!keyed || keys[i] === key); i++) {
        const next = weights[i]!;
        const total = sum + next;
        lost += sum >= next ? sum - total + next : next - total + sum;
        sum = total;
      }
      values[kept] = value;
      weights[kept] = sum + lost;
      if (keyed) keys[kept] = key;
      kept++;
    }
    this.length = kept;
  }
}
