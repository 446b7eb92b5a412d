// Scores of ordered lines: as declared, one apart by default, or midranks; and the whole numbers they come down to.
import { lowest, type Rational } from '../numeric/rational.js';
import { greatestCommonDivisor } from '../numeric/greatest-common-divisor.js';

/** 1, 2, 3, ... by place in the whole table, empty lines counted. */
export const standardScores = (places: readonly number[]): Rational[] =>
  places.map((place) => ({ numerator: BigInt(place) + 1n, denominator: 1n }));

/** The mean rank of the units of each line, lines in their order: (units before) + (units + 1) / 2. Any totals. */
export function midranks(totals: readonly number[]): Rational[] {
  let before = 0n;
  return totals.map((total) => {
    const rank = lowest(2n * before + BigInt(total) + 1n, 2n);
    before += BigInt(total);
    return rank;
  });
}

/** scores = least + step x whole, the whole numbers from 0 without a common divisor, step positive. */
export interface WholeScores {
  readonly whole: readonly bigint[];
  readonly least: Rational;
  readonly step: Rational;
}

/** Every affine map with a positive factor leaves the order of tables alone; this one makes the numbers smallest. */
export function wholeScores(scores: readonly Rational[]): WholeScores {
  const common = scores.reduce((all, { denominator }) => lcm(all, denominator), 1n);
  const scaled = scores.map(({ numerator, denominator }) => numerator * (common / denominator));
  const smallest = scaled.reduce((least, x) => (x < least ? x : least));
  const divisor = scaled.reduce((all, x) => greatestCommonDivisor(all, x - smallest), 0n) || 1n;
  return {
    whole: scaled.map((x) => (x - smallest) / divisor),
    least: lowest(smallest, common),
    step: lowest(divisor, common),
  };
}

const lcm = (a: bigint, b: bigint): bigint => (a / greatestCommonDivisor(a, b)) * b;
