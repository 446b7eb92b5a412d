// Insertion sort of parallel arrays by value: quick where every entry is already near its place.

/** Sorts the first `length` entries of the three lanes by value; keys may be absent. */
export function insertInPlace(
  values: Float64Array,
  weights: Float64Array,
  keys: Float64Array | null,
  length: number,
): void {
  for (let i = 1; i < length; i++) {
    const value = values[i]!;
    if (value >= values[i - 1]!) continue;
    const weight = weights[i]!;
    const key = keys === null ? 0 : keys[i]!;
    let at = i;
    do {
      values[at] = values[at - 1]!;
      weights[at] = weights[at - 1]!;
      if (keys !== null) keys[at] = keys[at - 1]!;
      at--;
    } while (at > 0 && values[at - 1]! > value);
    values[at] = value;
    weights[at] = weight;
    if (keys !== null) keys[at] = key;
  }
}
