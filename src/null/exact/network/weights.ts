// Null weights of partial tables. Given its margins a table's probability is proportional to the product over cells of
// p_i^n / n! with any p_i > 0 per row (their powers depend on the margins alone); p_i = R_i / N keeps the weights of likely
// tables near 1. Powers are carried in double-double with a free exponent and rounded once, so that a weight is right to
// about one unit in the last place per cell.
import { DoubleDouble } from '../../../numeric/double-double.js';
import { exponentOf } from '../../../numeric/wide-number.js';
import type { OrientedTable } from './oriented-table.js';

/** Numbers mantissa[n] x 2^exponent[n], mantissa in [1, 2). */
export interface WideTable {
  readonly mantissa: Float64Array;
  readonly exponent: Int32Array;
}

export interface Weights {
  /** Weight of a count in a cell, [column][row][count]; a column's weight is the product down its rows. */
  readonly cells: readonly (readonly Float64Array[])[];
  /** Sum of the weights of all tables with these row totals over these columns, as mantissa x 2^exponent. */
  completions(columns: readonly number[]): Completions;
  /** The sum over the whole null set, by which masses are divided. */
  readonly whole: { readonly mantissa: number; readonly exponent: number };
}

/** Closed form for the weight of everything that can stand in some columns, given what their rows must add up to. */
export interface Completions {
  /** mantissa x 2^exponent, for k row sums; the mantissa is below 2^k. */
  mantissa(rowSums: ArrayLike<number>): number;
  exponent(rowSums: ArrayLike<number>): number;
  /** The same as one double (0 or Infinity when out of its range). */
  value(rowSums: ArrayLike<number>): number;
}

/**
 * @param flat use the same p for every row, so that lists of weights do not depend on the order of rows
 * @param around counts [column][row] at which cell weights are near 1: the expected ones, or the observed ones when these
 *   are so improbable that doubles would run out of exponent
 */
export function nullWeights(table: OrientedTable, flat: boolean, around: readonly (readonly number[])[]): Weights {
  const { rows, rowTotals, columnTotals, total } = table;
  const powers = rowTotals.map((rowTotal) =>
    flat ? powerTerms(rowTotal, 1, rows) : powerTerms(rowTotal, rowTotal, total),
  );
  // Each cell's factor also takes C_j^n, whose product over a column is C_j^(C_j): it then peaks at the expected count.
  const shifts: number[][] = [];
  const cells = columnTotals.map((columnTotal, j) => {
    shifts.push([]);
    return rowTotals.map((rowTotal, i) => {
      const limit = Math.min(rowTotal, columnTotal);
      const terms = flat ? powerTerms(limit, columnTotal, rows) : powerTerms(limit, rowTotal * columnTotal, total);
      const shift = -terms.exponent[around[j]![i]!]!;
      shifts[j]!.push(shift);
      return terms.mantissa.map((mantissa, n) => mantissa * powerOfTwo(terms.exponent[n]! + shift));
    });
  });
  const completions = (columns: readonly number[]): Completions => {
    const arrangements = arrangementsWithin(columns.map((j) => columnTotals[j]!));
    const shift = columns.reduce((sum, j) => sum + shifts[j]!.reduce((a, b) => a + b, 0), arrangements.exponent);
    const mantissa = (rowSums: ArrayLike<number>): number => {
      let product = arrangements.mantissa;
      for (let i = 0; i < rows; i++) product *= powers[i]!.mantissa[rowSums[i]!]!;
      return product;
    };
    const exponent = (rowSums: ArrayLike<number>): number => {
      let sum = shift;
      for (let i = 0; i < rows; i++) sum += powers[i]!.exponent[rowSums[i]!]!;
      return sum;
    };
    return { mantissa, exponent, value: (rowSums) => mantissa(rowSums) * powerOfTwo(exponent(rowSums)) };
  };
  const all = completions(columnTotals.map((_, j) => j));
  return { cells, completions, whole: { mantissa: all.mantissa(rowTotals), exponent: all.exponent(rowTotals) } };
}

export const powerOfTwo = (exponent: number): number =>
  exponent < -1074 ? 0 : exponent > 1023 ? Infinity : 2 ** exponent;

/** (numerator / denominator)^n / n! for n = 0 to limit. */
function powerTerms(limit: number, numerator: number, denominator: number): WideTable {
  const mantissa = new Float64Array(limit + 1);
  const exponent = new Int32Array(limit + 1);
  const term = new DoubleDouble(1);
  let shift = 0;
  for (let n = 0; n <= limit; n++) {
    if (n > 0) term.multiply(numerator).divide(denominator).divide(n);
    const e = exponentOf(term.high);
    if (e !== 0) term.set(term.high * 2 ** -e, term.low * 2 ** -e);
    shift += e;
    mantissa[n] = term.value;
    exponent[n] = shift;
  }
  return { mantissa, exponent };
}

/** (sum of parts)! x product of part^part / product of part!, as mantissa x 2^exponent. */
function arrangementsWithin(parts: readonly number[]): { mantissa: number; exponent: number } {
  const term = new DoubleDouble(1);
  let shift = 0;
  const keepSmall = (): void => {
    if (term.high < 2 ** 200) return;
    const e = exponentOf(term.high);
    term.set(term.high * 2 ** -e, term.low * 2 ** -e);
    shift += e;
  };
  let n = 0;
  for (const part of parts) {
    for (let i = 1; i <= part; i++) {
      n++;
      term.multiply(n).multiply(part).divide(i);
      keepSmall();
    }
  }
  const e = exponentOf(term.high);
  return { mantissa: term.value * 2 ** -e, exponent: shift + e };
}
