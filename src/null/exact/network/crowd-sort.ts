// Heap sort of a stretch of parallel arrays by value, in place: for the crowded cells that distribution leaves behind.

/** Sorts entries from..to of the three lanes by value; keys may be absent. */
export function sortCrowd(
  values: Float64Array,
  weights: Float64Array,
  keys: Float64Array | null,
  from: number,
  to: number,
): void {
  if (allEqual(values, from, to)) return;
  const exchange = (a: number, b: number): void => {
    swap(values, a, b);
    swap(weights, a, b);
    if (keys !== null) swap(keys, a, b);
  };
  const sink = (start: number, size: number): void => {
    for (let root = start; ;) {
      let child = 2 * root + 1;
      if (child >= size) return;
      if (child + 1 < size && values[from + child + 1]! > values[from + child]!) child++;
      if (values[from + root]! >= values[from + child]!) return;
      exchange(from + root, from + child);
      root = child;
    }
  };
  const size = to - from;
  for (let root = (size >> 1) - 1; root >= 0; root--) sink(root, size);
  for (let end = size - 1; end > 0; end--) {
    exchange(from, from + end);
    sink(0, end);
  }
}

function swap(lane: Float64Array, a: number, b: number): void {
  const held = lane[a]!;
  lane[a] = lane[b]!;
  lane[b] = held;
}

function allEqual(values: Float64Array, from: number, to: number): boolean {
  const value = values[from]!;
  for (let i = from + 1; i < to; i++) if (values[i] !== value) return false;
  return true;
}
