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

/** Largest sum of exponents over counts that add up to each total, for totals 0 to limit: what one line can reach. */
export function largestExponents(exponents: Float64Array, limit: number): Float64Array {
  const largest = new Float64Array(limit + 1);
  for (let total = 1; total <= limit; total++) {
    let best = 0;
    for (let n = 0; n <= total && n < exponents.length; n++) {
      const reach = exponents[n]! + (n === 0 ? largest[total - 1]! : largest[total - n]!);
      if (reach > best) best = reach;
    }
    largest[total] = best;
  }
  return largest;
}
