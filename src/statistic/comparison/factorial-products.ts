// Exact order of two tables by their probability: prod n! of one against the other, in whole numbers.
import type { Place } from '../contract.js';
import { countsApart } from './counts-apart.js';

/**
 * Sign of prod(counts!) - prod(observed!). With the shared counts struck out and the rest paired in order of size, the
 * ratio is a product of runs of whole numbers; its two sides are multiplied out and compared. Cost grows with the
 * distance between the tables, not with their totals.
 */
export function compareFactorialProducts(counts: ArrayLike<number>, observed: ArrayLike<number>): Place {
  const { ours, theirs } = countsApart(counts, observed);
  if (ours.length === 0) return 0;
  let above = 1n;
  let below = 1n;
  for (let k = 0; k < ours.length; k++) {
    const a = ours[k]!;
    const b = theirs[k]!;
    if (a > b) above *= productOfRun(BigInt(b) + 1n, BigInt(a));
    else below *= productOfRun(BigInt(a) + 1n, BigInt(b));
  }
  return above > below ? 1 : above < below ? -1 : 0;
}

/** from x (from + 1) x ... x to, halved again and again so that the factors multiplied are of like length. */
function productOfRun(from: bigint, to: bigint): bigint {
  if (from > to) return 1n;
  if (to - from < 16n) {
    let product = from;
    for (let k = from + 1n; k <= to; k++) product *= k;
    return product;
  }
  const middle = (from + to) >> 1n;
  return productOfRun(from, middle) * productOfRun(middle + 1n, to);
}
