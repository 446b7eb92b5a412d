// For every number m of discordant pairs: the probability that m fair coins are split at least as unevenly as the observed pairs, by
// (2x - m) / sqrt(m). Thresholds are found in whole numbers; the tails follow one another in double-double.
import { DoubleDouble } from '../numeric/double-double.js';

export type PairsTail = 'upper' | 'lower' | 'both';

/** @returns f(m) for m = 0, ..., pairs; upper: more of them went there. Relative error below 1e-14. */
export function tailsByDiscordant(there: number, back: number, pairs: number, tail: PairsTail): Float64Array {
  const difference = there - back;
  if (tail === 'both') {
    if (difference === 0) return new Float64Array(pairs + 1).fill(1);
    return oneSided(Math.abs(difference), there + back, pairs, true).map((p) => 2 * p);
  }
  const towards = tail === 'upper' ? difference : -difference;
  if (towards > 0) return oneSided(towards, there + back, pairs, true);
  // At or below the middle: all that is not strictly further out on the other side.
  return oneSided(-towards, there + back, pairs, false).map((p) => 1 - p);
}

/** P((2X - m)/sqrt(m) >= d/sqrt(of)), or > where ties do not count; the value of no coins at all is 0. d >= 0. */
function oneSided(d: number, of: number, pairs: number, ties: boolean): Float64Array {
  const tails = new Float64Array(pairs + 1);
  const square = BigInt(d) ** 2n;
  const total = BigInt(Math.max(1, of));
  const reaches = (difference: number, m: number): boolean => {
    const ours = BigInt(difference) ** 2n * total;
    const theirs = square * BigInt(m);
    return ties ? ours >= theirs && (difference > 0 || d === 0) : ours > theirs;
  };
  /** The smallest x whose difference 2x - m reaches. */
  const threshold = (m: number): number => {
    let x = Math.max(Math.ceil(m / 2), Math.floor((m + d * Math.sqrt(m / Math.max(1, of))) / 2) - 1);
    while (x > Math.ceil(m / 2) && reaches(2 * (x - 1) - m, m)) x--;
    while (!reaches(2 * x - m, m)) x++;
    return x;
  };
  const point = new DoubleDouble();
  const tail = new DoubleDouble();
  let x = -1;
  for (let m = 1; m <= pairs; m++) {
    const needed = threshold(m);
    if (x < 0) {
      if (needed > m) continue;
      x = m;
      point.set(2 ** -m);
      tail.set(2 ** -m);
    } else {
      // One more coin: P(X >= x) gains half of P(X = x - 1).
      const before = new DoubleDouble(point.high, point.low)
        .multiply(x)
        .divide(m - x)
        .multiply(0.5);
      tail.addPair(before.high, before.low);
      point.multiply(m).divide(2 * (m - x));
    }
    while (x < needed) {
      tail.addPair(-point.high, -point.low);
      point.multiply(m - x).divide(x + 1);
      x++;
    }
    while (x > needed) {
      point.multiply(x).divide(m - x + 1);
      x--;
      tail.addPair(point.high, point.low);
    }
    tails[m] = tail.value;
  }
  return tails;
}
