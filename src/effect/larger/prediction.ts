// How much knowing one side helps to foretell the other: lambda and tau of Goodman & Kruskal (1954) and the uncertainty
// coefficient of Theil (1970), each with its derivative by every cell's probability. From these comes the large-sample
// interval by the delta method, for counts of independent units (Goodman & Kruskal 1963, 1972; Theil 1970).
import { zOfConfidence } from '../../numeric/normal-quantile.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Effect, EffectReason, Interval } from '../contract.js';
import { approximateInterval, noInterval, type EffectSettings } from '../two-groups.js';

/** Probabilities of cells, row-major, and of the lines of both sides. */
interface Shares {
  readonly rows: number;
  readonly columns: number;
  readonly cell: Float64Array;
  readonly row: Float64Array;
  readonly column: Float64Array;
}

/** A quantity and its derivative by each cell's probability. */
interface Varied {
  readonly value: number;
  readonly by: (row: number, column: number) => number;
  readonly reason?: EffectReason;
}

type Side = 'rows' | 'columns' | 'either';
interface Ratio {
  /** (gained) / (to gain). */
  readonly gained: readonly Varied[];
  readonly toGain: readonly Varied[];
}

export function predictionEffects(live: LiveTable, settings: EffectSettings): Effect[] {
  const shares = sharesOf(live);
  const turned = transposed(shares);
  const family = (name: string, parts: (shares: Shares) => Ratio): Effect[] => {
    const columns = parts(shares);
    const ofTurned = parts(turned);
    const rows = { gained: ofTurned.gained.map(turnedBack), toGain: ofTurned.toGain.map(turnedBack) };
    const both = { gained: [...rows.gained, ...columns.gained], toGain: [...rows.toGain, ...columns.toGain] };
    const sides: [Side, Ratio][] = [
      ['rows', rows],
      ['columns', columns],
      ['either', both],
    ];
    // Tau has no symmetric form in use.
    return sides
      .filter(([side]) => side !== 'either' || name !== 'goodman-kruskal-tau')
      .map(([predicts, ratio]) => effectOf(name, predicts, ratio, shares, live.total, settings));
  };
  return [
    ...family('goodman-kruskal-lambda', lambdaOf),
    ...family('goodman-kruskal-tau', tauOf),
    ...family('theil-u', uncertaintyOf),
  ];
}

function sharesOf({ rows, columns, counts, rowTotals, columnTotals, total }: LiveTable): Shares {
  const share = (n: number): number => n / total;
  return { rows, columns, cell: counts.map(share), row: rowTotals.map(share), column: columnTotals.map(share) };
}

const transposed = ({ rows, columns, cell, row, column }: Shares): Shares => ({
  rows: columns,
  columns: rows,
  cell: Float64Array.from({ length: cell.length }, (_, k) => cell[(k % rows) * columns + Math.floor(k / rows)]!),
  row: column,
  column: row,
});

const turnedBack = ({ value, by, reason }: Varied): Varied => ({
  value,
  by: (row, column) => by(column, row),
  ...(reason === undefined ? {} : { reason }),
});

const indexOfMost = (values: Float64Array): number => values.indexOf(Math.max(...values));
const isTied = (values: Float64Array): boolean => values.filter((x) => x === Math.max(...values)).length > 1;
const lineOf = ({ cell, columns }: Shares, row: number): Float64Array =>
  cell.subarray(row * columns, (row + 1) * columns);

/** lambda of the columns: (sum of the rows' largest - largest column) / (1 - largest column). */
function lambdaOf(shares: Shares): Ratio {
  const lines = Array.from({ length: shares.rows }, (_, i) => lineOf(shares, i));
  const best = lines.map(indexOfMost);
  const most = indexOfMost(shares.column);
  const tied: { reason?: EffectReason } = isTied(shares.column) || lines.some(isTied) ? { reason: 'tied-maximum' } : {};
  const inLines: Varied = {
    value: lines.reduce((sum, line, i) => sum + line[best[i]!]!, 0),
    by: (row, column) => (column === best[row] ? 1 : 0),
    ...tied,
  };
  const overall = (sign: 1 | -1, constant: number): Varied => ({
    value: constant + sign * shares.column[most]!,
    by: (_, column) => (column === most ? sign : 0),
  });
  return { gained: [inLines, overall(-1, 0)], toGain: [overall(-1, 1)] };
}

