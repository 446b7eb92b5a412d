// The probability of a set of outcomes along a line of proportions: p1 from a0 to a1 and p2 from b0 to b1 as s goes from 0 to 1.
// A polynomial in s; its Bernstein coefficient k is the mean, over the ways to turn k of the n units to the far end of
// the line, of the probability of the set (its blossom; Ramshaw 1989), so that all terms are positive.
import { groupLaw, lawError } from './group-law.js';
import type { OutcomeSet } from './outcomes.js';
import type { NullValue } from './constrained-score.js';

export interface ProportionLine {
  readonly first: readonly [number, number];
  readonly second: readonly [number, number];
}

/** All pairs of proportions that the null value allows. */
export function lineOf({ of, value }: NullValue): ProportionLine {
  if (of === 'difference') {
    return value >= 0 ? { first: [value, 1], second: [0, 1 - value] } : { first: [0, 1 + value], second: [-value, 1] };
  }
  return value <= 1 ? { first: [0, value], second: [0, 1] } : { first: [0, 1], second: [0, 1 / value] };
}

/** Coefficients of degree firstSize + secondSize. O(firstSize^2 secondSize). */
export function linePolynomial({ firstSize, secondSize, inside }: OutcomeSet, line: ProportionLine): Float64Array {
  const width = secondSize + 1;
  const firstLaws = lawsAlong(firstSize, line.first);
  const secondLaws = lawsAlong(secondSize, line.second);
  // given[x1 * width + l]: probability that x2 is in the set beside x1, with l units of the second group at the far end.
  const given = new Float64Array((firstSize + 1) * width);
  for (let l = 0; l <= secondSize; l++) {
    const law = secondLaws[l]!;
    for (let x1 = 0; x1 <= firstSize; x1++) {
      let sum = 0;
      for (let x2 = 0; x2 <= secondSize; x2++) if (inside[x1 * width + x2] === 1) sum += law[x2]!;
      given[x1 * width + l] = sum;
    }
  }
  const joint = new Float64Array(width);
  const coefficients = new Float64Array(firstSize + secondSize + 1);
  const laws = Array.from(coefficients, (_, k) => groupLaw(firstSize, secondSize, k));
  for (let j = 0; j <= firstSize; j++) {
    const law = firstLaws[j]!;
    joint.fill(0);
    for (let x1 = 0; x1 <= firstSize; x1++) {
      const weight = law[x1]!;
      if (weight === 0) continue;
      const row = x1 * width;
      for (let l = 0; l <= secondSize; l++) joint[l]! += weight * given[row + l]!;
    }
    for (let l = 0; l <= secondSize; l++) {
      const { lowest, weights, whole } = laws[j + l]!;
      coefficients[j + l]! += joint[l]! * (weights[j - lowest]! / whole);
    }
  }
  return coefficients;
}

/** Relative error of those coefficients. */
export const lineError = (firstSize: number, secondSize: number): number =>
  lawError(firstSize, secondSize) + (12 * (firstSize + secondSize) + 40) * 2 ** -53;

/** Laws of the events of a group with j of its units at the far end, j = 0, ..., size. One end is 0 or 1. */
function lawsAlong(size: number, [near, far]: readonly [number, number]): Float64Array[] {
  return Array.from({ length: size + 1 }, (_, j) => convolved(binomialLaw(j, far), binomialLaw(size - j, near)));
}

/** One of them is certain (its proportion is 0 or 1) or of no units, so that the other is only moved. */
function convolved(one: Float64Array, other: Float64Array): Float64Array {
  const law = new Float64Array(one.length + other.length - 1);
  for (let i = 0; i < one.length; i++) {
    if (one[i] === 0) continue;
    for (let k = 0; k < other.length; k++) law[i + k]! += one[i]! * other[k]!;
  }
  return law;
}

/** From the mode outward, then divided by the sum. */
function binomialLaw(units: number, share: number): Float64Array {
  const law = new Float64Array(units + 1);
  if (share <= 0 || share >= 1) {
    law[share <= 0 ? 0 : units] = 1;
    return law;
  }
  const mode = Math.min(units, Math.floor((units + 1) * share));
  const odds = share / (1 - share);
  law[mode] = 1;
  let sum = 1;
  for (let x = mode; x < units; x++) sum += law[x + 1] = ((law[x]! * (units - x)) / (x + 1)) * odds;
  for (let x = mode; x > 0; x--) sum += law[x - 1] = (law[x]! * x) / ((units - x + 1) * odds);
  for (let x = 0; x <= units; x++) law[x]! /= sum;
  return law;
}
