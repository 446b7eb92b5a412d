// The law of S, the sum of corner counts over strata, by convolution (Gart 1970; Mehta, Patel & Gray 1985). The law is worked out under
// an odds ratio at which the values asked for are common, and brought back by exact powers: tails of 1e-300 keep their digits.
import { DoubleDouble } from '../../numeric/double-double.js';
import { WideSum } from '../../numeric/wide-number.js';
import { powerOf, ScaledNumber } from './scaled-number.js';
import { highestCorner, lowestCorner, type Stratum } from './stratum.js';
import { baseOf, momentsUnder, tiltedLaw, type Stretch } from './tilted-law.js';

/** Terms below this share of the largest are cut off from the ends. */
const cutBelow = 2 ** -160;
/** Terms above this share of the largest are right to 100 bits. */
const reliableAbove = 2 ** -60;
/** Newton's steps in ln psi are no longer than this. */
const longestStep = 8;

/** The law under one odds ratio; P_1(s) = base x law(s) x psi^-(s - origin). */
interface UnderPsi {
  readonly psi: number;
  readonly law: Stretch;
  readonly peak: number;
  readonly base: ScaledNumber;
  readonly origin: number;
}

export class SumLaw {
  readonly lowest: number;
  readonly highest: number;
  private readonly known: UnderPsi[] = [];

  /** @param strata those that speak, at least one */
  constructor(readonly strata: readonly Stratum[]) {
    this.lowest = strata.reduce((sum, one) => sum + lowestCorner(one), 0);
    this.highest = strata.reduce((sum, one) => sum + highestCorner(one), 0);
  }

  /** P(from <= S <= to) without association, given every margin; `towards` says in which direction the terms fall, 0 for neither. */
  mass(from: number, to: number, towards: -1 | 0 | 1): WideSum {
    const sum = new WideSum();
    const low = Math.max(from, this.lowest);
    const high = Math.min(to, this.highest);
    if (low > high) return sum;
    const nearest = towards > 0 ? low : high;
    const { psi, law, base, origin } = towards === 0 ? this.under(1) : this.reliableAt(nearest);
    const start = towards > 0 ? Math.max(low, law.from) : Math.min(high, law.from + law.high.length - 1);
    const step = towards > 0 ? 1 : -1;
    const weight = powerOf(psi, origin - start).timesScaled(base);
    for (let s = start; s >= low && s <= high; s += step) {
      const at = s - law.from;
      if (at < 0 || at >= law.high.length) break;
      if (s !== start && psi !== 1) {
        if (step > 0) weight.over(psi);
        else weight.times(psi);
      }
      const product = new DoubleDouble(weight.high, weight.low).multiply(law.high[at]!);
      product.add(weight.high * law.low[at]!);
      sum.add(product.high, weight.exponent, product.low);
    }
    return sum;
  }

  /** Law under psi; values whose share is below 1e-48 are left out. */
  under(psi: number): UnderPsi {
    const found = this.known.find((one) => one.psi === psi);
    if (found !== undefined) return found;
    const made = convolved(this.strata, psi);
    this.known.push(made);
    return made;
  }

  /** A law under an odds ratio near enough to psi that its terms, reweighted, hold all of the law under psi but 1e-20. */
  nearby(psi: number): { readonly psi: number; readonly law: Stretch; readonly centre: number } {
    for (const known of [...this.known].reverse()) {
      const centre = this.centreIfHeld(known, Math.log(psi / known.psi));
      if (centre !== undefined) return { ...known, centre };
    }
    const made = this.under(psi);
    return { ...made, centre: made.law.from + made.law.high.indexOf(made.peak) };
  }

  /** The most probable value after reweighting by exp(shift x s), unless an end that was cut off would matter. */
  private centreIfHeld({ law: { from, high } }: UnderPsi, shift: number): number | undefined {
    const log = (i: number): number => Math.log(high[i]!) + shift * i;
    let centre = 0;
    for (let i = 1, most = log(0); i < high.length; i++) {
      const weight = log(i);
      if (weight > most) [centre, most] = [i, weight];
    }
    const least = log(centre) + Math.log(1e-22);
    const last = high.length - 1;
    const heldBelow = from === this.lowest || log(0) < least;
    const heldAbove = from + last === this.highest || log(last) < least;
    return heldBelow && heldAbove ? from + centre : undefined;
  }

