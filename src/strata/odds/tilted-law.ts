// The law of one stratum's corner under an odds ratio psi, margins held: the noncentral hypergeometric distribution (Fisher 1935),
// walked outward from its mode by the ratio of neighbours in double-double, and cut off where nothing is left.
import { DoubleDouble } from '../../numeric/double-double.js';
import { highestCorner, lowestCorner, type Stratum } from './stratum.js';
import { ScaledNumber } from './scaled-number.js';

/** Consecutive values of a law as double-doubles, from the value `from` on. */
export interface Stretch {
  readonly from: number;
  readonly high: Float64Array;
  readonly low: Float64Array;
}

/** Below this share of the mode a term is left out. */
export const leftOut = 2 ** -170;

/** The most probable corner under psi: the ratio of neighbours falls, so it is where that ratio passes 1. */
export function modeUnder(stratum: Stratum, psi: number): number {
  const { first, events, total } = stratum;
  let low = lowestCorner(stratum);
  let high = highestCorner(stratum);
  const rest = total - first - events;
  while (low < high) {
    const k = low + Math.floor((high - low) / 2);
    const rises = psi * ((first - k) / (k + 1)) * ((events - k) / (rest + k + 1)) > 1;
    if (rises) low = k + 1;
    else high = k;
  }
  return low;
}

/** The law under psi, adding up to 1. O(standard deviation), at most the support. Relative error of a term below steps x 2^-98. */
export function tiltedLaw(stratum: Stratum, psi: number): { law: Stretch; mode: number; sum: DoubleDouble } {
  const mode = modeUnder(stratum, psi);
  const down = side(stratum, psi, mode, -1);
  const up = side(stratum, psi, mode, 1);
  const high = Float64Array.from([...down.high.reverse(), 1, ...up.high]);
  const low = Float64Array.from([...down.low.reverse(), 0, ...up.low]);
  const sum = new DoubleDouble();
  high.forEach((term, i) => sum.addPair(term, low[i]!));
  for (let i = 0; i < high.length; i++) {
    const share = new ScaledNumber().timesPair(high[i]!, low[i]!).overPair(sum.high, sum.low);
    const scale = 2 ** share.exponent;
    high[i] = share.high * scale;
    low[i] = share.low * scale;
  }
  return { law: { from: mode - down.high.length, high, low }, mode, sum };
}

function side(stratum: Stratum, psi: number, mode: number, direction: 1 | -1): { high: number[]; low: number[] } {
  const end = direction > 0 ? highestCorner(stratum) : lowestCorner(stratum);
  const weight = new DoubleDouble(1);
  const high: number[] = [];
  const low: number[] = [];
  for (let k = mode; k !== end; k += direction) {
    step(weight, stratum, psi, k, direction);
    if (weight.high < leftOut) break;
    high.push(weight.high);
    low.push(weight.low);
  }
  return { high, low };
}

/** From P(k) to P(k + 1) or P(k - 1). */
function step(weight: DoubleDouble, { first, events, total }: Stratum, psi: number, k: number, way: 1 | -1): void {
  const rest = total - first - events;
  if (way > 0) {
    weight
      .multiply(first - k)
      .multiply(events - k)
      .divide(k + 1)
      .divide(rest + k + 1)
      .multiply(psi);
  } else {
    weight
      .multiply(k)
      .multiply(rest + k)
      .divide(first - k + 1)
      .divide(events - k + 1)
      .divide(psi);
  }
}

/**
 * What turns terms of the law under psi back into probabilities without it: P_1(k) = base x law(k) x psi^-(k - mode).
 * The mode under psi is walked to from the mode without it.
 */
export function baseOf(stratum: Stratum, mode: number, sum: DoubleDouble): ScaledNumber {
  const plain = tiltedLaw(stratum, 1);
  const base = new ScaledNumber();
  const weight = new DoubleDouble(1);
  const direction = mode > plain.mode ? 1 : -1;
  for (let k = plain.mode; k !== mode; k += direction) {
    step(weight.set(1), stratum, 1, k, direction);
    base.timesPair(weight.high, weight.low);
  }
  return base.overPair(plain.sum.high, plain.sum.low).timesPair(sum.high, sum.low);
}

/** Mean and variance under psi, in doubles. */
export function momentsUnder(stratum: Stratum, psi: number): { mean: number; variance: number } {
  const { first, events, total } = stratum;
  const rest = total - first - events;
  const mode = modeUnder(stratum, psi);
  let sum = 1;
  let ones = 0;
  let squares = 0;
  const add = (weight: number, offset: number): void => {
    sum += weight;
    ones += weight * offset;
    squares += weight * offset * offset;
  };
  const highest = highestCorner(stratum);
  for (let k = mode, weight = 1; k < highest; k++) {
    weight *= psi * ((first - k) / (k + 1)) * ((events - k) / (rest + k + 1));
    add(weight, k + 1 - mode);
    if (weight < 1e-25) break;
  }
  const lowest = lowestCorner(stratum);
  for (let k = mode, weight = 1; k > lowest; k--) {
    weight *= ((k / (first - k + 1)) * ((rest + k) / (events - k + 1))) / psi;
    add(weight, k - 1 - mode);
    if (weight < 1e-25) break;
  }
  const offset = ones / sum;
  return { mean: mode + offset, variance: squares / sum - offset * offset };
}
