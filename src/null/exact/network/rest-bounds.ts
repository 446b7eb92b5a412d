// Lower and upper bounds on what the columns still to come can add to a sum over cells, given what is left of the rows.
//   least: Lagrange duality on the transportation polytope. For any multipliers a_i + b_j the sum over cells of
//          min_n [f(n) - (a_i + b_j) n], plus sum a_i m_i + sum b_j C_j, is at most every completion's sum. Multipliers are
//          the additive fit to f' at the proportional completion m_i C_j / S, where the continuous problem has its minimum
//          for pearson, likelihood-ratio, probability and the power-divergence family.
//   most:  each line by itself, its terms replaced by chords from 0, filled from the steepest: the longest-path idea of
//          Mehta & Patel (1983) in closed form.
import type { OrientedTable } from './oriented-table.js';

type CellTable = readonly (readonly Float64Array[])[];

export class RestBounds {
  private readonly convex: CellTable;
  private readonly steepest: CellTable;
  private readonly slopes: Float64Array;
  private readonly chord: Float64Array;
  private readonly room: Float64Array;

  constructor(
    private readonly table: OrientedTable,
    private readonly values: CellTable,
  ) {
    this.convex = values.map((rows) => rows.map(convexEnvelope));
    this.steepest = values.map((rows) => rows.map(steepestChords));
    const longest = table.columns + table.rows;
    this.slopes = new Float64Array(table.rows * table.columns);
    this.chord = new Float64Array(longest);
    this.room = new Float64Array(longest);
  }

  /** At most the smallest sum over `columns` with these row sums; `size` is the sum of the columns' totals. */
  least(columns: readonly number[], size: number, rowSums: ArrayLike<number>): number {
    const { columnTotals, rows } = this.table;
    const { slopes } = this;
    const width = columns.length;
    for (let i = 0; i < rows; i++) {
      for (let c = 0; c < width; c++) {
        const j = columns[c]!;
        slopes[i * width + c] = slopeAt(this.convex[j]![i]!, (rowSums[i]! * columnTotals[j]!) / size, rowSums[i]!);
      }
    }
    this.makeAdditive(width, rowSums);
    let bound = 0;
    for (let i = 0; i < rows; i++) {
      for (let c = 0; c < width; c++) {
        const j = columns[c]!;
        const slope = slopes[i * width + c]!;
        const expected = (rowSums[i]! * columnTotals[j]!) / size;
        bound += leastAbove(this.convex[j]![i]!, slope, expected, Math.min(rowSums[i]!, columnTotals[j]!));
      }
    }
    return bound;
  }

  /** Replaces slopes by row mean + column mean - mean, taken over the rows that are not empty. */
  private makeAdditive(width: number, rowSums: ArrayLike<number>): void {
    const { slopes, chord: rowMean, room: columnMean } = this;
    const { rows } = this.table;
    let filled = 0;
    let mean = 0;
    columnMean.fill(0, 0, width);
    for (let i = 0; i < rows; i++) {
      if (rowSums[i] === 0) continue;
      filled++;
      let sum = 0;
      for (let c = 0; c < width; c++) {
        sum += slopes[i * width + c]!;
        columnMean[c]! += slopes[i * width + c]!;
      }
      rowMean[i] = sum / width;
      mean += rowMean[i]!;
    }
    for (let i = 0; i < rows; i++) {
      for (let c = 0; c < width; c++) slopes[i * width + c] = rowMean[i]! + (columnMean[c]! - mean) / filled;
    }
  }

  /** At least the largest sum over `columns` with these row sums. */
  most(columns: readonly number[], rowSums: ArrayLike<number>): number {
    const { columnTotals, rows } = this.table;
    let byColumn = 0;
    for (const j of columns) {
      for (let i = 0; i < rows; i++) this.offer(i, j, i, rowSums[i]!);
      byColumn += this.fill(rows, columnTotals[j]!) + this.base(j);
    }
    let byRow = 0;
    for (let i = 0; i < rows; i++) {
      for (let c = 0; c < columns.length; c++) this.offer(c, columns[c]!, i, rowSums[i]!);
      byRow += this.fill(columns.length, rowSums[i]!);
    }
    for (const j of columns) byRow += this.base(j);
    return Math.min(byColumn, byRow);
  }

