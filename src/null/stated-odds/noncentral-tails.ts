// Tails of the first group's events where the odds ratio is psi and all margins are held (noncentral hypergeometric law; Fisher
// 1935): P(k) is proportional to C(n1, k) C(n2, m - k) psi^k. One walk outward from the mode of that law, each weight
// the one before it times a ratio, so that all terms are positive and tails keep their digits however small they are.
import { decimalRational } from '../../numeric/rational.js';

export interface CountSeen {
  readonly firstSize: number;
  readonly secondSize: number;
  readonly firstEvents: number;
  readonly secondEvents: number;
}

/** A probability that may lie below the smallest double: 0 there, and log10 tells. */
export interface Share {
  readonly value: number;
  readonly log10: number;
}

export interface NoncentralTails {
  /** P(count >= observed), P(count <= observed), and of all counts no more probable than the observed one. */
  readonly upper: Share;
  readonly lower: Share;
  readonly probability: Share;
  /** P(count = observed), and of the counts exactly as probable as it. */
  readonly point: Share;
  readonly tied: Share;
  /** Bound on the relative rounding error of each. */
  readonly relativeError: number;
}

/** Weights this near in relative terms are compared in whole numbers; doubles are right to the distance walked x 1e-15. */
const near = 1e-9;
/** Terms below this share of a sum that falls off faster than geometrically are left out. */
const negligible = 2 ** -70;
const scaleStep = 2 ** 500;
const lnScaleStep = 500 * Math.LN2;

/** @param oddsRatio positive, read as the decimal it is written as. Time: some 30 standard deviations of the count. */
export function noncentralTails(seen: CountSeen, oddsRatio: number): NoncentralTails {
  const observed = seen.firstEvents;
  const { lowest, highest, rise, mode } = lawOf(seen, oddsRatio);
  const isAbove = observed >= mode;
  // From k on, away from the mode: the next weight over this one, 0 at the end of what the margins allow.
  const onward = (k: number, up: boolean): number =>
    up ? (k >= highest ? 0 : rise(k)) : k <= lowest ? 0 : 1 / rise(k - 1);
  const comparison = exactComparison(seen, oddsRatio);

  const toObserved = walk(mode, onward, isAbove, (k) => k === observed);
  const beyond = tailFrom(observed, onward, isAbove);
  const lnPoint = toObserved.ln;
  // The other side of the mode: first the counts more probable than the observed one, then the rest.
  const start = isAbove ? mode - 1 : mode + 1;
  const hasOther = isAbove ? start >= lowest : start <= highest;
  const lnStart = hasOther ? Math.log(onward(mode, !isAbove)) : -Infinity;
  const other = hasOther
    ? walk(start, onward, !isAbove, (k, ln) => atMost(comparison, k, lnStart + ln, lnPoint, observed))
    : nothing;
  const opposite = other.found ? tailFrom(other.at, onward, !isAbove) : { sum: 0, steps: 0 };
  const lnOpposite = lnStart + other.ln;

  const weight = Math.exp(lnPoint);
  const otherBefore = Math.exp(lnStart) * other.before;
  const otherSide = hasOther ? otherBefore + (other.found ? Math.exp(lnOpposite) * opposite.sum : 0) : 0;
  const whole = toObserved.before + weight * beyond.sum + otherSide;
  const share = (lnWeight: number, sum: number): Share => {
    const ln = lnWeight + Math.log(sum) - Math.log(whole);
    return { value: Math.min(1, Math.exp(lnWeight) * (sum / whole)), log10: Math.min(0, ln / Math.LN10) };
  };
  const inward = share(0, toObserved.before + weight + otherSide);
  const outward = share(lnPoint, beyond.sum);
  const isTied = other.found && comparison(other.at, lnOpposite, lnPoint) === 0;
  // A tie on the side of the observed count: the two most probable counts may be equal.
  const [inner, outer] = isAbove ? [observed - 1, observed + 1] : [observed + 1, observed - 1];
  const besideTied = observed !== mode && comparison(inner, lnPoint, lnPoint) === 0;
  const outwardTied = onward(observed, isAbove) !== 0 && comparison(outer, lnPoint, lnPoint) === 0;
  const extreme = beyond.sum + (other.found ? Math.exp(lnOpposite - lnPoint) * opposite.sum : 0) + (besideTied ? 1 : 0);
  const steps = toObserved.steps + beyond.steps + other.steps + opposite.steps;
  return {
    upper: isAbove ? outward : inward,
    lower: isAbove ? inward : outward,
    probability: share(lnPoint, extreme),
    point: share(lnPoint, 1),
    tied: share(lnPoint, 1 + [isTied, besideTied, outwardTied].filter(Boolean).length),
    relativeError: (10 * steps + 4 * Math.abs(lnPoint) + 40) * 2 ** -53,
  };
}