/** tau of the columns: (sum p_ij^2 / p_i - sum p_j^2) / (1 - sum p_j^2). */
function tauOf(shares: Shares): Ratio {
  const within = Array.from({ length: shares.rows }, (_, i) => lineOf(shares, i).reduce((sum, p) => sum + p * p, 0));
  const lines: Varied = {
    value: within.reduce((sum, square, i) => sum + square / shares.row[i]!, 0),
    by: (row, column) =>
      (2 * shares.cell[row * shares.columns + column]!) / shares.row[row]! - within[row]! / shares.row[row]! ** 2,
  };
  const overall = (constant: number): Varied => ({
    value: constant - shares.column.reduce((sum, p) => sum + p * p, 0),
    by: (_, column) => -2 * shares.column[column]!,
  });
  return { gained: [lines, overall(0)], toGain: [overall(1)] };
}

/** U of the columns: (H(rows) + H(columns) - H(cells)) / H(columns), H = -sum p ln p. */
function uncertaintyOf(shares: Shares): Ratio {
  const entropy = (values: Float64Array, place: (row: number, column: number) => number): Varied => ({
    value: values.reduce((sum, p) => (p === 0 ? sum : sum - p * Math.log(p)), 0),
    by: (row, column) => -(Math.log(values[place(row, column)]!) + 1),
  });
  const ofRows = entropy(shares.row, (row) => row);
  const ofColumns = entropy(shares.column, (_, column) => column);
  const ofCells = entropy(shares.cell, (row, column) => row * shares.columns + column);
  const negative: Varied = { value: -ofCells.value, by: (row, column) => -ofCells.by(row, column) };
  return { gained: [ofRows, ofColumns, negative], toGain: [ofColumns] };
}

function effectOf(
  name: string,
  predicts: Side,
  { gained, toGain }: Ratio,
  shares: Shares,
  total: number,
  settings: EffectSettings,
): Effect {
  const add = (parts: readonly Varied[]): number => parts.reduce((sum, { value }) => sum + value, 0);
  const [top, bottom] = [add(gained), add(toGain)];
  if (!(bottom > 0)) return { name, predicts, estimate: null, reason: 'one-level-only', intervals: [] };
  const estimate = Math.min(1, Math.max(0, top / bottom));
  const by = (row: number, column: number): number => {
    const slope = (parts: readonly Varied[]): number => parts.reduce((sum, part) => sum + part.by(row, column), 0);
    return (slope(gained) * bottom - top * slope(toGain)) / (bottom * bottom);
  };
  const reason = gained.find((part) => part.reason !== undefined)?.reason;
  return { name, predicts, estimate, intervals: [deltaInterval(estimate, by, reason, shares, total, settings)] };
}

/** estimate +- z sqrt((sum p f^2 - (sum p f)^2) / n), f the derivatives; cut to 0 and 1. None at 0, at 1 and at a kink. */
function deltaInterval(
  estimate: number,
  by: (row: number, column: number) => number,
  kink: EffectReason | undefined,
  { cell, columns }: Shares,
  total: number,
  settings: EffectSettings,
): Interval {
  if (estimate < 1e-12 || estimate > 1 - 1e-12) return noInterval('delta', settings, 'at-boundary');
  if (kink !== undefined) return noInterval('delta', settings, kink);
  let first = 0;
  let second = 0;
  cell.forEach((p, k) => {
    if (p === 0) return;
    const f = by(Math.floor(k / columns), k % columns);
    first += p * f;
    second += p * f * f;
  });
  const half = zOfConfidence(settings.confidence) * Math.sqrt(Math.max(0, second - first * first) / total);
  return approximateInterval('delta', settings, [Math.max(0, estimate - half), Math.min(1, estimate + half)]);
}