  private base(column: number): number {
    let sum = 0;
    for (const cell of this.values[column]!) sum += cell[0]!;
    return sum;
  }

  /** Puts the chord and the room of a cell at its place in rising order of steepness. */
  private offer(filled: number, column: number, row: number, rowSum: number): void {
    const { chord, room } = this;
    const size = Math.min(rowSum, this.table.columnTotals[column]!);
    const slope = this.steepest[column]![row]![size]!;
    let at = filled;
    for (; at > 0 && chord[at - 1]! > slope; at--) {
      chord[at] = chord[at - 1]!;
      room[at] = room[at - 1]!;
    }
    chord[at] = slope;
    room[at] = size;
  }

  private fill(lines: number, amount: number): number {
    let left = amount;
    let sum = 0;
    for (let at = lines - 1; at >= 0 && left > 0; at--) {
      const used = Math.min(left, this.room[at]!);
      sum += used * this.chord[at]!;
      left -= used;
    }
    return sum;
  }
}

/** Slope of a convex table of values near a real count, between neighbouring differences. */
function slopeAt(f: Float64Array, count: number, most: number): number {
  const last = Math.min(most, f.length - 1);
  if (last === 0) return f.length > 1 ? f[1]! - f[0]! : 0;
  const at = Math.max(0, Math.min(last - 1, count - 0.5));
  const low = Math.min(last - 1, Math.floor(at));
  const step = f[low + 1]! - f[low]!;
  return low + 2 > last ? step : step + (at - low) * (f[low + 2]! - f[low + 1]! - step);
}

/** min over n <= most of f(n) - slope x (n - expected), f convex. */
function leastAbove(f: Float64Array, slope: number, expected: number, most: number): number {
  let n = Math.min(most, Math.floor(expected));
  let best = f[n]! - slope * (n - expected);
  while (n < most) {
    const next = f[n + 1]! - slope * (n + 1 - expected);
    if (next >= best) break;
    best = next;
    n++;
  }
  while (n > 0) {
    const next = f[n - 1]! - slope * (n - 1 - expected);
    if (next >= best) break;
    best = next;
    n--;
  }
  return best;
}

/** The greatest convex function below the values (lower hull): the values themselves where they are convex already. */
function convexEnvelope(values: Float64Array): Float64Array {
  let convex = true;
  for (let n = 2; n < values.length && convex; n++)
    convex = values[n]! - values[n - 1]! >= values[n - 1]! - values[n - 2]!;
  if (convex) return values;
  const corners: number[] = [];
  for (let n = 0; n < values.length; n++) {
    while (corners.length >= 2) {
      const [a, b] = [corners.at(-2)!, corners.at(-1)!];
      if ((values[b]! - values[a]!) * (n - a) < (values[n]! - values[a]!) * (b - a)) break;
      corners.pop();
    }
    corners.push(n);
  }
  const envelope = new Float64Array(values.length);
  for (let c = 0; c + 1 < corners.length; c++) {
    const [a, b] = [corners[c]!, corners[c + 1]!];
    for (let n = a; n <= b; n++) envelope[n] = values[a]! + ((values[b]! - values[a]!) * (n - a)) / (b - a);
  }
  return envelope;
}

/** For each m the steepest chord from 0 to a count up to m. */
function steepestChords(values: Float64Array): Float64Array {
  const steepest = new Float64Array(values.length);
  for (let n = 1; n < values.length; n++) {
    const slope = (values[n]! - values[0]!) / n;
    steepest[n] = n === 1 ? slope : Math.max(slope, steepest[n - 1]!);
  }
  return steepest;
}
