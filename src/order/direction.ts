// Which way a trend goes, in the words of the table's own labels.
import type { Table } from '../table/table.js';

export interface Direction {
  /** Pearson's correlation of row and column scores over all units; -1 to 1. */
  readonly correlation: number;
  /** With rising row scores the counts move towards the column with the highest (or the lowest) score. */
  readonly fromRow: string;
  readonly toRow: string;
  readonly towardsColumn: string;
}

/** Scores default to 1, 2, 3, ...; undefined where all scores of a side are equal over the units. O(cells). */
export function directionOf(
  { counts, rowLabels, columnLabels, rowTotals, columnTotals, total }: Table,
  rowScores: readonly number[] = rowLabels.map((_, i) => i + 1),
  columnScores: readonly number[] = columnLabels.map((_, j) => j + 1),
): Direction | undefined {
  const rows = centred(rowScores, rowTotals, total);
  const columns = centred(columnScores, columnTotals, total);
  const squares = (scores: readonly number[], totals: readonly number[]): number =>
    scores.reduce((sum, x, k) => sum + x * x * totals[k]!, 0);
  const size = Math.sqrt(squares(rows, rowTotals)) * Math.sqrt(squares(columns, columnTotals));
  if (!(size > 0) || !Number.isFinite(size)) return undefined;
  const product = counts.reduce(
    (sum, line, i) => sum + rows[i]! * line.reduce((part, count, j) => part + columns[j]! * count, 0),
    0,
  );
  const correlation = Math.max(-1, Math.min(1, product / size));
  const live = (totals: readonly number[], scores: readonly number[], sign: 1 | -1): number =>
    totals.reduce(
      (best, units, k) => (units > 0 && (best < 0 || sign * (scores[k]! - scores[best]!) > 0) ? k : best),
      -1,
    );
  return {
    correlation,
    fromRow: rowLabels[live(rowTotals, rowScores, -1)]!,
    toRow: rowLabels[live(rowTotals, rowScores, 1)]!,
    towardsColumn: columnLabels[live(columnTotals, columnScores, correlation < 0 ? -1 : 1)]!,
  };
}

function centred(scores: readonly number[], totals: readonly number[], total: number): number[] {
  const mean = scores.reduce((sum, score, k) => sum + score * (totals[k]! / total), 0);
  return scores.map((score) => score - mean);
}
