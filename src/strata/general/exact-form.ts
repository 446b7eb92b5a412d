// The exact comparison of two vectors T by (T - E)' V^-1 (T - E), for near ties: whole numbers throughout.
import { greatestCommonDivisor } from '../../numeric/greatest-common-divisor.js';
import type { Place } from '../../statistic/contract.js';
import type { Problem } from './problem.js';

/** Exact vectors of one table a layer: components as whole numbers over one denominator. */
export interface ExactForm {
  /** Sign of the statistic of one T minus that of another; both in the scaled whole numbers of `scale`. */
  compare(x: readonly bigint[], y: readonly bigint[]): Place;
  /** T times this is whole. */
  readonly scale: bigint;
}

/** V and E as fractions over one denominator, V^-1 as its adjugate: slow, made when the first near tie asks for it. */
export function exactForm(problem: Problem, kept: readonly number[]): ExactForm {
  const scale = scaleOf(problem);
  const d = problem.dimension;
  const denominator = problem.layers.reduce((all, { live: { total } }) => {
    const n = BigInt(total);
    return lcm(all, n * n * (n > 1n ? n - 1n : 1n));
  }, 1n);
  const mean = new Array<bigint>(d).fill(0n);
  const covariance = Array.from({ length: d }, () => new Array<bigint>(d).fill(0n));
  problem.layers.forEach(({ live }, layer) => {
    const n = BigInt(live.total);
    const cells = cellsOf(problem, layer, scale);
    const [R, C] = [Array.from(live.rowTotals, BigInt), Array.from(live.columnTotals, BigInt)];
    for (const x of cells) mean[x.index]! += (x.value * R[x.row]! * C[x.column]! * denominator) / n;
    if (n < 2n) return;
    const share = denominator / (n * n * (n - 1n));
    for (const x of cells) {
      for (const y of cells) {
        const rows = R[x.row]! * ((x.row === y.row ? n : 0n) - R[y.row]!);
        const columns = C[x.column]! * ((x.column === y.column ? n : 0n) - C[y.column]!);
        covariance[x.index]![y.index]! += x.value * y.value * rows * columns * share;
      }
    }
  });
  const adjugate = adjugateOf(kept.map((i) => kept.map((j) => covariance[i]![j]!)));
  const form = (t: readonly bigint[]): bigint => {
    const centred = kept.map((i) => t[i]! * denominator - mean[i]!);
    return centred.reduce((sum, x, i) => sum + x * centred.reduce((line, y, j) => line + adjugate[i]![j]! * y, 0n), 0n);
  };
  return {
    scale,
    compare(x, y) {
      const [ours, theirs] = [form(x), form(y)];
      return ours > theirs ? 1 : ours < theirs ? -1 : 0;
    },
  };
}

/** The smallest whole number that makes every score product whole. */
export const scaleOf = (problem: Problem): bigint =>
  problem.layers.reduce(
    (all, { live }, layer) =>
      eachCell(live).reduce(
        (sum, [row, column]) => lcm(sum, problem.added(layer, row, column)?.[1].denominator ?? 1n),
        all,
      ),
    1n,
  );

export const cellsOf = (
  problem: Problem,
  layer: number,
  scale: bigint,
): { row: number; column: number; index: number; value: bigint }[] =>
  eachCell(problem.layers[layer]!.live).flatMap(([row, column]) => {
    const added = problem.added(layer, row, column);
    if (added === undefined) return [];
    const [index, { numerator, denominator }] = added;
    return [{ row, column, index, value: numerator * (scale / denominator) }];
  });

const eachCell = ({ rows, columns }: { rows: number; columns: number }): [number, number][] =>
  Array.from({ length: rows * columns }, (_, cell) => [Math.floor(cell / columns), cell % columns]);

const lcm = (a: bigint, b: bigint): bigint => (a / greatestCommonDivisor(a, b)) * b;

/** Adjugate of a positive definite matrix: inverse times its (positive) determinant, by fraction-free elimination (Bareiss 1968). */
function adjugateOf(matrix: readonly (readonly bigint[])[]): bigint[][] {
  const n = matrix.length;
  const work = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1n : 0n))]);
  let before = 1n;
  for (let k = 0; k < n; k++) {
    const pivot = work[k]![k]!;
    for (let r = 0; r < n; r++) {
      if (r === k) continue;
      const factor = work[r]![k]!;
      for (let c = 0; c < 2 * n; c++) work[r]![c] = (work[r]![c]! * pivot - factor * work[k]![c]!) / before;
    }
    before = pivot;
  }
  return work.map((row) => row.slice(n));
}
