// Expected counts of a live table, once, for the statistics that need them all.
import { expectedCount, type LiveTable } from '../table/live-table.js';

/** Row-major expected counts e = R C / n; each within 1.5 units in the last place. */
export function expectedCounts(live: LiveTable): Float64Array {
  const expected = new Float64Array(live.rows * live.columns);
  for (let i = 0; i < live.rows; i++) {
    for (let j = 0; j < live.columns; j++) expected[i * live.columns + j] = expectedCount(live, i, j);
  }
  return expected;
}

/** Adds cell(i, j, n) over a table in row-major order, the order in which every sum of the program is compared. */
export function sumOverCells(
  live: LiveTable,
  counts: ArrayLike<number>,
  cell: (row: number, column: number, count: number) => number,
): number {
  let sum = 0;
  for (let i = 0; i < live.rows; i++) {
    for (let j = 0; j < live.columns; j++) sum += cell(i, j, counts[i * live.columns + j]!);
  }
  return sum;
}

const unit = 2 ** -53;

/**
 * Proven bound for comparing two floating sums over cells. A sum of K non-negative terms, each right to `perTerm` units
 * relative and with the error of its rounded expected count (at most 4 |n - e| units), is off by at most
 * u [(K + perTerm) S + 4 sum |n - e|]; sum |n - e| <= sqrt(n x chi-square-like) by Cauchy-Schwarz (pearson) or Pinsker
 * (likelihood-ratio). Twice that for the two sums, and twice again for what first-order reasoning leaves out.
 */
export function slackOfSum(cells: number, perTerm: number, sum: number, absoluteDeviations: number): number {
  return 4 * unit * ((cells + perTerm) * (sum + 1) + 4 * absoluteDeviations);
}
