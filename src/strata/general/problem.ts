// What the generalised Cochran-Mantel-Haenszel statistics are made of (Landis, Heyman & Koch 1978): in every stratum a unit in row i and
// column j adds a vector w_ij; T is the sum over all units. With the margins of every stratum held, T has mean E and covariance V, and
// each statistic is (T - E)' V^-1 (T - E).
import type { Rational } from '../../numeric/rational.js';
import { lowest, toDouble } from '../../numeric/rational.js';
import type { LiveTable } from '../../table/live-table.js';

export type GeneralName = 'any-association' | 'mean-scores' | 'score-correlation';

/** One stratum: its live part, and for each live line the line of the pooled live table. */
export interface Layer {
  readonly live: LiveTable;
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  /** Scores of the live lines; read by mean-scores (columns) and correlation (both). */
  readonly rowScores: readonly Rational[];
  readonly columnScores: readonly Rational[];
}

export interface Problem {
  readonly name: GeneralName;
  readonly dimension: number;
  readonly layers: readonly Layer[];
  /** Exact vector of one unit, by layer and cell: index and value of what it adds; undefined where it adds nothing. */
  added(layer: number, row: number, column: number): readonly [index: number, value: Rational] | undefined;
}

/** @param rows, columns  lines of the pooled live table */
export function problemFor(name: GeneralName, layers: readonly Layer[], rows: number, columns: number): Problem {
  const one: Rational = { numerator: 1n, denominator: 1n };
  switch (name) {
    case 'any-association':
      return {
        name,
        layers,
        dimension: (rows - 1) * (columns - 1),
        added(layer, row, column) {
          const [i, j] = [layers[layer]!.rows[row]!, layers[layer]!.columns[column]!];
          return i < rows - 1 && j < columns - 1 ? [i * (columns - 1) + j, one] : undefined;
        },
      };
    case 'mean-scores':
      return {
        name,
        layers,
        dimension: rows - 1,
        added(layer, row, column) {
          const i = layers[layer]!.rows[row]!;
          return i < rows - 1 ? [i, layers[layer]!.columnScores[column]!] : undefined;
        },
      };
    case 'score-correlation':
      return {
        name,
        layers,
        dimension: 1,
        added(layer, row, column) {
          const { rowScores, columnScores } = layers[layer]!;
          const [u, v] = [rowScores[row]!, columnScores[column]!];
          return [0, lowest(u.numerator * v.numerator, u.denominator * v.denominator)];
        },
      };
  }
}

/** Mean and covariance of the vector of one layer given its margins, in doubles. */
export function momentsOf(problem: Problem, layer: number): { mean: Float64Array; covariance: Float64Array } {
  const { live } = problem.layers[layer]!;
  const d = problem.dimension;
  const mean = new Float64Array(d);
  const covariance = new Float64Array(d * d);
  const n = live.total;
  const cells: { row: number; column: number; index: number; value: number }[] = [];
  for (let row = 0; row < live.rows; row++) {
    for (let column = 0; column < live.columns; column++) {
      const added = problem.added(layer, row, column);
      if (added !== undefined) cells.push({ row, column, index: added[0], value: toDouble(added[1]) });
    }
  }
  for (const x of cells) mean[x.index]! += (x.value * live.rowTotals[x.row]! * live.columnTotals[x.column]!) / n;
  if (n < 2) return { mean, covariance };
  // Cov(n_ij, n_kl) = R_i (n d_ik - R_k) C_j (n d_jl - C_l) / (n^2 (n - 1))
  for (const x of cells) {
    for (const y of cells) {
      const rows = (live.rowTotals[x.row]! / n) * ((x.row === y.row ? n : 0) - live.rowTotals[y.row]!);
      const columns =
        (live.columnTotals[x.column]! / n) * ((x.column === y.column ? n : 0) - live.columnTotals[y.column]!);
      covariance[x.index * d + y.index]! += (x.value * y.value * rows * columns) / (n - 1);
    }
  }
  return { mean, covariance };
}
