// The law of one cell given the margins: hypergeometric (Fisher 1935). Two cells whose margins are the same up to swapping
// row and column or counting the rest instead have one law, folded here to row <= column <= total / 2.
import { DoubleDouble } from '../numeric/double-double.js';
import { WideSum } from '../numeric/wide-number.js';
import type { LiveTable } from '../table/live-table.js';

/** Where a cell's count stands in its folded law: k = sign count + shift. */
export interface FoldedCell {
  readonly row: number;
  readonly column: number;
  readonly total: number;
  readonly sign: 1 | -1;
  readonly shift: number;
}

/** For each possible k (those with a mass that doubles can hold), P(|k - mean| at least that of k). */
export interface CellLaw {
  readonly row: number;
  readonly column: number;
  readonly total: number;
  /** First k of `log2P`. */
  readonly lowest: number;
  /** log2 of the two-sided p of each k: 0 for the nearest to the mean. Error below 1e-12. */
  readonly log2P: Float64Array;
  /** floor of the mean: p rises up to it and falls after it. */
  readonly middle: number;
}

export function foldedCell(live: LiveTable, cell: number): FoldedCell {
  const { total } = live;
  let row = live.rowTotals[Math.floor(cell / live.columns)]!;
  let column = live.columnTotals[cell % live.columns]!;
  let sign: 1 | -1 = 1;
  let shift = 0;
  if (row > total - row) [row, sign, shift] = [total - row, -1, column];
  if (column > total - column) [column, sign, shift] = [total - column, sign === 1 ? -1 : 1, row - shift];
  return { row: Math.min(row, column), column: Math.max(row, column), total, sign, shift };
}

/** Standard deviation of the count. */
export function deviationOf({ row, column, total }: Pick<FoldedCell, 'row' | 'column' | 'total'>): number {
  const mean = (row / total) * column;
  return Math.sqrt(((mean * (total - row)) / total) * ((total - column) / Math.max(1, total - 1)));
}

/** Counts of a law that are walked: all, or those within 40 standard deviations, beyond which no p is a double. */
export const stepsOf = (margins: Pick<FoldedCell, 'row' | 'column' | 'total'>): number =>
  Math.min(margins.row + 1, Math.ceil(80 * deviationOf(margins)) + 100);

/** Masses below this share of the middle's are left off; log2. */
const deepest = -1150;

/** O(stepsOf). Margins as `foldedCell` gives them. */
export function cellLaw({ row, column, total }: Pick<FoldedCell, 'row' | 'column' | 'total'>): CellLaw {
  const middle = Number((BigInt(row) * BigInt(column)) / BigInt(total));
  const down = weightsFrom(row, column, total, middle, -1);
  const up = weightsFrom(row, column, total, middle, 1).slice(1);
  const lowest = middle - down.length + 1;
  const log2P = new Float64Array(down.length + up.length);
  const sum = new WideSum();
  let [i, j] = [up.length - 1, down.length - 1];
  // From the furthest inward, so that each p is the sum so far.
  while (i >= 0 || j >= 0) {
    const side = i < 0 ? -1 : j < 0 ? 1 : signOf(middle + 1 + i + middle - j, row, column, total);
    if (side >= 0) sum.add(up[i]!.high, up[i]!.exponent);
    if (side <= 0) sum.add(down[j]!.high, down[j]!.exponent);
    if (side >= 0) log2P[middle + 1 + i-- - lowest] = sum.log2;
    if (side <= 0) log2P[middle - j-- - lowest] = sum.log2;
  }
  const whole = sum.log2;
  return { row, column, total, lowest, middle, log2P: log2P.map((log2) => log2 - whole) };
}

interface Weight {
  readonly high: number;
  readonly exponent: number;
}

/** P(k)/P(middle) outward from the middle, the middle first. */
function weightsFrom(row: number, column: number, total: number, middle: number, direction: 1 | -1): Weight[] {
  const weights: Weight[] = [{ high: 1, exponent: 0 }];
  const weight = new DoubleDouble(1);
  const rest = total - row - column;
  let exponent = 0;
  for (let k = middle; direction > 0 ? k < row : k > 0; k += direction) {
    if (direction > 0)
      weight
        .multiply(row - k)
        .multiply(column - k)
        .divide(k + 1)
        .divide(rest + k + 1);
    else
      weight
        .multiply(k)
        .multiply(rest + k)
        .divide(row - k + 1)
        .divide(column - k + 1);
    if (weight.high < 2 ** -500) {
      weight.set(weight.high * 2 ** 500, weight.low * 2 ** 500);
      exponent -= 500;
    }
    if (exponent + Math.log2(weight.high) < deepest) break;
    weights.push({ high: weight.high, exponent });
  }
  return weights;
}

/** Sign of (upper k - mean) - (mean - lower k), given the sum of the two: exact. */
function signOf(both: number, row: number, column: number, total: number): number {
  if (total < 2 ** 26) return Math.sign(both * total - 2 * row * column);
  const difference = BigInt(both) * BigInt(total) - 2n * BigInt(row) * BigInt(column);
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
}
