// Exponents of primes in n! and n^n: the exact identity of a table's probability and of its likelihood ratio. Two tables
// with the same margins tie if and only if the exponents of their products agree.

export function primesUpTo(limit: number): number[] {
  const composite = new Uint8Array(limit + 1);
  const primes: number[] = [];
  for (let n = 2; n <= limit; n++) {
    if (composite[n] === 1) continue;
    primes.push(n);
    for (let multiple = n * n; multiple <= limit; multiple += n) composite[multiple] = 1;
  }
  return primes;
}

/** How often the prime divides n, for n = 0 to limit (0 for n = 0). */
function multiplicities(prime: number, limit: number): Float64Array {
  const times = new Float64Array(limit + 1);
  for (let power = prime; power <= limit; power *= prime) {
    for (let n = power; n <= limit; n += power) times[n]! += 1;
  }
  return times;
}

/** Exponent of the prime in n!, for n = 0 to limit. */
export function factorialExponents(prime: number, limit: number): Float64Array {
  const exponents = multiplicities(prime, limit);
  for (let n = 1; n <= limit; n++) exponents[n]! += exponents[n - 1]!;
  return exponents;
}

/** Exponent of the prime in n^n, for n = 0 to limit. */
export function selfPowerExponents(prime: number, limit: number): Float64Array {
  return multiplicities(prime, limit).map((times, n) => times * n);
}

/** At least the exponent of the prime in any product of n! over counts that add up to the total: it divides total!. */
export function factorialBound(prime: number, total: number): number {
  let sum = 0;
  for (let left = Math.floor(total / prime); left > 0; left = Math.floor(left / prime)) sum += left;
  return sum;
}

/** The same for n^n: only multiples of the prime count, each at most with its highest power. */
export function selfPowerBound(prime: number, total: number): number {
  let highest = 0;
  for (let power = prime; power <= total; power *= prime) highest++;
  return Math.floor(total / prime) * prime * highest;
}
