// From counts by stratum to layers: which strata say anything, their live lines, and the scores of those lines.
import { lowest, type Rational } from '../../numeric/rational.js';
import { midranks } from '../../statistic/scores.js';
import { hasOneTableOnly, liveTable } from '../../table/live-table.js';
import type { Table } from '../../table/table.js';
import type { Layer } from './problem.js';

/** Midranks within each stratum over its total plus 1 (van Elteren 1960), midranks of the pooled table, or one score a line. */
export type StrataScores = 'midranks' | 'pooled-midranks' | readonly Rational[];

export const transposed = (counts: readonly (readonly number[])[]): number[][] =>
  counts[0]!.map((_, j) => counts.map((row) => row[j]!));

/**
 * Strata whose margins allow more than one table; the others add nothing to any statistic.
 * @param tables counts over the lines of the pooled table, empty ones too
 */
export function layersOf(
  pooled: Pick<Table, 'rowTotals' | 'columnTotals'>,
  tables: readonly (readonly (readonly number[])[])[],
  scores: { readonly rows: StrataScores; readonly columns: StrataScores },
): Layer[] {
  const rowPlaces = placesOfLive(pooled.rowTotals);
  const columnPlaces = placesOfLive(pooled.columnTotals);
  return tables.flatMap((counts) => {
    const rowTotals = counts.map((row) => row.reduce((sum, n) => sum + n, 0));
    const columnTotals = transposed(counts).map((column) => column.reduce((sum, n) => sum + n, 0));
    const total = rowTotals.reduce((sum, n) => sum + n, 0);
    const live = liveTable({ counts, rowTotals, columnTotals, total, rowLabels: [], columnLabels: [] });
    if (hasOneTableOnly(live)) return [];
    return [
      {
        live,
        rows: live.rowIndex.map((line) => rowPlaces.get(line)!),
        columns: live.columnIndex.map((line) => columnPlaces.get(line)!),
        rowScores: scoresIn(scores.rows, pooled.rowTotals, rowTotals, live.rowIndex, total),
        columnScores: scoresIn(scores.columns, pooled.columnTotals, columnTotals, live.columnIndex, total),
      },
    ];
  });
}

function placesOfLive(totals: readonly number[]): Map<number, number> {
  const live = totals.flatMap((total, line) => (total > 0 ? [line] : []));
  return new Map(live.map((line, place) => [line, place]));
}

function scoresIn(
  scores: StrataScores,
  pooledTotals: readonly number[],
  totals: readonly number[],
  live: readonly number[],
  total: number,
): Rational[] {
  if (scores === 'midranks') {
    const ranks = midranks(totals);
    return live.map((line) => lowest(ranks[line]!.numerator, ranks[line]!.denominator * BigInt(total + 1)));
  }
  const all = scores === 'pooled-midranks' ? midranks(pooledTotals) : scores;
  return live.map((line) => all[line]!);
}