  /** Whether P(S = s) is above 1e-18 of the most probable value without association. */
  isCommon(s: number): boolean {
    return isReliable(this.under(1), s);
  }

  private reliableAt(s: number): UnderPsi {
    const near = [this.under(1), ...this.known].find((known) => isReliable(known, s));
    return near ?? this.under(this.psiFor(Math.min(this.highest - 0.25, Math.max(this.lowest + 0.25, s))));
  }

  /** The odds ratio under which the mean of S is `mean`, strictly inside the support. Newton's steps kept inside a bracket. */
  psiFor(mean: number): number {
    let low = -Infinity;
    let high = Infinity;
    let theta = 0;
    for (let round = 0; round < 200; round++) {
      const at = this.moments(Math.exp(theta));
      const gap = at.mean - mean;
      if (gap >= 0) high = theta;
      if (gap <= 0) low = theta;
      let next = theta - Math.max(-longestStep, Math.min(longestStep, gap / at.variance));
      if (next < low || next > high) next = (low + high) / 2;
      const done = Math.abs(next - theta) <= 2 ** -52 * Math.max(1, Math.abs(theta));
      theta = next;
      if (done) break;
    }
    return Math.exp(theta);
  }

  moments(psi: number): { mean: number; variance: number } {
    let mean = 0;
    let variance = 0;
    for (const stratum of this.strata) {
      const one = momentsUnder(stratum, psi);
      mean += one.mean;
      variance += one.variance;
    }
    return { mean, variance };
  }
}

const isReliable = ({ law, peak }: UnderPsi, s: number): boolean =>
  (law.high[s - law.from] ?? 0) > reliableAbove * peak;

function convolved(strata: readonly Stratum[], psi: number): UnderPsi {
  let law: Stretch = { from: 0, high: Float64Array.of(1), low: Float64Array.of(0) };
  const base = new ScaledNumber();
  let origin = 0;
  for (const stratum of strata) {
    const one = tiltedLaw(stratum, psi);
    if (psi !== 1) base.timesScaled(baseOf(stratum, one.mode, one.sum));
    origin += one.mode;
    law = trimmed(convolve(law, one.law));
  }
  return { psi, law, peak: law.high.reduce((most, x) => Math.max(most, x), 0), base, origin };
}

/** Every sum of products carried in double-double. */
function convolve(a: Stretch, b: Stretch): Stretch {
  const [long, short] = a.high.length >= b.high.length ? [a, b] : [b, a];
  const { high: xs, low: xls } = long;
  const high = new Float64Array(xs.length + short.high.length - 1);
  const low = new Float64Array(high.length);
  const splitter = 134217729;
  const tops = xs.map((x) => {
    const big = splitter * x;
    return big - (big - x);
  });
  for (let j = 0; j < short.high.length; j++) {
    const y = short.high[j]!;
    const yl = short.low[j]!;
    const big = splitter * y;
    const top = big - (big - y);
    const rest = y - top;
    for (let i = 0; i < xs.length; i++) {
      const x = xs[i]!;
      const xTop = tops[i]!;
      const xRest = x - xTop;
      const product = x * y;
      const error = xTop * top - product + xTop * rest + xRest * top + xRest * rest + x * yl + xls[i]! * y;
      const before = high[i + j]!;
      const sum = before + product;
      const part = sum - before;
      low[i + j]! += before - (sum - part) + (product - part) + error;
      high[i + j] = sum;
    }
  }
  for (let k = 0; k < high.length; k++) {
    const sum = high[k]! + low[k]!;
    low[k] = low[k]! - (sum - high[k]!);
    high[k] = sum;
  }
  return { from: a.from + b.from, high, low };
}

function trimmed({ from, high, low }: Stretch): Stretch {
  const least = high.reduce((most, x) => Math.max(most, x), 0) * cutBelow;
  let start = 0;
  let end = high.length;
  while (high[start]! < least) start++;
  while (high[end - 1]! < least) end--;
  return { from: from + start, high: high.subarray(start, end), low: low.subarray(start, end) };
}
