// The linear-by-linear statistic: do rows and columns rise together? A sum of products of scores (Cochran 1954, Armitage
// 1955, Mantel 1963). With the margins held it is an increasing linear function of a sum S over whole scores from 0, in
// which every comparison is made.
import { lowest, toDouble, type Rational } from '../numeric/rational.js';
import type { LiveTable } from '../table/live-table.js';
import type {
  BoundStatistic,
  CellSum,
  Choices,
  LinearForm,
  Place,
  Roles,
  StandardisedForm,
  Statistic,
} from './contract.js';
import { sumOverCells } from './expected.js';
import { standardScores, wholeScores, type WholeScores } from './scores.js';
import { magnitude, order } from './two-by-two.js';

export const trend: Statistic = {
  name: 'trend',
  sided: 'signed',
  shape: 'any',
  words: 'the linear-by-linear trend statistic (the sum of products of row and column scores)',
  formula: 'sum over cells of u_i v_j n_ij, with row scores u and column scores v; centre (sum u_i R_i)(sum v_j C_j)/n',
  range: 'any number, in units of row score times column score; centre: its mean given the margins',
  source: 'Cochran (1954), Armitage (1955), Mantel (1963)',
  limit: 'normal',
  takes: ['scores'],
  forms: [
    {
      name: 'trend-armitage',
      words: 'the n r² form of the trend statistic (its signed root)',
      source: 'Armitage (1955)',
    },
  ],
  bind,
};

function bind(live: LiveTable, _roles: Roles, choices: Choices = {}): BoundStatistic {
  const rows = wholeScores(choices.rowScores ?? standardScores(live.rowIndex));
  const columns = wholeScores(choices.columnScores ?? standardScores(live.columnIndex));
  const moments = momentsOf(live, rows, columns);
  const exactSum = (counts: ArrayLike<number>): bigint => sumExactly(live, rows, columns, counts);
  const observed = exactSum(live.counts);
  const deviation = magnitude(observed * moments.total - moments.product);
  const corner = cornerOf(live, rows, columns);
  const sum = corner === undefined ? cellSum(live, rows, columns, exactSum, observed) : undefined;
  const linear = sum?.slack === 0 ? linearForm(rows, columns, observed, moments) : undefined;
  return {
    value: (counts) => valueInUnits(live, rows, columns, exactSum(counts)),
    ...(sum === undefined ? {} : linear === undefined ? { place: placeBy(live, sum) } : { sum }),
    ...(corner === undefined ? {} : { corner }),
    ...(linear === undefined ? {} : { linear }),
    distance: (counts) => order(magnitude(exactSum(counts) * moments.total - moments.product), deviation),
    standardised: standardisedForms(observed, moments),
  };
}

interface Moments {
  readonly total: bigint;
  /** (sum u R)(sum v C): the mean of S times the total. */
  readonly product: bigint;
  /** n sum u^2 R - (sum u R)^2, and the same of the columns; both positive unless all scores of the side are equal. */
  readonly rowSpread: bigint;
  readonly columnSpread: bigint;
}

function momentsOf(live: LiveTable, rows: WholeScores, columns: WholeScores): Moments {
  const total = BigInt(live.total);
  const side = (scores: readonly bigint[], totals: Float64Array): [bigint, bigint] => {
    let first = 0n;
    let second = 0n;
    scores.forEach((score, k) => {
      const units = BigInt(totals[k]!);
      first += score * units;
      second += score * score * units;
    });
    return [first, total * second - first * first];
  };
  const [rowSum, rowSpread] = side(rows.whole, live.rowTotals);
  const [columnSum, columnSpread] = side(columns.whole, live.columnTotals);
  return { total, product: rowSum * columnSum, rowSpread, columnSpread };
}

function sumExactly(live: LiveTable, rows: WholeScores, columns: WholeScores, counts: ArrayLike<number>): bigint {
  let sum = 0n;
  for (let i = 0; i < live.rows; i++) {
    let line = 0n;
    for (let j = 0; j < live.columns; j++) {
      const count = counts[i * live.columns + j]!;
      if (count !== 0) line += columns.whole[j]! * BigInt(count);
    }
    sum += rows.whole[i]! * line;
  }
  return sum;
}

