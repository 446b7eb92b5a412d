// Mean and spread of a linear statistic given the margins, in doubles: for forecasts and thresholds only.
import type { LinearForm } from '../../../statistic/contract.js';
import type { LiveTable } from '../../../table/live-table.js';

export interface Moments {
  readonly mean: number;
  readonly deviation: number;
}

/** Mean (sum u R)(sum v C)/n; variance [sum u^2 R - (sum u R)^2/n] [the same of columns] / (n - 1) (Mantel 1963). */
export function moments(live: LiveTable, form: LinearForm): Moments {
  const { total } = live;
  const rows = side(form.rowScores, live.rowTotals, total);
  const columns = side(form.columnScores, live.columnTotals, total);
  return {
    mean: rows.mean * columns.mean * total,
    deviation: Math.sqrt((rows.squares * columns.squares) / Math.max(1, total - 1)),
  };
}

/** Mean score and sum of squared distances from it. */
export function side(
  scores: ArrayLike<number>,
  totals: ArrayLike<number>,
  total: number,
): { mean: number; squares: number } {
  let mean = 0;
  for (let k = 0; k < scores.length; k++) mean += scores[k]! * (totals[k]! / total);
  let squares = 0;
  for (let k = 0; k < scores.length; k++) squares += (scores[k]! - mean) ** 2 * totals[k]!;
  return { mean, squares };
}
