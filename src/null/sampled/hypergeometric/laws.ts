// Whole laws laid out side by side, for look-up tables: hypergeometric and binomial counts. Each is built outwards from a mode by the
// ratios of neighbours and divided by its sum, so that no factorial is needed.
import { modeOf } from './spread.js';

/** A stretch of an array that holds P(from), P(from + 1), ... */
export interface Stretch {
  readonly array: Float64Array;
  readonly start: number;
  readonly length: number;
  readonly from: number;
}

/** Masses below this part of the largest are left out: a double cannot add them to 1. */
const negligible = 1e-18;

/** How many of `drawn` units, taken without replacement from `total` of which `marked` are marked, carry the mark. */
export function layHypergeometric(into: Stretch, total: number, marked: number, drawn: number): void {
  const { array, start, length, from } = into;
  const rest = total - marked - drawn;
  const mode = startAt(into, modeOf(total, marked, drawn));
  for (let x = mode, mass = 1; x + 1 < from + length && mass > negligible; x++) {
    mass *= ((marked - x) * (drawn - x)) / ((x + 1) * (rest + x + 1));
    array[start + x + 1 - from] = mass;
  }
  for (let x = mode, mass = 1; x > from && mass > negligible; x--) {
    mass *= (x * (rest + x)) / ((marked - x + 1) * (drawn - x + 1));
    array[start + x - 1 - from] = mass;
  }
  normalise(into);
}

/** How many of `units` fall to a side that each joins with probability `share`, 0 < share < 1. */
export function layBinomial(into: Stretch, units: number, share: number): void {
  const { array, start, length, from } = into;
  const odds = share / (1 - share);
  const mode = startAt(into, Math.floor((units + 1) * share));
  for (let x = mode, mass = 1; x + 1 < from + length && mass > negligible; x++) {
    mass *= ((units - x) / (x + 1)) * odds;
    array[start + x + 1 - from] = mass;
  }
  for (let x = mode, mass = 1; x > from && mass > negligible; x--) {
    mass *= x / (units - x + 1) / odds;
    array[start + x - 1 - from] = mass;
  }
  normalise(into);
}

/** Clears the stretch and sets the mode to 1; a mode beyond the stretch is brought to its end. */
function startAt({ array, start, length, from }: Stretch, mode: number): number {
  const inside = Math.max(from, Math.min(mode, from + length - 1));
  array.fill(0, start, start + length);
  array[start + inside - from] = 1;
  return inside;
}

function normalise({ array, start, length }: Stretch): void {
  let sum = 0;
  for (let k = start; k < start + length; k++) sum += array[k]!;
  for (let k = start; k < start + length; k++) array[k]! /= sum;
}
