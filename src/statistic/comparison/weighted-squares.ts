// Exact order of two tables by Pearson's statistic: with the margins held it rises with sum n^2 / (R C), and that sum
// times the least common multiples of the row totals and of the column totals is a whole number.
import { greatestCommonDivisor } from '../../numeric/greatest-common-divisor.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Place } from '../contract.js';

export interface CellWeights {
  /** Row-major: weights[cell] = (L_rows / R) (L_columns / C). */
  readonly exact: readonly bigint[];
  /** The same as doubles when every possible sum stays a whole number below 2^53; else null. */
  readonly asDoubles: Float64Array | null;
}

/** O(cells) big-integer work. */
export function cellWeights(live: LiveTable): CellWeights {
  const rowWeights = complements(live.rowTotals);
  const columnWeights = complements(live.columnTotals);
  const exact = rowWeights.flatMap((row) => columnWeights.map((column) => row * column));
  // sum n^2 w <= sum over cells of n (largest n) w; the largest n of a cell is the smaller of its margins.
  let bound = 0n;
  exact.forEach((weight, cell) => {
    const row = live.rowTotals[Math.floor(cell / live.columns)]!;
    const column = live.columnTotals[cell % live.columns]!;
    const largest = BigInt(Math.min(row, column));
    bound += largest * largest * weight;
  });
  return { exact, asDoubles: bound <= BigInt(Number.MAX_SAFE_INTEGER) ? Float64Array.from(exact, Number) : null };
}

/** For each total, the least common multiple of all divided by it. */
function complements(totals: ArrayLike<number>): bigint[] {
  const list = Array.from(totals, BigInt);
  const multiple = list.reduce((lcm, total) => (lcm / greatestCommonDivisor(lcm, total)) * total, 1n);
  return list.map((total) => multiple / total);
}

/** Sign of sum w (n^2 - m^2). */
export function compareWeightedSquares(
  weights: CellWeights,
  counts: ArrayLike<number>,
  observed: ArrayLike<number>,
): Place {
  let difference = 0n;
  for (let cell = 0; cell < counts.length; cell++) {
    const n = counts[cell]!;
    const m = observed[cell]!;
    if (n !== m) difference += weights.exact[cell]! * (BigInt(n) - BigInt(m)) * (BigInt(n) + BigInt(m));
  }
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
}
