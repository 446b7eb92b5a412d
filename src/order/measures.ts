// How strongly two ordered sides rise together: gamma, tau-b, tau-c and Somers' d, with large-sample intervals from their
// asymptotic variances under multinomial sampling (Goodman & Kruskal 1963; Somers 1962; Brown & Benedetti 1977).
import type { Effect, Interval } from '../effect/contract.js';
import type { Table } from '../table/table.js';
import { concordance, type Concordance } from './concordance.js';

export interface OrdinalMeasure {
  readonly name: 'gamma' | 'tau-b' | 'tau-c' | 'somers-d-columns' | 'somers-d-rows';
  /** In [-1, 1]; null where no pair of units differs on a side that must. */
  readonly estimate: number | null;
  /** Large-sample standard error, for small n optimistic; null with the estimate. */
  readonly standardError: number | null;
}

/** In this order: gamma, tau-b, tau-c, Somers' d of columns given rows and of rows given columns. O(cells). */
export function ordinalMeasures(table: Table): OrdinalMeasure[] {
  const pairs = concordance(table);
  return [
    gamma(table, pairs),
    tauB(table, pairs),
    tauC(table, pairs),
    somersD(table, pairs, 'columns'),
    somersD(table, pairs, 'rows'),
  ];
}

/** The measures as effects. @param quantile of the standard normal law, at (1 + confidence) / 2. */
export const ordinalEffects = (table: Table, confidence: number, quantile: number): Effect[] =>
  ordinalMeasures(table).map(({ name, estimate, standardError }) => ({
    name,
    estimate,
    ...(estimate === null ? { reason: 'one-level-only' as const } : {}),
    intervals:
      estimate === null || standardError === null
        ? []
        : [aroundEstimate(estimate, standardError, confidence, quantile)],
  }));

function aroundEstimate(estimate: number, error: number, confidence: number, quantile: number): Interval {
  return {
    method: 'large-sample',
    confidence,
    lower: Math.max(-1, estimate - quantile * error),
    upper: Math.min(1, estimate + quantile * error),
    guaranteed: false,
  };
}

/** Sum over cells of n f(cell)^2 where f is first minus the mean of all: a spread, whatever the scale. */
function spread({ counts, columnLabels }: Table, f: (row: number, column: number, cell: number) => number): number {
  let sum = 0;
  counts.forEach((line, i) =>
    line.forEach((count, j) => {
      if (count > 0) sum += count * f(i, j, i * columnLabels.length + j) ** 2;
    }),
  );
  return sum;
}

const nothing = (name: OrdinalMeasure['name']): OrdinalMeasure => ({ name, estimate: null, standardError: null });

/** (C - D) / (C + D). */
function gamma(table: Table, { concordant, discordant, concordantWith, discordantWith }: Concordance): OrdinalMeasure {
  const untied = concordant + discordant;
  if (untied === 0) return nothing('gamma');
  const share = concordant / untied;
  const sum = spread(table, (_, __, cell) => (1 - share) * concordantWith[cell]! - share * discordantWith[cell]!);
  return { name: 'gamma', estimate: (concordant - discordant) / untied, standardError: (2 * Math.sqrt(sum)) / untied };
}

/** n^2 - sum of squared totals: twice the pairs of units that differ on the side. */
const differing = (total: number, totals: readonly number[]): number =>
  totals.reduce((sum, units) => sum + units * (total - units), 0);

/** 2 (C - D) / sqrt(w_r w_c), w twice the pairs that differ on each side (Kendall 1945). */
function tauB(table: Table, { concordant, discordant, balance }: Concordance): OrdinalMeasure {
  const { total, rowTotals, columnTotals } = table;
  const rows = differing(total, rowTotals);
  const columns = differing(total, columnTotals);
  if (rows === 0 || columns === 0) return nothing('tau-b');
  const root = Math.sqrt(rows) * Math.sqrt(columns);
  const estimate = (2 * (concordant - discordant)) / root;
  // The gradient of tau-b in the counts, which leaves out what all cells have in common.
  const slope = (i: number, j: number, cell: number): number =>
    (2 * balance[cell]!) / root + estimate * (rowTotals[i]! / rows + columnTotals[j]! / columns);
  const mean = meanOf(table, slope);
  return { name: 'tau-b', estimate, standardError: Math.sqrt(spread(table, (i, j, cell) => slope(i, j, cell) - mean)) };
}

function meanOf(table: Table, f: (row: number, column: number, cell: number) => number): number {
  let sum = 0;
  table.counts.forEach((line, i) =>
    line.forEach((count, j) => {
      sum += count * f(i, j, i * table.columnLabels.length + j);
    }),
  );
  return sum / table.total;
}

/** 2 m (C - D) / (n^2 (m - 1)), m the smaller number of levels that hold units (Stuart 1953). */
function tauC(table: Table, { concordant, discordant, balance }: Concordance): OrdinalMeasure {
  const { total } = table;
  const levels = Math.min(
    ...[table.rowTotals, table.columnTotals].map((totals) => totals.filter((units) => units > 0).length),
  );
  if (levels < 2) return nothing('tau-c');
  const scale = levels / (levels - 1) / total;
  const estimate = (2 * scale * (concordant - discordant)) / total;
  const mean = meanOf(table, (_, __, cell) => balance[cell]!);
  const sum = spread(table, (_, __, cell) => balance[cell]! - mean);
  return { name: 'tau-c', estimate, standardError: (2 * scale * Math.sqrt(sum)) / total };
}

/** 2 (C - D) / w, w twice the pairs that differ on the other side: of columns given rows, or the reverse. */
function somersD(
  table: Table,
  { concordant, discordant, balance }: Concordance,
  of: 'rows' | 'columns',
): OrdinalMeasure {
  const name = `somers-d-${of}` as const;
  const { total } = table;
  const given = of === 'columns' ? table.rowTotals : table.columnTotals;
  const pairs = differing(total, given);
  if (pairs === 0) return nothing(name);
  const estimate = (2 * (concordant - discordant)) / pairs;
  const sum = spread(table, (i, j, cell) => balance[cell]! - estimate * (total - given[of === 'columns' ? i : j]!));
  return { name, estimate, standardError: (2 * Math.sqrt(sum)) / pairs };
}
