// 1/n! for every count a cell can hold, relative to the smallest, as mantissa and exponent: what the probability of a
// table with given margins is a product of.
import { DoubleDouble } from '../../numeric/double-double.js';
import type { LiveTable } from '../../table/live-table.js';

export interface CellFactors {
  /** Per cell, row-major: where its factors start in the flat arrays, and the count they start from. */
  readonly cells: readonly { readonly start: number; readonly lowest: number }[];
  /** In [1, 2) and so that mantissa 2^exponent = lowest! / n!, within one unit in the last place. */
  readonly mantissas: Float64Array;
  readonly exponents: Float64Array;
}

/** O(sum over cells of possible counts). */
export function cellFactors(live: LiveTable): CellFactors {
  const cells: { start: number; lowest: number; highest: number }[] = [];
  let length = 0;
  for (const row of live.rowTotals) {
    for (const column of live.columnTotals) {
      const lowest = Math.max(0, row - (live.total - column));
      const highest = Math.min(row, column);
      cells.push({ start: length, lowest, highest });
      length += highest - lowest + 1;
    }
  }
  const mantissas = new Float64Array(length);
  const exponents = new Float64Array(length);
  const factor = new DoubleDouble();
  for (const { start, lowest, highest } of cells) {
    factor.set(1);
    let exponent = 0;
    for (let count = lowest; count <= highest; count++) {
      if (count > lowest) factor.divide(count);
      while (factor.high < 1) {
        // A division by up to 2^53 is made up for in steps of an exact power of two.
        factor.set(factor.high * 2, factor.low * 2);
        exponent--;
      }
      mantissas[start + count - lowest] = factor.value;
      exponents[start + count - lowest] = exponent;
    }
  }
  return { cells, mantissas, exponents };
}
