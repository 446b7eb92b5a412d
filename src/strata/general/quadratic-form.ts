// (T - E)' V^-1 (T - E) in doubles, the rank of V, and a bound on what rounding can do.
import { momentsOf, type Problem } from './problem.js';

export interface QuadraticForm {
  /** Rank of V: the degrees of freedom. 0: nothing varies. */
  readonly rank: number;
  /** Mean and standard deviation of T where it has one component. */
  readonly mean: Float64Array;
  readonly covariance: Float64Array;
  value(t: ArrayLike<number>): number;
  /** What rounding can do to a value: of the arithmetic, and of T and E, whose components are right to `error`. */
  doubt(t: ArrayLike<number>, value: number, error: number): number;
  /** Components of T that decide; the others follow from them. */
  readonly kept: readonly number[];
}

/** Pivots below this share of the diagonal are those of components that follow from the others. */
const dependent = 1e-9;

export function quadraticForm(problem: Problem): QuadraticForm {
  const d = problem.dimension;
  const mean = new Float64Array(d);
  const covariance = new Float64Array(d * d);
  problem.layers.forEach((_, layer) => {
    const one = momentsOf(problem, layer);
    one.mean.forEach((x, i) => (mean[i]! += x));
    one.covariance.forEach((x, i) => (covariance[i]! += x));
  });
  const kept = independent(covariance, d);
  const rank = kept.length;
  const inverse = inverted(kept.map((i) => kept.map((j) => covariance[i * d + j]!)));
  const flat = Float64Array.from(inverse.flat());
  const norm = (matrix: readonly (readonly number[])[]): number =>
    Math.max(0, ...matrix.map((row) => row.reduce((sum, x) => sum + Math.abs(x), 0)));
  const condition = norm(inverse) * norm(kept.map((i) => kept.map((j) => covariance[i * d + j]!)));
  const centred = new Float64Array(rank);
  return {
    rank,
    mean,
    covariance,
    kept,
    doubt(t, value, error) {
      let distance = 0;
      for (const i of kept) distance += Math.abs(t[i]! - mean[i]!);
      const arithmetic = 64 * (rank + 4) ** 3 * 2 ** -53 * Math.max(1, condition) * value;
      return arithmetic + 4 * norm(inverse) * error * (distance + rank * error);
    },
    value(t) {
      for (let i = 0; i < rank; i++) centred[i] = t[kept[i]!]! - mean[kept[i]!]!;
      let sum = 0;
      for (let i = 0; i < rank; i++) {
        let line = 0;
        for (let j = 0; j < rank; j++) line += flat[i * rank + j]! * centred[j]!;
        sum += line * centred[i]!;
      }
      return Math.max(0, sum);
    },
  };
}

/** The components in order, less those whose variance is used up by the ones before (Gaussian elimination of a copy). */
function independent(covariance: Float64Array, d: number): number[] {
  const left = Float64Array.from(covariance);
  const kept: number[] = [];
  for (let i = 0; i < d; i++) {
    const pivot = left[i * d + i]!;
    if (!(pivot > dependent * covariance[i * d + i]!)) continue;
    kept.push(i);
    for (let r = i + 1; r < d; r++) {
      const factor = left[r * d + i]! / pivot;
      if (factor !== 0) for (let c = i; c < d; c++) left[r * d + c]! -= factor * left[i * d + c]!;
    }
  }
  return kept;
}

/** Of a positive definite matrix, by Gauss-Jordan elimination. */
function inverted(matrix: readonly (readonly number[])[]): number[][] {
  const n = matrix.length;
  const work = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let i = 0; i < n; i++) {
    const pivot = work[i]![i]!;
    for (let c = 0; c < 2 * n; c++) work[i]![c]! /= pivot;
    for (let r = 0; r < n; r++) {
      const factor = work[r]![i]!;
      if (r !== i && factor !== 0) for (let c = 0; c < 2 * n; c++) work[r]![c]! -= factor * work[i]![c]!;
    }
  }
  return work.map((row) => row.slice(n));
}
