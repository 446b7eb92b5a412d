// The power-divergence family (Cressie & Read 1984): one exponent runs from likelihood-ratio (0) through their own
// suggestion (2/3) to pearson (1) and beyond.
import type { Rational } from '../numeric/rational.js';
import { toDouble } from '../numeric/rational.js';
import type { LiveTable } from '../table/live-table.js';
import { signOfPowerSum, type PowerTerm } from './comparison/radical-sums.js';
import type { BoundStatistic, Choices, Place, Roles, Statistic } from './contract.js';
import { expectedCounts, sumOverCells } from './expected.js';
import { likelihoodRatio } from './likelihood-ratio.js';
import { pearson } from './pearson.js';

/** Cressie & Read's own recommendation. */
export const standardLambda: Rational = { numerator: 2n, denominator: 3n };

export const powerDivergence: Statistic = {
  name: 'power-divergence',
  sided: 'upper',
  shape: 'any',
  words: 'the power-divergence statistic (one of a family, chosen by its exponent lambda)',
  formula:
    '2 / (lambda (lambda + 1)) sum over cells of n_ij ((n_ij / e_ij)^lambda - 1); lambda 1: pearson, 0: likelihood-ratio',
  range: '0 (counts as expected) upwards',
  source: 'Cressie & Read (1984)',
  limit: 'chi-square',
  takes: ['lambda'],
  bind: (live, roles, choices: Choices = {}) => bindPower(live, roles, choices.lambda ?? standardLambda),
};

/** lambda > -1: with -1 or less every table with an empty cell would lie infinitely far out. */
export function bindPower(live: LiveTable, roles: Roles, lambda: Rational): BoundStatistic {
  if (lambda.numerator === 0n) return likelihoodRatio.bind(live, roles);
  if (lambda.numerator === lambda.denominator) return pearson.bind(live, roles);
  const expected = expectedCounts(live);
  const power = toDouble(lambda);
  const width = live.columns;
  const cell = (row: number, column: number, count: number): number =>
    powerTerm(count, expected[row * width + column]!, power);
  const observed = sumOverCells(live, live.counts, cell);
  return {
    value: (counts) => sumOverCells(live, counts, cell),
    sum: {
      cell,
      observed,
      slack: slackOf(live, power, observed),
      decide: (counts) => comparePowers(live, lambda, counts),
    },
  };
}

/**
 * 2 / (lambda + 1) [n ((n/e)^lambda - 1) / lambda - (n - e)], at least 0; the parts n - e add to nothing over a table.
 * Written with expm1 so that a small lambda costs no digits.
 */
function powerTerm(count: number, expected: number, lambda: number): number {
  const factor = 2 / (lambda + 1);
  if (count === 0) return factor * expected;
  const grown = (count * Math.expm1(lambda * Math.log(count / expected))) / lambda;
  return Math.max(0, factor * (grown - (count - expected)));
}

/**
 * Bound for comparing two floating sums, as CellSum wants it. A cell's terms are off by at most (4 + 4 |ln(n/e)|) units of
 * n (n/e)^lambda + n + e; over a table the first adds to n + lambda (lambda + 1) S / 2, the others to n each, and |ln(n/e)| <=
 * ln n. Twice for the two sums, and twice again for what first-order reasoning leaves out.
 */
function slackOf({ total, rows, columns }: LiveTable, lambda: number, observed: number): number {
  const size = 3 * total + (Math.abs(lambda * (lambda + 1)) * (observed + 1)) / 2;
  const terms = (2 / (lambda + 1)) * size * (4 + 4 * Math.log(total));
  return 4 * 2 ** -53 * (terms + (rows * columns + 8) * (observed + 1));
}

/** S rises with sign(lambda) sum n (n N / (R C))^lambda, over the cells in which the tables differ. */
function comparePowers(live: LiveTable, lambda: Rational, counts: ArrayLike<number>): Place {
  const terms = new Map<string, { multiple: bigint; count: bigint; row: bigint; column: bigint }>();
  const note = (count: number, i: number, j: number, multiple: bigint): void => {
    if (count === 0) return; // n^(lambda + 1) is 0
    const [row, column] = [live.rowTotals[i]!, live.columnTotals[j]!];
    const key = `${count},${Math.min(row, column)},${Math.max(row, column)}`;
    const known = terms.get(key);
    if (known !== undefined) known.multiple += multiple;
    else terms.set(key, { multiple, count: BigInt(count), row: BigInt(row), column: BigInt(column) });
  };
  for (let i = 0; i < live.rows; i++) {
    for (let j = 0; j < live.columns; j++) {
      const cell = i * live.columns + j;
      if (counts[cell] === live.counts[cell]) continue;
      note(counts[cell]!, i, j, 1n);
      note(live.counts[cell]!, i, j, -1n);
    }
  }
  const left: PowerTerm[] = [...terms.values()].filter(({ multiple }) => multiple !== 0n);
  const sign = signOfPowerSum(left, BigInt(live.total), lambda);
  return lambda.numerator > 0n || sign === 0 ? sign : (-sign as Place);
}
