// Exact order of two tables by likelihood ratio: prod n^n of one against the other (0^0 = 1; with the margins held, G2
// is an increasing function of that product). The products are far too large to multiply out.
import { bigLog } from '../../numeric/big-log.js';
import { greatestCommonDivisor } from '../../numeric/greatest-common-divisor.js';
import type { Place } from '../contract.js';
import { countsApart } from './counts-apart.js';

/**
 * Sign of prod(counts^counts) - prod(observed^observed). Equality is decided by factoring all counts over a common
 * coprime base and comparing exponents (no prime factors are needed: Bernstein 2005); where the products differ, their
 * logarithms are worked out to more and more digits until they separate.
 */
export function compareSelfPowers(counts: ArrayLike<number>, observed: ArrayLike<number>): Place {
  const { ours, theirs } = countsApart(counts, observed);
  const exponents = new Map<bigint, bigint>();
  const note = (count: number, sign: bigint): void => {
    if (count < 2) return;
    const n = BigInt(count);
    exponents.set(n, (exponents.get(n) ?? 0n) + sign * n);
  };
  ours.forEach((count) => note(count, 1n));
  theirs.forEach((count) => note(count, -1n));
  if (productIsOne(exponents)) return 0;
  for (let bits = 128; ; bits *= 2) {
    let sum = 0n;
    let weight = 0n;
    for (const [n, exponent] of exponents) {
      sum += exponent * bigLog(n, bits);
      weight += exponent < 0n ? -exponent : exponent;
    }
    const error = weight * BigInt(256 * bits); // bigLog's bound
    if (sum > error) return 1;
    if (sum < -error) return -1;
  }
}

/** Whether prod base^exponent = 1, for bases of at least 2. */
export function productIsOne(powers: ReadonlyMap<bigint, bigint>): boolean {
  const base = coprimeBase([...powers.keys()]);
  return base.every((factor) => {
    let exponent = 0n;
    for (const [n, power] of powers) {
      let rest = n;
      while (rest % factor === 0n) {
        rest /= factor;
        exponent += power;
      }
    }
    return exponent === 0n;
  });
}

/** Pairwise coprime numbers, at least 2, over which every given number factors completely. */
export function coprimeBase(numbers: readonly bigint[]): bigint[] {
  const base: bigint[] = [];
  const waiting = numbers.filter((n) => n > 1n);
  next: while (waiting.length > 0) {
    const n = waiting.pop()!;
    for (let k = 0; k < base.length; k++) {
      const shared = greatestCommonDivisor(n, base[k]!);
      if (shared === 1n) continue;
      const old = base[k]!;
      if (old === n) continue next;
      base.splice(k, 1);
      for (const part of [shared, old / shared, n / shared]) if (part > 1n) waiting.push(part);
      continue next;
    }
    base.push(n);
  }
  return base;
}
