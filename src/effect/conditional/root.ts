// Roots of increasing functions: Newton's step where it stays inside what is known to hold the root, halving elsewhere.

export interface Slope {
  readonly value: number;
  readonly slope: number;
}

/**
 * The root of an increasing function on the real line, to about 1e-15 (absolute, or relative beyond 1).
 * @param start any number; the nearer the better.
 */
export function rootOfIncreasing(f: (x: number) => Slope, start: number): number {
  let low = -Infinity;
  let high = Infinity;
  let x = start;
  let reach = 1;
  for (let turn = 0; turn < 300; turn++) {
    const { value, slope } = f(x);
    if (value === 0) return x;
    if (value > 0) high = x;
    else low = x;
    let next = x - value / slope;
    if (!(next > low && next < high) || (turn > 40 && Number.isFinite(high - low))) {
      if (Number.isFinite(high - low)) next = low + (high - low) / 2;
      else {
        next = value > 0 ? x - reach : x + reach;
        reach *= 2;
      }
    }
    if (Math.abs(next - x) <= 1e-15 * Math.max(1, Math.abs(x)) || next === low || next === high) return next;
    x = next;
  }
  return x;
}

/** The last x in [from, to] where `holds` is true, for a claim true at `from` and false from some point on. */
export function lastWhere(holds: (x: number) => boolean, from: number, to: number): number {
  let low = from;
  let high = to;
  for (let turn = 0; turn < 200; turn++) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) break;
    if (holds(middle)) low = middle;
    else high = middle;
  }
  return low;
}
