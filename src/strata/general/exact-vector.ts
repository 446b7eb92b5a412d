// The exact law of T over strata: in every stratum the tables are listed and those of equal T put together; the strata are then combined
// one by one, sets of tables with equal T merged. T is held as whole numbers, packed into one.
import type { ExactCut, OrderingName } from '../../null/contract.js';
import { cutFrom } from '../../null/exact/exact-answer.js';
import { OutOfReach } from '../../null/exact/out-of-reach.js';
import { countTables } from '../../null/exact/count-tables.js';
import { WideSum } from '../../numeric/wide-number.js';
import { cellsOf } from './exact-form.js';
import { everyTable } from './every-table.js';
import type { Judged } from './judge.js';
import type { Problem } from './problem.js';
import { scalarLaw, visitScalarLaw } from './scalar-law.js';

/** How T is packed: component i takes `spans[i]` values from `lowest[i]` on, in units of 1 / scale. */
interface Packing {
  readonly strides: readonly number[];
  readonly lowest: readonly number[];
  readonly layers: readonly { readonly weights: Float64Array; readonly offset: number }[];
}

/** More entries than this fill the memory allowed. */
const mostEntries = 4e6;
/** More work than this on the law of one stratum is never taken. */
const mostListed = 3e9;
/** Masses are held this many times larger, so that those down to 1e-560 keep their digits. */
const upscale = 2 ** 900;
/** A look-up in a hash map takes about as long as so many units of 30 ns. */
const unitsPerLookup = 10;

/** Work in units of 30 ns; Infinity where T cannot be packed or the law outgrows the memory. `tables`: sets of tables, all strata together. */
export function forecastVector(problem: Problem, judged: Judged): { workUnits: number; tables: number } {
  const packing = packingFor(problem, judged);
  let tables = 1;
  let states = 1;
  let units = 0;
  let fits = packing !== undefined;
  let reach = 1;
  problem.layers.forEach(({ live }, layer) => {
    const own = countTables(live).tables;
    const scalar = scalarLaw(problem, layer, judged.scale);
    const distinct = Math.min(own, scalar?.span ?? spanOf(problem, judged, layer));
    const law = Math.min(own * live.counts.length, scalar?.workUnits ?? Infinity);
    units += law + states * distinct * unitsPerLookup;
    reach += (scalar?.span ?? Infinity) - 1;
    states = Math.min(states * distinct, reachOf(problem, judged, layer), reach);
    fits &&= states < mostEntries && law < mostListed;
    tables *= own;
  });
  return { workUnits: fits ? units : Infinity, tables };
}

/** Number of values that T can take in one layer, at most. */
function spanOf(problem: Problem, judged: Judged, layer: number): number {
  return rangesOf(problem, judged, layer).reduce((all, [low, high]) => all * (high - low + 1), 1);
}

/** The same for the sum over this layer and those before it. */
function reachOf(problem: Problem, judged: Judged, last: number): number {
  const spans = new Array<number>(problem.dimension).fill(1);
  for (let layer = 0; layer <= last; layer++) {
    rangesOf(problem, judged, layer).forEach(([low, high], i) => (spans[i]! += high - low));
  }
  return spans.reduce((all, span) => all * span, 1);
}

/** Bounds on each component in one layer, in whole numbers. */
function rangesOf(problem: Problem, { scale }: Judged, layer: number): [number, number][] {
  const { live } = problem.layers[layer]!;
  const ranges = Array.from({ length: problem.dimension }, (): [number, number] => [0, 0]);
  for (const { row, column, index, value } of cellsOf(problem, layer, scale)) {
    const most = Number(value) * Math.min(live.rowTotals[row]!, live.columnTotals[column]!);
    ranges[index]![most < 0 ? 0 : 1] += most;
  }
  return ranges;
}

function packingFor(problem: Problem, judged: Judged): Packing | undefined {
  const all = problem.layers.map((_, layer) => rangesOf(problem, judged, layer));
  const lowest = Array.from({ length: problem.dimension }, (_, i) =>
    all.reduce((sum, ranges) => sum + ranges[i]![0], 0),
  );
  const highest = lowest.map((_, i) => all.reduce((sum, ranges) => sum + ranges[i]![1], 0));
  const strides: number[] = [];
  let stride = 1;
  for (let i = 0; i < lowest.length; i++) {
    strides.push(stride);
    stride *= highest[i]! - lowest[i]! + 1;
  }
  if (!(stride < 2 ** 52)) return undefined;
  const layers = problem.layers.map(({ live }, layer) => {
    const weights = new Float64Array(live.rows * live.columns);
    for (const { row, column, index, value } of cellsOf(problem, layer, judged.scale)) {
      weights[row * live.columns + column] = Number(value) * strides[index]!;
    }
    const offset = all[layer]!.reduce((sum, [low], i) => sum - low * strides[i]!, 0);
    return { weights, offset };
  });
  return { strides, lowest, layers };
}

