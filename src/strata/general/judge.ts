// Where a set of tables, one a stratum, stands relative to the observed one. Doubles decide where they can; whole numbers do the rest.
import type { OrderingName } from '../../null/contract.js';
import type { Place } from '../../statistic/contract.js';
import { cellsOf, exactForm, scaleOf, type ExactForm } from './exact-form.js';
import type { Problem } from './problem.js';
import { quadraticForm, type QuadraticForm } from './quadratic-form.js';

/** T over all layers in doubles, in units of the scores. `exact` gives it as whole numbers times the common scale; called for near ties. */
export type PlaceOf = (t: Float64Array, exact: () => readonly bigint[]) => Place;

export interface Judged {
  readonly form: QuadraticForm;
  readonly observed: Float64Array;
  /** (T - E)' V^-1 (T - E) of the observed tables; 0 where nothing varies. */
  readonly value: number;
  readonly scale: bigint;
  /** For each layer the flat weights: index of the component (-1: none) and value in doubles, by live cell. */
  readonly weights: readonly { readonly index: Int32Array; readonly value: Float64Array }[];
  placeBy(name: OrderingName): PlaceOf;
  /** T of one table a layer, exactly. */
  exactSum(counts: readonly ArrayLike<number>[]): bigint[];
}

export function judgeFor(problem: Problem): Judged {
  const form = quadraticForm(problem);
  const scale = scaleOf(problem);
  const d = problem.dimension;
  const cells = problem.layers.map((_, layer) => cellsOf(problem, layer, scale));
  const weights = problem.layers.map(({ live }, layer) => {
    const index = new Int32Array(live.rows * live.columns).fill(-1);
    const value = new Float64Array(live.rows * live.columns);
    for (const cell of cells[layer]!) {
      const at = cell.row * live.columns + cell.column;
      index[at] = cell.index;
      value[at] = Number(cell.value) / Number(scale);
    }
    return { index, value };
  });
  const exactSum = (counts: readonly ArrayLike<number>[]): bigint[] => {
    const sum = new Array<bigint>(d).fill(0n);
    problem.layers.forEach(({ live }, layer) => {
      for (const { row, column, index, value } of cells[layer]!) {
        sum[index]! += value * BigInt(counts[layer]![row * live.columns + column]!);
      }
    });
    return sum;
  };
  const counts = problem.layers.map(({ live }) => live.counts);
  const observedExact = exactSum(counts);
  const observed = Float64Array.from(observedExact, (x) => Number(x) / Number(scale));
  const value = form.rank === 0 ? 0 : form.value(observed);
  const error = errorOf(problem, weights);
  let exactly: ExactForm | undefined;
  const compare = (x: readonly bigint[]): Place =>
    (exactly ??= exactForm(problem, form.kept)).compare(x, observedExact);

  const byForm: PlaceOf = (t, exact) => {
    const ours = form.value(t);
    const difference = ours - value;
    const doubt = form.doubt(t, ours, error) + form.doubt(observed, value, error);
    return difference > doubt ? 1 : difference < -doubt ? -1 : compare(exact());
  };
  const byValue =
    (direction: 1 | -1): PlaceOf =>
    (t, exact) => {
      const difference = direction * (t[0]! - observed[0]!);
      if (Math.abs(difference) > 2 * error) return difference > 0 ? 1 : -1;
      const exactDifference = exact()[0]! - observedExact[0]!;
      return exactDifference === 0n ? 0 : exactDifference > 0n === direction > 0 ? 1 : -1;
    };
  return {
    form,
    observed,
    value,
    scale,
    weights,
    exactSum,
    placeBy(name) {
      if (form.rank === 0) return () => 0;
      if (problem.name !== 'score-correlation' || name === 'distance')
        return name === 'lower' ? reversed(byForm) : byForm;
      return byValue(name === 'lower' ? -1 : 1);
    },
  };
}

const reversed =
  (place: PlaceOf): PlaceOf =>
  (t, exact) => {
    const found = place(t, exact);
    return found === 0 ? 0 : found === 1 ? -1 : 1;
  };

/** Bound on the rounding of a component of T, and of E: every unit at the largest weight. */
function errorOf(problem: Problem, weights: Judged['weights']): number {
  let most = 0;
  let steps = 0;
  problem.layers.forEach(({ live }, layer) => {
    const largest = weights[layer]!.value.reduce((sum, x) => Math.max(sum, Math.abs(x)), 0);
    most += largest * live.total;
    steps += live.rows * live.columns + 4;
  });
  return most * (steps + 4) * 2 ** -52;
}
