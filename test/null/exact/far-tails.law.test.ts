// Probabilities around 1e-200 of tables larger than 2x2, against whole numbers: every table with the margins is listed, those
// that doubles cannot tell from the tail are compared exactly, and the tail is weighed in whole numbers. What all tables
// weigh together is known: the tables of one set of row totals share n! / prod R_i! ways. It shares no code with the engines.
import { describe, expect, it } from 'vitest';
import { factorial, toNumber } from '../../../fixtures/reference/generator/oracle.js';
import { answer } from '../../../src/answer.js';
import { relativeDifference } from '../../helpers/tables.js';

type Counts = readonly number[];

interface Margins {
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  readonly total: number;
}

/** A statistic by what each cell gives, in doubles and exactly: whole numbers, rounded down to 2^-300 where they are roots.
 *  `row` and `column` are totals, `weight` is the product of the cell's scores. */
interface Rule {
  readonly join: 'sum' | 'largest' | 'product';
  readonly rough: (count: number, row: number, column: number, margins: Margins, weight: number) => number;
  readonly exact: (count: bigint, row: bigint, column: bigint, margins: Margins, weight: bigint) => bigint;
}

const root = (degree: bigint, of: bigint): bigint => {
  if (of < 2n) return of;
  // Newton's steps from above; they fall until the floor of the root is reached.
  let guess = 1n << (BigInt(of.toString(2).length) / degree + 1n);
  for (;;) {
    const next = ((degree - 1n) * guess + of / guess ** (degree - 1n)) / degree;
    if (next >= guess) return guess;
    guess = next;
  }
};
const places = 300n;
const product = (values: readonly number[]): bigint => values.reduce((all, n) => all * BigInt(n), 1n);
const logFactorial = (n: number): number => {
  let sum = 0;
  for (let k = 2; k <= n; k++) sum += Math.log(k);
  return sum;
};

const rules: Record<string, Rule> = {
  pearson: {
    join: 'sum',
    rough: (n, row, column) => (n * n) / (row * column),
    exact: (n, row, column, { rows, columns }) => (n * n * product(rows) * product(columns)) / (row * column),
  },
  'likelihood-ratio': {
    join: 'product',
    rough: (n) => (n === 0 ? 0 : n * Math.log(n)),
    exact: (n) => n ** n,
  },
  probability: { join: 'product', rough: logFactorial, exact: (n) => factorial(Number(n)) },
  trend: {
    join: 'sum',
    rough: (n, _row, _column, _margins, weight) => n * weight,
    exact: (n, _row, _column, _margins, weight) => n * weight,
  },
  'freeman-tukey': {
    join: 'sum',
    // 4 sum (sqrt n - sqrt e)^2 falls with sum sqrt(n e).
    rough: (n, row, column) => -Math.sqrt(n * row * column),
    exact: (n, row, column) => -root(2n, (n * row * column) << (2n * places)),
  },
  'power-divergence': {
    join: 'sum',
    // Its exponent is 2/3 unless another is given.
    rough: (n, row, column) => n * Math.cbrt((n / (row * column)) ** 2),
    exact: (n, row, column) => root(3n, ((n ** 5n) << (3n * places)) / (row * column) ** 2n),
  },
  'max-residual': {
    join: 'largest',
    rough: (n, row, column, { total }) =>
      Math.abs(n * total - row * column) / Math.sqrt(row * column * (total - row) * (total - column)),
    exact: (n, row, column, { total }) => {
      const all = BigInt(total);
      const away = n * all - row * column;
      return ((away * away) << (2n * places)) / (row * column * (all - row) * (all - column));
    },
  },
};

const marginsOf = (table: readonly Counts[]): Margins => {
  const sum = (values: Counts): number => values.reduce((a, b) => a + b, 0);
  const rows = table.map(sum);
  return { rows, columns: table[0]!.map((_, j) => sum(table.map((row) => row[j]!))), total: sum(rows) };
};