/** A law over packed T: mass of each, as a sum with its rounding carried along. */
class PackedLaw {
  readonly places = new Map<number, number>();
  readonly high: number[] = [];
  readonly low: number[] = [];
  /** Each mass is right to so many units of 2^-53. */
  roundings = 0;

  add(key: number, mass: number): void {
    let at = this.places.get(key);
    if (at === undefined) {
      at = this.high.push(0) - 1;
      this.low.push(0);
      this.places.set(key, at);
    }
    const before = this.high[at]!;
    const sum = before + mass;
    const part = sum - before;
    this.low[at]! += before - (sum - part) + (mass - part);
    this.high[at] = sum;
  }

  mass(at: number): number {
    return this.high[at]! + this.low[at]!;
  }
}

/** The cuts of T for each ordering. A forecast has said that it fits. */
export function exactVector(problem: Problem, judged: Judged, names: readonly OrderingName[]): ExactCut[] {
  const packing = packingFor(problem, judged)!;
  let law = new PackedLaw();
  law.add(0, upscale);
  let roundings = 8;
  problem.layers.forEach((_, layer) => {
    const one = layerLaw(problem, packing, layer, judged.scale);
    roundings += one.roundings + 8;
    const next = new PackedLaw();
    for (const [key, at] of law.places) {
      const mass = law.mass(at);
      for (const [other, place] of one.places) next.add(key + other, mass * one.mass(place));
    }
    law = next;
  });
  const places = names.map((name) => judged.placeBy(name));
  const masses = names.map(() => [new WideSum(), new WideSum(), new WideSum()] as const);
  const whole = new WideSum();
  const unpack = unpackerFor(packing, judged);
  for (const [key, at] of law.places) {
    const mass = law.mass(at);
    whole.add(mass, 0);
    const { t, exact } = unpack(key);
    places.forEach((place, o) => masses[o]![place(t, exact) + 1]!.add(mass, 0));
  }
  const relativeError = roundings * 2 ** -53;
  return names.map((name, o) => {
    const [below, tied, above] = masses[o]!;
    if (tied.isZero) throw new OutOfReach('memory', law.high.length);
    return cutFrom(name, { below, tied, above, whole }, relativeError);
  });
}

function layerLaw(problem: Problem, packing: Packing, layer: number, scale: bigint): PackedLaw {
  const { live } = problem.layers[layer]!;
  const { weights, offset } = packing.layers[layer]!;
  const law = new PackedLaw();
  const scalar = scalarLaw(problem, layer, scale);
  if (scalar !== undefined && scalar.workUnits < countTables(live).tables * live.counts.length) {
    law.roundings = visitScalarLaw(scalar, (value, probability) => law.add(value + offset, probability));
    return law;
  }
  const sums = new Map<number, WideSum>();
  const whole = new WideSum();
  everyTable(live, (counts, mantissa, exponent) => {
    let key = offset;
    for (let cell = 0; cell < counts.length; cell++) key += weights[cell]! * counts[cell]!;
    let sum = sums.get(key);
    if (sum === undefined) sums.set(key, (sum = new WideSum()));
    sum.add(mantissa, exponent);
    whole.add(mantissa, exponent);
  });
  law.roundings = 4 * live.counts.length;
  for (const [key, sum] of sums) law.add(key, sum.over(whole).value);
  return law;
}

function unpackerFor({ strides, lowest }: Packing, { scale }: Judged) {
  const t = new Float64Array(strides.length);
  const whole = new Array<number>(strides.length).fill(0);
  const unit = Number(scale);
  const exact = (): bigint[] => whole.map(BigInt);
  return (key: number): { t: Float64Array; exact: () => bigint[] } => {
    let left = key;
    for (let i = strides.length - 1; i >= 0; i--) {
      const digit = Math.floor(left / strides[i]!);
      left -= digit * strides[i]!;
      whole[i] = digit + lowest[i]!;
      t[i] = whole[i]! / unit;
    }
    return { t, exact };
  };
}
