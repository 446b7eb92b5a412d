// Cramer's (1946) V, and the form whose bias under independence is taken out (Bergsma 2013).
import type { LiveTable } from '../../table/live-table.js';

/** Pearson's chi-square over n: sum over cells of (p_ij - p_i p_j)^2 / (p_i p_j). */
function meanSquareContingency(
  { rows, columns, rowTotals, columnTotals, total }: LiveTable,
  counts: ArrayLike<number>,
): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const expected = (rowTotals[i]! / total) * columnTotals[j]!;
      if (expected === 0) continue;
      const distance = counts[i * columns + j]! - expected;
      sum += (distance * distance) / expected;
    }
  }
  return sum / total;
}

/** sqrt(phi^2 / min(r - 1, c - 1)): 0 to 1. At least two rows and columns with counts. */
export const cramerV = (live: LiveTable): number =>
  Math.sqrt(meanSquareContingency(live, live.counts) / (Math.min(live.rows, live.columns) - 1));

/**
 * sqrt(max(0, phi^2 - (r-1)(c-1)/(n-1)) / min(r' - 1, c' - 1)) with r' = r - (r-1)^2/(n-1) and c' likewise: 0 to 1.
 * undefined where n is too small for the correction, which then leaves nothing to divide by.
 */
export function correctedCramerV(live: LiveTable): number | undefined {
  const { rows, columns, total } = live;
  const left = (lines: number): number => lines - 1 - (lines - 1) ** 2 / (total - 1);
  const divisor = Math.min(left(rows), left(columns));
  if (!(divisor > 0)) return undefined;
  const excess = meanSquareContingency(live, live.counts) - ((rows - 1) * (columns - 1)) / (total - 1);
  return Math.min(1, Math.sqrt(Math.max(0, excess) / divisor));
}