/** sum (a + b u)(c + d v) n, from S = sum u v n and the margins. */
function valueInUnits(live: LiveTable, rows: WholeScores, columns: WholeScores, sum: bigint): number {
  const add = (x: Rational, y: Rational): Rational =>
    lowest(x.numerator * y.denominator + y.numerator * x.denominator, x.denominator * y.denominator);
  const times = (x: Rational, y: Rational): Rational =>
    lowest(x.numerator * y.numerator, x.denominator * y.denominator);
  const whole = (x: bigint): Rational => ({ numerator: x, denominator: 1n });
  const weigh = (scores: readonly bigint[], totals: Float64Array): bigint =>
    scores.reduce((all, score, k) => all + score * BigInt(totals[k]!), 0n);
  return toDouble(
    [
      times(times(rows.step, columns.step), whole(sum)),
      times(times(rows.least, columns.least), whole(BigInt(live.total))),
      times(times(rows.least, columns.step), whole(weigh(columns.whole, live.columnTotals))),
      times(times(columns.least, rows.step), whole(weigh(rows.whole, live.rowTotals))),
    ].reduce(add),
  );
}

/** In a 2x2 table S is the cell where both scores are 1; undefined elsewhere and where a side has one score only. */
function cornerOf(live: LiveTable, rows: WholeScores, columns: WholeScores): number | undefined {
  if (live.rows !== 2 || live.columns !== 2) return undefined;
  const row = rows.whole.indexOf(1n);
  const column = columns.whole.indexOf(1n);
  return row < 0 || column < 0 ? undefined : row * 2 + column;
}

/** Sums below this, and twice their distance from the centre, are whole or half numbers that doubles hold. */
const exactBelow = 2n ** 51n;

function cellSum(
  live: LiveTable,
  rows: WholeScores,
  columns: WholeScores,
  exactSum: (counts: ArrayLike<number>) => bigint,
  observedSum: bigint,
): CellSum {
  const u = Float64Array.from(rows.whole, Number);
  const v = Float64Array.from(columns.whole, Number);
  const largest = (scores: readonly bigint[]): bigint => scores.reduce((most, x) => (x > most ? x : most));
  const bound = largest(rows.whole) * largest(columns.whole) * BigInt(live.total);
  const cell = (row: number, column: number, count: number): number => u[row]! * v[column]! * count;
  return {
    cell,
    observed: sumOverCells(live, live.counts, cell),
    // Five roundings a term (two scores, two products and one sum each), cells terms; both sums; twice for good measure.
    slack: bound < exactBelow ? 0 : 4 * 2 ** -53 * (live.rows * live.columns + 5) * Number(bound),
    decide: (counts) => order(exactSum(counts), observedSum),
  };
}

/** Scores of so many digits that sums are rounded: the sum decides where it can; no engine adds it up. */
const placeBy =
  (live: LiveTable, { cell, observed, slack, decide }: CellSum) =>
  (counts: ArrayLike<number>): Place => {
    const difference = sumOverCells(live, counts, cell) - observed;
    return difference > slack ? 1 : difference < -slack ? -1 : decide(counts);
  };

/** The value mirrored in the centre is 2 E - S; a fraction is pushed to the half above its floor: no S lies between. */
function linearForm(rows: WholeScores, columns: WholeScores, observed: bigint, moments: Moments): LinearForm {
  const numerator = 2n * moments.product - observed * moments.total;
  const quotient = numerator / moments.total;
  const floor = numerator < 0n && quotient * moments.total !== numerator ? quotient - 1n : quotient;
  const mirror = Number(floor) + (floor * moments.total === numerator ? 0 : 0.5);
  return {
    rowScores: Float64Array.from(rows.whole, Number),
    columnScores: Float64Array.from(columns.whole, Number),
    observed: Number(observed),
    low: Math.min(Number(observed), mirror),
    high: Math.max(Number(observed), mirror),
  };
}

/** (n - 1) r^2 and n r^2 as signed roots: r^2 = (n S - U V)^2 / (row spread x column spread). */
function standardisedForms(observed: bigint, moments: Moments): StandardisedForm[] {
  const { total, product, rowSpread, columnSpread } = moments;
  const deviation = observed * total - product;
  const root = (times: bigint): number => {
    if (deviation === 0n) return 0;
    const size = Math.sqrt(toDouble(lowest(times * deviation * deviation, rowSpread * columnSpread)));
    return deviation > 0n ? size : -size;
  };
  if (rowSpread === 0n || columnSpread === 0n) return []; // all scores of a side equal: nothing varies
  return [
    { name: 'trend', value: root(total - 1n) },
    { name: 'trend-armitage', value: root(total) },
  ];
}

/** Whether all scores of a side are equal, so that every table has the same value. */
export const hasOneScoreOnly = (scores: readonly Rational[]): boolean =>
  wholeScores(scores).whole.every((score) => score === 0n);
