// Neighbours of a sorted list that are equal, made one.

/**
 * Adds up neighbours with equal value (and key), with a compensated sum (Neumaier's form, all terms being positive).
 * @returns how many entries are left, at the front of the arrays.
 */
export function mergeEqual(
  length: number,
  values: Float64Array,
  weights: Float64Array,
  keys: Float64Array | null,
): number {
  let kept = 0;
  for (let i = 0; i < length;) {
    const value = values[i]!;
    const key = keys === null ? 0 : keys[i]!;
    let sum = weights[i]!;
    let lost = 0;
    for (i++; i < length && values[i] === value && (keys === null || keys[i] === key); i++) {
      const next = weights[i]!;
      const total = sum + next;
      lost += sum >= next ? sum - total + next : next - total + sum;
      sum = total;
    }
    values[kept] = value;
    weights[kept] = sum + lost;
    if (keys !== null) keys[kept] = key;
    kept++;
  }
  return kept;
}
