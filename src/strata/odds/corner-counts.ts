// How many arrangements of the units give each sum of corners, as whole numbers: for near ties that double-doubles leave open.
import { highestCorner, lowestCorner, type Stratum } from './stratum.js';

/** Ways to reach S = s: coefficients of the product of the strata's generating functions. Slow; asked for near ties only. */
export function cornerCounts(strata: readonly Stratum[]): (s: number) => bigint {
  let lowest = 0;
  let ways: bigint[] = [1n];
  for (const stratum of strata) {
    const one = waysOf(stratum);
    const next = new Array<bigint>(ways.length + one.length - 1).fill(0n);
    ways.forEach((a, i) => one.forEach((b, j) => (next[i + j]! += a * b)));
    ways = next;
    lowest += lowestCorner(stratum);
  }
  return (s) => ways[s - lowest] ?? 0n;
}

/** C(first, k) C(second, events - k) for every possible corner k. */
export function waysOf(stratum: Stratum): bigint[] {
  const { first, second, events } = stratum;
  const lowest = lowestCorner(stratum);
  let ways = binomial(first, lowest) * binomial(second, events - lowest);
  const all: bigint[] = [];
  for (let k = lowest; k <= highestCorner(stratum); k++) {
    all.push(ways);
    ways = (ways * BigInt(first - k) * BigInt(events - k)) / (BigInt(k + 1) * BigInt(second - events + k + 1));
  }
  return all;
}

function binomial(n: number, k: number): bigint {
  let ways = 1n;
  for (let i = 1; i <= Math.min(k, n - k); i++) ways = (ways * BigInt(n - i + 1)) / BigInt(i);
  return ways;
}