interface Law {
  readonly lowest: number;
  readonly highest: number;
  readonly mode: number;
  /** P(k + 1) / P(k), falling in k. */
  readonly rise: (k: number) => number;
}

function lawOf({ firstSize, secondSize, firstEvents, secondEvents }: CountSeen, oddsRatio: number): Law {
  const events = firstEvents + secondEvents;
  const lowest = Math.max(0, events - secondSize);
  const highest = Math.min(firstSize, events);
  const rise = (k: number): number =>
    (((firstSize - k) / (k + 1)) * (events - k) * oddsRatio) / (secondSize - events + k + 1);
  return { lowest, highest, rise, mode: modeOf(rise, lowest, highest) };
}

/** Counted work in units of about 30 ns. The count is a sum of independent trials, one for each step between its ends. */
export function noncentralWork(seen: CountSeen, oddsRatio: number): { workUnits: number; tables: number } {
  const { lowest, highest, mode } = lawOf(seen, oddsRatio);
  const steps = Math.min(highest - lowest, Math.abs(seen.firstEvents - mode) + 30 * Math.sqrt(highest - lowest));
  return { workUnits: Math.round(steps + 500), tables: highest - lowest + 1 };
}

/** The most probable count, the first of two that are equal but for rounding. */
function modeOf(rise: (k: number) => number, lowest: number, highest: number): number {
  let [low, high] = [lowest, highest];
  while (low < high) {
    const middle = low + Math.ceil((high - low) / 2);
    if (rise(middle - 1) > 1) low = middle;
    else high = middle - 1;
  }
  return low;
}

interface Walked {
  readonly found: boolean;
  /** The count where the walk ended, and the logarithm of its weight over that of the start. */
  readonly at: number;
  readonly ln: number;
  /** Sum of the weights before it, that of the start being 1. */
  readonly before: number;
  readonly steps: number;
}

const nothing: Walked = { found: false, at: 0, ln: 0, before: 0, steps: 0 };

type Onward = (k: number, up: boolean) => number;

/** From `start` outward to the first count for which `ends` holds. Weights far below 1 are kept as a double and a scale. */
function walk(start: number, onward: Onward, up: boolean, ends: (k: number, ln: number) => boolean): Walked {
  let [weight, scales, before, steps] = [1, 0, 0, 0];
  for (let k = start; ; k += up ? 1 : -1) {
    const ln = Math.log(weight) - scales * lnScaleStep;
    if (ends(k, ln)) return { found: true, at: k, ln, before, steps };
    if (scales === 0) before += weight;
    const ratio = onward(k, up);
    if (ratio === 0) return { found: false, at: k, ln, before, steps };
    weight *= ratio;
    steps++;
    if (weight < 1 / scaleStep) {
      weight *= scaleStep;
      scales++;
    }
  }
}

/** Sum of the weights from `start` outward, that of the start being 1. */
function tailFrom(start: number, onward: Onward, up: boolean): { sum: number; steps: number } {
  let [weight, sum, steps] = [1, 1, 0];
  for (let k = start; ; k += up ? 1 : -1) {
    const ratio = onward(k, up);
    weight *= ratio;
    if (weight === 0 || (ratio < 1 && weight < negligible * (1 - ratio) * sum)) return { sum, steps };
    sum += weight;
    steps++;
  }
}

/** Sign of P(k) - P(observed): from the logarithms where they surely tell, else in whole numbers. */
type Comparison = (k: number, lnWeight: number, lnPoint: number) => number;

function exactComparison(seen: CountSeen, oddsRatio: number): Comparison {
  const { firstSize, secondSize, firstEvents: a } = seen;
  const events = a + seen.secondEvents;
  return (k, lnWeight, lnPoint) => {
    if (Math.abs(lnWeight - lnPoint) > near * Math.max(1, Math.abs(lnPoint))) return lnWeight - lnPoint;
    const { numerator, denominator } = decimalRational(String(oddsRatio))!;
    const [from, to] = k < a ? [k, a] : [a, k];
    let [top, bottom] = [1n, 1n];
    for (let x = from; x < to; x++) {
      top *= BigInt(firstSize - x) * BigInt(events - x) * numerator;
      bottom *= BigInt(x + 1) * BigInt(secondSize - events + x + 1) * denominator;
    }
    // top / bottom = P(to) / P(from).
    const apart = top - bottom;
    const sign = apart > 0n ? 1 : apart < 0n ? -1 : 0;
    return k < a ? 0 - sign : sign;
  };
}

const atMost = (comparison: Comparison, k: number, ln: number, lnPoint: number, observed: number): boolean =>
  k !== observed && comparison(k, ln, lnPoint) <= 0;
