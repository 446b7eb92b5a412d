// Difference of two proportions over its unpooled standard error (Wald's form).
// With both margins held it rises strictly with the corner count a: writing d = a - E(a), T^2 is proportional to
// d^2 / (A + B d - C d^2) with C > 0, that is to 1 / (A/d^2 + B/d - C); as a function of 1/d the denominator turns only
// where the variance A + B d - C d^2 would be negative. So its one-tailed p is that of every statistic rising with a.
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Roles, Statistic } from './contract.js';
import { order, scaledDeviation, twoGroups, type TwoGroups } from './two-by-two.js';

export const wald: Statistic = {
  name: 'wald',
  sided: 'signed',
  shape: '2x2',
  words: 'the Wald statistic (difference of proportions over its unpooled standard error)',
  formula: '(p1 - p2) / sqrt(p1 (1 - p1)/n1 + p2 (1 - p2)/n2); standard error 0: 0 if p1 = p2, else + or - infinity',
  range: '-infinity to infinity; centre 0',
  source: 'unpooled form, after Wald (1943)',
  limit: 'normal',
  takes: ['roles'],
  bind,
};

/** T^2 as a ratio of whole numbers; the denominator is 0 where the standard error is. */
interface Squared {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

/**
 * p1 - p2 = D / (n1 n2), D = a n - n1 m; variance = [a (n1 - a) n2^3 + b (n2 - b) n1^3] / (n1 n2)^3;
 * so T^2 = D^2 n1 n2 / [...].
 */
function squared(groups: TwoGroups, corner: number): Squared {
  const deviation = scaledDeviation(groups, corner);
  const first = BigInt(groups.first);
  const second = BigInt(groups.second);
  const a = BigInt(corner);
  const b = BigInt(groups.events) - a;
  return {
    numerator: deviation * deviation * first * second,
    denominator: a * (first - a) * second ** 3n + b * (second - b) * first ** 3n,
  };
}

function compareSquares(x: Squared, y: Squared): -1 | 0 | 1 {
  if (x.denominator === 0n || y.denominator === 0n) {
    const infinite = ({ numerator, denominator }: Squared): bigint => (denominator === 0n && numerator > 0n ? 1n : 0n);
    if (infinite(x) !== infinite(y) || infinite(x) === 1n) return order(infinite(x), infinite(y));
    // A zero standard error with equal proportions counts as T = 0.
    return order(x.denominator === 0n ? 0n : x.numerator, y.denominator === 0n ? 0n : y.numerator);
  }
  return order(x.numerator * y.denominator, y.numerator * x.denominator);
}

function valueAt(groups: TwoGroups, corner: number): number {
  const deviation = Number(scaledDeviation(groups, corner));
  if (deviation === 0) return 0;
  const { first, second, events } = groups;
  const p1 = corner / first;
  const p2 = (events - corner) / second;
  const variance = (p1 * ((first - corner) / first)) / first + (p2 * ((second - events + corner) / second)) / second;
  return deviation / first / second / Math.sqrt(variance);
}

function bind(live: LiveTable, roles: Roles): BoundStatistic {
  const groups = twoGroups(live, roles);
  const observed = squared(groups, live.counts[groups.corner]!);
  return {
    corner: groups.corner,
    value: (counts) => valueAt(groups, counts[groups.corner]!),
    distance: (counts) => compareSquares(squared(groups, counts[groups.corner]!), observed),
  };
}