/** Row-major counts of the tables that doubles put in the tail or cannot tell from it, for each rule. */
function candidates(table: readonly Counts[], names: readonly string[]): Map<string, Counts[]> {
  const margins = marginsOf(table);
  const { rows, columns } = margins;
  const width = columns.length;
  const values = names.map((name) =>
    rows.flatMap((row, i) =>
      columns.map((column, j) =>
        Float64Array.from({ length: Math.min(row, column) + 1 }, (_, n) =>
          rules[name]!.rough(n, row, column, margins, (i + 1) * (j + 1)),
        ),
      ),
    ),
  );
  const isLargest = names.map((name) => rules[name]!.join === 'largest');
  const joined = (s: number, before: number, cell: number, n: number): number => {
    const value = values[s]![cell]![n]!;
    return isLargest[s] ? Math.max(before, value) : before + value;
  };
  const none = names.map((_, s) => (isLargest[s] ? -Infinity : 0));
  const reach = names.map((_, s) => table.flat().reduce((sum, n, cell) => joined(s, sum, cell, n), none[s]!));
  const least = reach.map((value) => value - Math.abs(value) * 1e-9);
  const found = new Map(names.map((name) => [name, [] as Counts[]]));
  const counts = new Array<number>(rows.length * width).fill(0);
  const left = [...columns];
  // Sums so far, one line for each cell.
  const sums = counts.map(() => new Float64Array(names.length));

  function fill(cell: number, rowLeft: number): void {
    const [i, j] = [Math.floor(cell / width), cell % width];
    const lastRow = i === rows.length - 1;
    const lastColumn = j === width - 1;
    const lowest = lastRow ? left[j]! : lastColumn ? rowLeft : 0;
    const highest = lastRow || lastColumn ? lowest : Math.min(rowLeft, left[j]!);
    if (lowest > left[j]! || lowest > rowLeft) return;
    for (let n = lowest; n <= highest; n++) {
      counts[cell] = n;
      for (let s = 0; s < names.length; s++) {
        sums[cell]![s] = joined(s, cell === 0 ? none[s]! : sums[cell - 1]![s]!, cell, n);
      }
      if (cell === counts.length - 1) {
        for (let s = 0; s < names.length; s++)
          if (sums[cell]![s]! >= least[s]!) found.get(names[s]!)!.push([...counts]);
        continue;
      }
      left[j]! -= n;
      fill(cell + 1, lastColumn ? rows[i + 1]! : rowLeft - n);
      left[j]! += n;
    }
  }
  fill(0, rows[0]!);
  return found;
}

function exactly(name: string, counts: Counts, margins: Margins): bigint {
  const { join, exact } = rules[name]!;
  const width = margins.columns.length;
  const values = counts.map((n, cell) => {
    const [i, j] = [Math.floor(cell / width), cell % width];
    return exact(BigInt(n), BigInt(margins.rows[i]!), BigInt(margins.columns[j]!), margins, BigInt((i + 1) * (j + 1)));
  });
  if (join === 'product') return values.reduce((all, value) => all * value, 1n);
  return join === 'sum' ? values.reduce((all, value) => all + value, 0n) : values.reduce((a, b) => (a > b ? a : b));
}

/** Roots are rounded down, so that ties of different cells may differ by a few units; nothing else comes so near. */
const sameness = 1n << 40n;

function tail(name: string, table: readonly Counts[], tables: readonly Counts[]): { tied: bigint; above: bigint } {
  const margins = marginsOf(table);
  const observed = exactly(name, table.flat(), margins);
  const ways = margins.columns.reduce((all, n) => all * factorial(n), 1n);
  const found = { tied: 0n, above: 0n };
  const isRoot = ['freeman-tukey', 'power-divergence', 'max-residual'].includes(name);
  for (const counts of tables) {
    const difference = exactly(name, counts, margins) - observed;
    const weight = ways / counts.reduce((all, n) => all * factorial(n), 1n);
    if (isRoot ? difference > -sameness && difference < sameness : difference === 0n) found.tied += weight;
    else if (difference > 0n) found.above += weight;
  }
  return found;
}

/** The tails of the others are not this far out in every table. */
const farOut = Object.keys(rules).filter((name) => name !== 'max-residual' && name !== 'trend');
const cases: [shape: string, table: number[][], names: string[]][] = [
  ['3x3', [[100, 2, 0], [1, 135, 0], [0, 1, 231]], farOut],
  ['2x4', [[171, 2, 160, 1], [1, 175, 0, 168]], farOut],
  ['2x3', [[189, 1, 0], [1, 310, 300]], Object.keys(rules)],
]; // prettier-ignore

describe.each(cases)('a p around 1e-200 of a %s table', (_shape, table, names) => {
  const near = candidates(table, names);
  const { rows, total } = marginsOf(table);
  const whole = factorial(total) / rows.reduce((all, n) => all * factorial(n), 1n);

  it.each(names)('is exact to 1e-12: %s', async (statistic) => {
    const { tied, above } = tail(statistic, table, near.get(statistic)!);
    const { pValues } = await answer({ counts: table }, { statistic, tail: 'upper', method: 'exact', effort: 1e10 });
    const [{ p, strict, tied: ties, errors }] = pValues as [(typeof pValues)[number]];
    expect(errors).toEqual([{ kind: 'rounding', relative: expect.any(Number) }]);
    expect(p).toBeLessThan(1e-150);
    expect(relativeDifference(p!, toNumber(tied + above, whole))).toBeLessThan(1e-12);
    expect(relativeDifference(ties!, toNumber(tied, whole))).toBeLessThan(1e-12);
    expect(relativeDifference(strict!, toNumber(above, whole))).toBeLessThan(1e-12);
  });
});
