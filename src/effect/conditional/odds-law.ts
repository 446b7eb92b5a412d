// The law of the first group's events when the odds ratio is psi and all margins are held (Fisher 1935): P(k) is
// proportional to C(n1, k) C(n2, m - k) psi^k. Everything here takes x = ln psi.

export interface OddsLaw {
  /** Sizes of the first and second group, and all events. */
  readonly first: number;
  readonly second: number;
  readonly events: number;
  /** Events of the first group, as counted. */
  readonly observed: number;
  readonly lowest: number;
  readonly highest: number;
}

export function oddsLaw(first: number, second: number, events: number, observed: number): OddsLaw {
  return {
    first,
    second,
    events,
    observed,
    lowest: Math.max(0, events - second),
    highest: Math.min(first, events),
  };
}

/** The groups exchanged: its psi is 1 / psi of the other, so that one end of every interval serves for both. */
export const mirrored = ({ first, second, events, observed }: OddsLaw): OddsLaw =>
  oddsLaw(second, first, events, events - observed);

/** P(k + 1) / P(k) at psi = 1, falling in k. */
const step = ({ first, second, events }: OddsLaw, k: number): number =>
  (((first - k) / (k + 1)) * (events - k)) / (second - events + k + 1);

/** ln P(k + 1) - ln P(k) at psi = 1. */
export const logStep = (law: OddsLaw, k: number): number => Math.log(step(law, k));

/** Standard deviation of the count at psi = 1: what a walk over the law takes grows with it. */
export function spreadOf({ first, second, events }: OddsLaw): number {
  const total = first + second;
  return Math.sqrt((((first / total) * second) / total) * events * ((total - events) / Math.max(1, total - 1)));
}

/** Weights of the law around the observed count a, relative to the mode, with moments of k - a. */
export interface Tally {
  /** k < a: sum of weights, of (a - k) and of (a - k)^2 times weights. */
  lower: number;
  lowerFirst: number;
  lowerSecond: number;
  /** k = a. */
  at: number;
  /** a < k < m. */
  middle: number;
  middleFirst: number;
  /** k >= m. */
  upper: number;
  upperFirst: number;
  upperSecond: number;
}

/** Terms below this share of the observed count's weight are left out; they fall off faster than geometrically. */
const negligible = 1e-24;

/**
 * Adds the law at x, walking outward from its mode. Each weight is right to (distance from the mode) x 4 units in the
 * last place, which is 1e-15 of a standard deviation of x. Time: some 25 standard deviations of k.
 */
export function tally(law: OddsLaw, x: number, m: number): Tally {
  const { observed: a, lowest, highest } = law;
  const psi = Math.exp(x);
  const mode = modeAt(law, psi);
  const sums = zero();
  add(sums, mode, 1, a, m);
  const up = (): void => {
    let weight = 1;
    for (let k = mode; k < highest; k++) {
      weight *= step(law, k) * psi;
      add(sums, k + 1, weight, a, m);
      if (weight === 0 || (k >= a && weight < negligible && weight < negligible * sums.at)) return;
    }
  };
  const down = (): void => {
    let weight = 1;
    for (let k = mode; k > lowest; k--) {
      weight /= step(law, k - 1) * psi;
      add(sums, k - 1, weight, a, m);
      if (weight === 0 || (k <= a && weight < negligible && weight < negligible * sums.at)) return;
    }
  };
  // The side of the observed count first: its weight says how far out the other side matters.
  if (a >= mode) {
    up();
    down();
  } else {
    down();
    up();
  }
  return sums;
}

const zero = (): Tally => ({
  lower: 0,
  lowerFirst: 0,
  lowerSecond: 0,
  at: 0,
  middle: 0,
  middleFirst: 0,
  upper: 0,
  upperFirst: 0,
  upperSecond: 0,
});

function add(sums: Tally, k: number, weight: number, a: number, m: number): void {
  if (k < a) {
    const first = (a - k) * weight;
    sums.lower += weight;
    sums.lowerFirst += first;
    sums.lowerSecond += first * (a - k);
  } else if (k === a) sums.at += weight;
  else if (k < m) {
    sums.middle += weight;
    sums.middleFirst += (k - a) * weight;
  } else {
    const first = (k - a) * weight;
    sums.upper += weight;
    sums.upperFirst += first;
    sums.upperSecond += first * (k - a);
  }
}

/** The most probable count: the last one that is no less probable than the one before it. */
function modeAt(law: OddsLaw, psi: number): number {
  let low = law.lowest;
  let high = law.highest;
  while (low < high) {
    const middle = low + Math.ceil((high - low) / 2);
    if (step(law, middle - 1) * psi >= 1) low = middle;
    else high = middle - 1;
  }
  return low;
}
