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
  // Convex lower envelopes and steepest chords of all cells end to end, with the place of each [column x rows + row].
  private readonly convex: Float64Array;
  private readonly steepest: Float64Array;
  private readonly place: Int32Array;
  private readonly columnTotals: Float64Array;
  private readonly rowMean: Float64Array;
  private readonly columnMean: Float64Array;
  private readonly chord: Float64Array;
  private readonly room: Float64Array;

  constructor(
    private readonly table: OrientedTable,
    values: CellTable,
  ) {
    const { rows, columns } = table;
    const cells = values.flat();
    this.place = new Int32Array(cells.length + 1);
    cells.forEach((cell, at) => (this.place[at + 1] = this.place[at]! + cell.length));
    this.convex = new Float64Array(this.place[cells.length]!);
    this.steepest = new Float64Array(this.place[cells.length]!);
    cells.forEach((cell, at) => {
      this.convex.set(convexEnvelope(cell), this.place[at]);
      this.steepest.set(steepestChords(cell), this.place[at]);
    });
    this.columnTotals = Float64Array.from(table.columnTotals);
    this.rowMean = new Float64Array(rows);
    this.columnMean = new Float64Array(columns);
    this.chord = new Float64Array(rows + columns);
    this.room = new Float64Array(rows + columns);
  }

  /**
   * At most the smallest sum over `columns` with these row sums; `size` is the sum of the columns' totals. With the same
   * multipliers the bound is linear in the row sums, which is what slopeBetween reports.
   */
  least(columns: readonly number[], size: number, rowSums: ArrayLike<number>): number {
    this.fitSlopes(columns, size, rowSums);
    const { convex, place, columnTotals, rowMean, columnMean } = this;
    const { rows } = this.table;
    const width = columns.length;
    let bound = 0;
    for (let i = 0; i < rows; i++) {
      const sum = rowSums[i]!;
      for (let c = 0; c < width; c++) {
        const j = columns[c]!;
        const total = columnTotals[j]!;
        const slope = rowMean[i]! + columnMean[c]!;
        const expected = (sum * total) / size;
        const from = place[j * rows + i]!;
        const most = place[j * rows + i + 1]! - from - 1;
        // The lowest point of f(n) - slope x n, walking from the expected count: f is convex.
        let n = Math.floor(expected);
        if (n > most) n = most;
        let best = convex[from + n]! - slope * (n - expected);
        const start = n;
        while (n < most) {
          const next = convex[from + n + 1]! - slope * (n + 1 - expected);
          if (next >= best) break;
          best = next;
          n++;
        }
        if (n === start) {
          while (n > 0) {
            const next = convex[from + n - 1]! - slope * (n - 1 - expected);
            if (next >= best) break;
            best = next;
            n--;
          }
        }
        bound += best;
      }
    }
    return bound;
  }

  /** By how much the last lower bound changes, at the least, for every unit moved from one row sum to another. */
  slopeBetween(to: number, from: number): number {
    return this.rowMean[to]! - this.rowMean[from]!;
  }

  /** Slopes of the cells at the proportional completion, as row part + column part; empty rows have no say. */
  private fitSlopes(columns: readonly number[], size: number, rowSums: ArrayLike<number>): void {
    const { convex, place, columnTotals, rowMean, columnMean } = this;
    const { rows } = this.table;
    const width = columns.length;
    let filled = 0;
    let mean = 0;
    columnMean.fill(0, 0, width);
    for (let i = 0; i < rows; i++) {
      const sum = rowSums[i]!;
      rowMean[i] = 0;
      if (sum === 0) continue;
      filled++;
      let rowSum = 0;
      for (let c = 0; c < width; c++) {
        const j = columns[c]!;
        const total = columnTotals[j]!;
        const last = sum < total ? sum : total;
        const from = place[j * rows + i]!;
        // Differences stand for the slope half way between counts.
        let at = (sum * total) / size - 0.5;
        if (at < 0) at = 0;
        const low = at >= last - 1 ? last - 1 : Math.floor(at);
        let slope = convex[from + low + 1]! - convex[from + low]!;
        if (low + 2 <= last) slope += (at - low) * (convex[from + low + 2]! - convex[from + low + 1]! - slope);
        rowSum += slope;
        columnMean[c]! += slope;
      }
      rowMean[i] = rowSum / width;
      mean += rowMean[i]!;
    }
    for (let c = 0; c < width; c++) columnMean[c] = (columnMean[c]! - mean) / filled;
  }

  /** At least the largest sum over `columns` with these row sums. */
  most(columns: readonly number[], rowSums: ArrayLike<number>): number {
    const { columnTotals } = this;
    const { rows } = this.table;
    let base = 0;
    let byColumn = 0;
    for (const j of columns) {
      for (let i = 0; i < rows; i++) {
        base += this.steepest[this.place[j * rows + i]!]!;
        this.offer(i, j, i, rowSums[i]!);
      }
      byColumn += this.fill(rows, columnTotals[j]!);
    }
    let byRow = 0;
    for (let i = 0; i < rows; i++) {
      for (let c = 0; c < columns.length; c++) this.offer(c, columns[c]!, i, rowSums[i]!);
      byRow += this.fill(columns.length, rowSums[i]!);
    }
    return base + Math.min(byColumn, byRow);
  }

  /** Puts the chord and the room of a cell at its place in rising order of steepness. */
  private offer(filled: number, column: number, row: number, rowSum: number): void {
    const { chord, room } = this;
    const size = Math.min(rowSum, this.columnTotals[column]!);
    const slope = size === 0 ? 0 : this.steepest[this.place[column * this.table.rows + row]! + size]!;
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

/** For each m > 0 the steepest chord from 0 to a count up to m; in place 0 the value at 0. */
function steepestChords(values: Float64Array): Float64Array {
  const steepest = new Float64Array(values.length);
  steepest[0] = values[0]!;
  for (let n = 1; n < values.length; n++) {
    const slope = (values[n]! - values[0]!) / n;
    steepest[n] = n === 1 ? slope : Math.max(slope, steepest[n - 1]!);
  }
  return steepest;
}
