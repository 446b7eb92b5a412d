// Exact order of two sums of rational powers of rational numbers: sum n (n N / (R C))^lambda, lambda = a/b. Every term is
// a rational number times a radical prod g^(f/b), 0 <= f < b, over coprime bases g that are no perfect powers. No two
// different such radicals are rational multiples of each other, so (Mordell 1953; Besicovitch 1940 for primes) they are
// linearly independent over the rationals: the sum is 0 if and only if every coefficient is. Where one is not, the value is
// not 0, and working it out to more and more bits must end.
import { productOfRoots } from '../../numeric/big-exp.js';
import type { Rational } from '../../numeric/rational.js';
import type { Place } from '../contract.js';
import { coprimeBase } from './self-powers.js';

/** multiple x count x (count total / (row column))^lambda; all whole, count and totals at least 1. */
export interface PowerTerm {
  readonly multiple: bigint;
  readonly count: bigint;
  readonly row: bigint;
  readonly column: bigint;
}

/** Sign of the sum of the terms. */
export function signOfPowerSum(terms: readonly PowerTerm[], total: bigint, lambda: Rational): Place {
  const groups = byRadical(terms, total, lambda);
  if (groups.length === 0) return 0;
  const common = groups.reduce((all, { below }) => all * below, 1n);
  if (groups.length === 1) return signOf(groups[0]!.above);
  for (let bits = 128; ; bits *= 2) {
    let sum = 0n;
    let error = 0n;
    for (const { above, below, parts } of groups) {
      const root = productOfRoots(parts, lambda.denominator, bits);
      const coefficient = above * (common / below);
      sum += coefficient * root;
      // The root is right to 2^-bits of itself, and to one unit for its last shift.
      error += magnitude(coefficient) * ((root >> BigInt(bits)) + 2n);
    }
    if (magnitude(sum) > error) return signOf(sum);
  }
}

interface RadicalGroup {
  /** The coefficient, above / below, is not 0. */
  above: bigint;
  below: bigint;
  readonly parts: { readonly g: bigint; readonly f: bigint }[];
}

/** Terms with the same radical added up; those that cancel are gone. */
function byRadical(terms: readonly PowerTerm[], total: bigint, { numerator, denominator }: Rational): RadicalGroup[] {
  const bases = coprimeBase([total, ...terms.flatMap(({ count, row, column }) => [count, row, column])]).map(
    lowestRoot,
  );
  const groups = new Map<string, RadicalGroup>();
  for (const { multiple, count, row, column } of terms) {
    let above = multiple * count;
    let below = 1n;
    const parts: { g: bigint; f: bigint }[] = [];
    for (const g of bases) {
      const power = order(count, g) + order(total, g) - order(row, g) - order(column, g);
      const scaled = BigInt(power) * numerator;
      // Floor division: the fraction left over is in [0, 1).
      const f = ((scaled % denominator) + denominator) % denominator;
      const whole = (scaled - f) / denominator;
      if (whole >= 0n) above *= g ** whole;
      else below *= g ** -whole;
      if (f > 0n) parts.push({ g, f });
    }
    const key = parts.map(({ g, f }) => `${g}^${f}`).join(' ');
    const group = groups.get(key);
    if (group === undefined) groups.set(key, { above, below, parts });
    else {
      group.above = group.above * below + above * group.below;
      group.below *= below;
    }
  }
  return [...groups.values()].filter(({ above }) => above !== 0n);
}

/** How often g divides n. */
function order(n: bigint, g: bigint): number {
  let times = 0;
  for (let rest = n; rest % g === 0n; rest /= g) times++;
  return times;
}

/** The smallest whole number of which n >= 2 is a power; any power of a base serves as well as the base for dividing. */
export function lowestRoot(n: bigint): bigint {
  for (let k = n.toString(2).length - 1; k >= 2; k--) {
    const root = BigInt(Math.round(Number(n) ** (1 / k)));
    for (const near of [root - 1n, root, root + 1n]) if (near >= 2n && near ** BigInt(k) === n) return lowestRoot(near);
  }
  return n;
}

const magnitude = (x: bigint): bigint => (x < 0n ? -x : x);
const signOf = (x: bigint): Place => (x > 0n ? 1 : x < 0n ? -1 : 0);
