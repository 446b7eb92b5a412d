/** Greatest common divisor of two non-negative whole numbers (Euclid). */
export function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  while (b > 0n) [a, b] = [b, a % b];
  return a;
}
