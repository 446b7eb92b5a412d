// Turns a sum over cells into whole numbers that doubles add without rounding, so that partial sums do not depend on the
// order of adding and equal partial tables can be merged by equality. Three forms, the first that fits:
//   exact   the statistic's own sum is in whole numbers below 2^53 (slack 0): level means tied;
//   keyed   for products of n! or n^n: a value linear in the exponents of primes and, beside it, a key from which the
//           exponents can be read back (mixed radix below 2^53): keys agree if and only if the products do;
//   scaled  the statistic's terms rounded to multiples of a power of two: level within `slack` is only a near tie.
import type { CellSum } from '../../../statistic/contract.js';
import type { OrientedTable } from './oriented-table.js';
import {
  factorialBound,
  factorialExponents,
  primesUpTo,
  selfPowerBound,
  selfPowerExponents,
} from './prime-exponents.js';

export interface Encoding {
  readonly form: 'exact' | 'keyed' | 'scaled';
  /** [column][row][count]: whole numbers; sums up to the observed one are exact. */
  readonly values: readonly (readonly Float64Array[])[];
  /** [column][row][count] for the keyed form, else null. */
  readonly keys: readonly (readonly Float64Array[])[] | null;
  readonly observedValue: number;
  readonly observedKey: number;
  /** Values differing by more are certainly in that order; 0 for the exact form. */
  readonly slack: number;
  /** The same function of the count in every cell: lists of partial sums then do not depend on the order of rows. */
  readonly symmetric: boolean;
}

/** The exponents that tell tables apart exactly, for the statistics that are products over cells. */
export interface ExponentRule {
  /** Exponent of the prime for counts 0 to limit. */
  readonly exponents: (prime: number, limit: number) => Float64Array;
  /** At least the sum of exponents over counts with this total. */
  readonly bound: (prime: number, total: number) => number;
}
const rules: Readonly<Record<string, ExponentRule>> = {
  probability: { exponents: factorialExponents, bound: factorialBound },
  'likelihood-ratio': { exponents: selfPowerExponents, bound: selfPowerBound },
};
export const exponentRule = (statistic: string): ExponentRule | null => rules[statistic] ?? null;

export function encode(table: OrientedTable, cells: CellSum, statistic: string): Encoding {
  if (cells.slack === 0) return encodeExact(table, cells);
  const rule = exponentRule(statistic);
  return (rule === null ? null : encodeKeyed(table, rule)) ?? encodeScaled(table, cells);
}

type CellFunction = (row: number, column: number, count: number) => number;

function tabulate(table: OrientedTable, cell: CellFunction): Float64Array[][] {
  return table.columnTotals.map((columnTotal, column) =>
    table.rowTotals.map((rowTotal, row) => {
      const [liveRow, liveColumn] = table.place(row, column);
      return Float64Array.from({ length: Math.min(rowTotal, columnTotal) + 1 }, (_, count) =>
        cell(liveRow, liveColumn, count),
      );
    }),
  );
}

function sumObserved(table: OrientedTable, cells: readonly (readonly Float64Array[])[]): number {
  let sum = 0;
  table.observed.forEach((column, j) => column.forEach((count, i) => (sum += cells[j]![i]![count]!)));
  return sum;
}

function encodeExact(table: OrientedTable, cells: CellSum): Encoding {
  return {
    form: 'exact',
    values: tabulate(table, cells.cell),
    keys: null,
    observedValue: cells.observed,
    observedKey: 0,
    slack: 0,
    symmetric: false,
  };
}

/** Counts beyond this have so many primes that no key fits; looking would only cost time. */
const largestKeyedCount = 120;
const valueBits = 51;

function encodeKeyed(table: OrientedTable, rule: ExponentRule): Encoding | null {
  const largestCount = Math.min(table.rowTotals.at(-1)!, Math.max(...table.columnTotals));
  if (largestCount > largestKeyedCount) return null;
  const primes: { prime: number; exponents: Float64Array; step: number; bound: number }[] = [];
  let radixProduct = 1;
  for (const prime of primesUpTo(largestCount)) {
    const exponents = rule.exponents(prime, largestCount);
    const reach = (totals: readonly number[]): number =>
      totals.reduce((sum, total) => sum + rule.bound(prime, total), 0);
    const bound = Math.min(reach(table.rowTotals), reach(table.columnTotals));
    const step = commonStep(exponents);
    radixProduct *= Math.floor(bound / step) + 1;
    if (radixProduct >= 2 ** 53) return null;
    primes.push({ prime, exponents, step, bound });
  }

  const exponentSum = primes.reduce((sum, { bound }) => sum + bound, 0);
  const logBound = primes.reduce((sum, { bound, prime }) => sum + bound * Math.log(prime), 1);
  const scale = 2 ** (valueBits - Math.ceil(Math.log2(logBound)));
  const value = new Float64Array(largestCount + 1);
  const key = new Float64Array(largestCount + 1);
  let place = 1;
  for (const { prime, exponents, step, bound } of primes) {
    const log = Math.round(Math.log(prime) * scale);
    for (let n = 0; n <= largestCount; n++) {
      value[n]! += exponents[n]! * log;
      key[n]! += (exponents[n]! / step) * place;
    }
    place *= Math.floor(bound / step) + 1;
  }
  const values = tabulate(table, (_, __, count) => value[count]!);
  const keys = tabulate(table, (_, __, count) => key[count]!);
  return {
    form: 'keyed',
    values,
    keys,
    observedValue: sumObserved(table, values),
    observedKey: sumObserved(table, keys),
    // Each logarithm is off by at most 0.6 units; two tables' exponents differ by at most `exponentSum` in all, up or down.
    slack: Math.ceil(1.2 * exponentSum) + 2,
    symmetric: true,
  };
}

/** Greatest number that divides every exponent (p for n^n, since p divides n wherever its exponent is not 0). */
function commonStep(exponents: Float64Array): number {
  let step = 0;
  for (const exponent of exponents) {
    let [a, b] = [exponent, step];
    while (b !== 0) [a, b] = [b, a % b];
    step = a;
  }
  return Math.max(1, step);
}

function encodeScaled(table: OrientedTable, cells: CellSum): Encoding {
  const terms = tabulate(table, cells.cell);
  const largest = largestTerms(terms);
  // Non-negative terms: any part of a table that is not above the observed sum stays below it, so that its bits suffice.
  const range = largest.anyNegative ? largest.sum : Math.abs(cells.observed);
  const scale = 2 ** (valueBits - 1 - Math.ceil(Math.log2(range + 1)));
  const values = terms.map((rows) => rows.map((row) => row.map((term) => Math.round(term * scale))));
  const cellCount = table.rows * table.columns;
  return {
    form: 'scaled',
    values,
    keys: null,
    observedValue: sumObserved(table, values),
    observedKey: 0,
    slack: Math.ceil(cells.slack * scale + cellCount) + 2,
    symmetric: false,
  };
}

function largestTerms(terms: readonly (readonly Float64Array[])[]): { sum: number; anyNegative: boolean } {
  let sum = 0;
  let anyNegative = false;
  for (const row of terms.flat()) {
    let largest = 0;
    for (const term of row) {
      if (term < 0) anyNegative = true;
      largest = Math.max(largest, Math.abs(term));
    }
    sum += largest;
  }
  return { sum, anyNegative };
}
