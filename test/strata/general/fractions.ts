// Plain fractions for oracles: slow, exact, and sharing no code with src.
export type Fraction = readonly [numerator: bigint, denominator: bigint];

const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? (a < 0n ? -a : a) : gcd(b, a % b));
const made = (n: bigint, d: bigint): Fraction => {
  const divisor = gcd(n, d) * (d < 0n ? -1n : 1n);
  return [n / divisor, d / divisor];
};

export const whole = (n: number | bigint): Fraction => [BigInt(n), 1n];
export const ratio = (n: number, d: number): Fraction => made(BigInt(n), BigInt(d));
export const plus = ([a, b]: Fraction, [c, d]: Fraction): Fraction => made(a * d + c * b, b * d);
export const minus = (x: Fraction, [c, d]: Fraction): Fraction => plus(x, [-c, d]);
export const times = ([a, b]: Fraction, [c, d]: Fraction): Fraction => made(a * c, b * d);
export const over = (x: Fraction, [c, d]: Fraction): Fraction => times(x, made(d, c));
export const order = (x: Fraction, y: Fraction): number => {
  const [n] = minus(x, y);
  return n > 0n ? 1 : n < 0n ? -1 : 0;
};

/** x with M x = b by elimination, for consistent systems with a singular M too: free unknowns are 0. */
export function solved(matrix: readonly (readonly Fraction[])[], b: readonly Fraction[]): Fraction[] {
  const work = matrix.map((row, i) => [...row, b[i]!]);
  const n = matrix.length;
  const pivots: number[] = [];
  for (let c = 0, r = 0; c < n && r < n; c++) {
    const found = work.findIndex((row, i) => i >= r && row[c]![0] !== 0n);
    if (found < 0) continue;
    [work[r], work[found]] = [work[found]!, work[r]!];
    work[r] = work[r]!.map((x) => over(x, work[r]![c]!));
    for (let i = 0; i < n; i++) {
      if (i !== r) work[i] = work[i]!.map((x, k) => minus(x, times(work[i]![c]!, work[r]![k]!)));
    }
    pivots.push(c);
    r++;
  }
  const x = new Array<Fraction>(n).fill(whole(0));
  pivots.forEach((c, r) => (x[c] = work[r]![n]!));
  return x;
}
