// The law of T in one stratum where T is one number: a linear form of the table, so the engine of trends works it out column by column
// (Pagano & Tritchler 1983) where listing every table would take longer.
import { forecastLinear } from '../../null/exact/linear/linear-forecast.js';
import { wholeLaw } from '../../null/exact/linear/linear-law.js';
import { extremes, scoredSides } from '../../null/exact/linear/scored-sides.js';
import { upscale } from '../../null/exact/linear/node.js';
import { lowest, type Rational } from '../../numeric/rational.js';
import type { LinearForm } from '../../statistic/contract.js';
import { wholeScores } from '../../statistic/scores.js';
import { trend } from '../../statistic/trend.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Problem } from './problem.js';

/** T x scale = offset + step x S, S the whole-number sum of `form`. */
export interface ScalarLaw {
  readonly live: LiveTable;
  readonly form: LinearForm;
  readonly offset: number;
  readonly step: number;
  readonly workUnits: number;
  /** Values that S can take, at most. */
  readonly span: number;
}

/** undefined where T has more components, where its scores have too many digits, and where nothing varies. */
export function scalarLaw(problem: Problem, layer: number, scale: bigint): ScalarLaw | undefined {
  if (problem.dimension !== 1 || problem.name === 'any-association') return undefined;
  const { live, rows, rowScores, columnScores } = problem.layers[layer]!;
  const whole = (x: bigint): Rational => ({ numerator: x, denominator: 1n });
  // Row means of two rows: T is the sum of the scores in the first.
  const ofRows = problem.name === 'score-correlation' ? rowScores : rows.map((row) => whole(row === 0 ? 1n : 0n));
  const form = trend.bind(live, { groups: 'rows', event: 0, first: 0 }, { rowScores: ofRows, columnScores }).linear;
  if (form === undefined || form.rowScores.every((x) => x === 0) || form.columnScores.every((x) => x === 0))
    return undefined;
  const [u, v] = [wholeScores(ofRows), wholeScores(columnScores)];
  const times = (...factors: readonly Rational[]): Rational =>
    factors.reduce((x, y) => lowest(x.numerator * y.numerator, x.denominator * y.denominator), whole(scale));
  const weigh = (scores: readonly bigint[], totals: Float64Array): Rational =>
    whole(scores.reduce((sum, score, k) => sum + score * BigInt(totals[k]!), 0n));
  // (least + step w)(least' + step' w') summed over units, the margins known.
  const fixed = [
    times(u.least, v.least, whole(BigInt(live.total))),
    times(u.least, v.step, weigh(v.whole, live.columnTotals)),
    times(u.step, v.least, weigh(u.whole, live.rowTotals)),
  ].reduce((x, y) => lowest(x.numerator * y.denominator + y.numerator * x.denominator, x.denominator * y.denominator));
  const step = times(u.step, v.step);
  if (fixed.denominator !== 1n || step.denominator !== 1n) return undefined;
  const ends = extremes(scoredSides(live, form));
  return {
    live,
    form,
    span: ends.highest - ends.lowest + 1,
    offset: Number(fixed.numerator),
    step: Number(step.numerator),
    workUnits: forecastLinear(live, form).workUnits,
  };
}

/** Calls `visit` with every value of T x scale and its probability; each is right to `roundings` units of 2^-53. */
export function visitScalarLaw(
  { live, form, offset, step }: ScalarLaw,
  visit: (value: number, probability: number) => void,
): number {
  const { law, roundings } = wholeLaw(live, form);
  law.forEach((sum, mass) => {
    if (mass > 0) visit(offset + step * sum, mass / upscale);
  });
  return roundings;
}
