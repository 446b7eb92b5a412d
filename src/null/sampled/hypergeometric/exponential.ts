// e^y for y <= 0 by two small tables and a short series: half the time of the engine's own, which is a call that the compiler
// cannot see into. The draws evaluate one for most cells.

const wholes = Float64Array.from({ length: 64 }, (_, k) => Math.exp(-k));
const parts = Float64Array.from({ length: 1024 }, (_, k) => Math.exp(-k / 1024));

/**
 * e^y, y <= 0 (rounding noise above 0 is let through). Relative error below 1e-13 down to y = -60, 0 beyond (e^-60 = 9e-27).
 * y = -k/1024 + r with 0 <= r < 1/1024; the first omitted term, r^4/24, is below 4e-14.
 */
export function exponentialOfNegative(y: number): number {
  if (y >= 0) return 1 + y;
  if (y < -60) return 0;
  const steps = Math.ceil(y * -1024) | 0;
  const r = y + steps / 1024;
  return wholes[steps >> 10]! * parts[steps & 1023]! * (1 + r + r * r * (1 / 2 + r * (1 / 6)));
}
