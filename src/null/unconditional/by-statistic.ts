// Outcomes ordered by a difference of proportions over its standard error: pooled (the score statistic; Barnard 1945, Suissa
// & Shuster 1985) or unpooled (Wald's form). Doubles decide where they surely can, whole numbers where values lie close.
import { outcomesWhere, type OutcomeSet, type TwoGroupsSeen } from './outcomes.js';

export type OutcomeStatistic = 'score' | 'wald';
/** T at least the observed one, at most it, or at least as far from 0. */
export type Direction = 'upper' | 'lower' | 'distance';

/** T|T| up to a positive constant of the design, as a ratio; denominator 0 stands for an infinite T. */
interface Ratio<Num> {
  readonly top: Num;
  readonly bottom: Num;
}

/** Values of T|T| this near in relative terms are compared in whole numbers; doubles are right to a few 1e-16. */
const near = 1e-12;

/** Outcomes at least as extreme as the one seen. O(firstSize x secondSize). Ties count, decided exactly. */
export function setByStatistic(seen: TwoGroupsSeen, statistic: OutcomeStatistic, direction: Direction): OutcomeSet {
  const { firstSize: n1, secondSize: n2, firstEvents, secondEvents } = seen;
  const inDoubles = squareInDoubles(n1, n2, statistic);
  const inWhole = squareInWholes(n1, n2, statistic);
  const observed = inDoubles(firstEvents, secondEvents);
  const exact = inWhole(firstEvents, secondEvents);
  const sign = direction === 'lower' ? -1 : 1;
  const folded = direction === 'distance';
  const target = folded ? Math.abs(observed) : sign * observed;
  const margin = Number.isFinite(target) ? near * Math.abs(target) : 0;
  return outcomesWhere(seen, (x1, x2) => {
    const value = inDoubles(x1, x2);
    const apart = (folded ? Math.abs(value) : sign * value) - target;
    // Both infinite: equal; apart is then NaN.
    if (apart > margin) return true;
    if (apart < -margin) return false;
    return sign * compare(inWhole(x1, x2), exact, folded) >= 0;
  });
}

function squareInDoubles(n1: number, n2: number, statistic: OutcomeStatistic): (x1: number, x2: number) => number {
  const total = n1 + n2;
  return (x1, x2) => {
    const d = x1 * n2 - x2 * n1;
    if (d === 0) return 0;
    const m = x1 + x2;
    const bottom =
      statistic === 'score' ? m * (total - m) : x1 * (n1 - x1) * ((n2 * n2) / n1) + x2 * (n2 - x2) * ((n1 * n1) / n2);
    return (d * Math.abs(d)) / bottom;
  };
}

function squareInWholes(
  n1: number,
  n2: number,
  statistic: OutcomeStatistic,
): (x1: number, x2: number) => Ratio<bigint> {
  const [a, b] = [BigInt(n1), BigInt(n2)];
  return (x1, x2) => {
    const [x, y] = [BigInt(x1), BigInt(x2)];
    const d = x * b - y * a;
    if (d === 0n) return { top: 0n, bottom: 1n };
    const m = x + y;
    const bottom = statistic === 'score' ? m * (a + b - m) : x * (a - x) * b ** 3n + y * (b - y) * a ** 3n;
    return { top: d < 0n ? -d * d : d * d, bottom };
  };
}

function compare(one: Ratio<bigint>, other: Ratio<bigint>, folded: boolean): number {
  const size = (x: bigint): bigint => (folded && x < 0n ? -x : x);
  const [a, b] = [size(one.top), size(other.top)];
  // An infinite value lies beyond every finite one of its sign.
  if (one.bottom === 0n || other.bottom === 0n) {
    const place = (top: bigint, bottom: bigint): number => (bottom > 0n ? 0 : top < 0n ? -1 : 1);
    return place(a, one.bottom) - place(b, other.bottom);
  }
  const apart = a * other.bottom - b * one.bottom;
  return apart > 0n ? 1 : apart < 0n ? -1 : 0;
}
