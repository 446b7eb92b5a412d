// The probability that the test rejects when the groups have proportions of their own: the sum over the outcomes in its region.
import { logFactorial } from '../numeric/log-factorial.js';
import { conditionalRegion } from './conditional-region.js';
import type { RejectionRegion, Sizes, TwoGroupTesting } from './design.js';
import { largestProbability, unconditionalRegion } from './unconditional-region.js';

export interface ExactPower {
  /** Right to about 1e-12 absolute. */
  readonly power: number;
  /** The largest probability to reject when both proportions are equal, over all of them: at most alpha, except for mid. */
  readonly size: number;
}

export const regionOf = (sizes: Sizes, testing: TwoGroupTesting): RejectionRegion =>
  testing.test === 'unconditional' ? unconditionalRegion(sizes, testing) : conditionalRegion(sizes, testing);

/** @param proportions of the event, each in [0, 1]. O(first x second) beside the region. */
export function exactPower(sizes: Sizes, proportions: readonly [number, number], testing: TwoGroupTesting): ExactPower {
  const region = regionOf(sizes, testing);
  return {
    power: probabilityOf(region, proportions),
    size: largestProbability(region.first, region.second, region.inside),
  };
}

/** P((x1, x2) in the region) for two independent binomials. */
export function probabilityOf({ first, second, inside }: RejectionRegion, [p1, p2]: readonly [number, number]): number {
  const [law1, law2] = [binomialLaw(first, p1), binomialLaw(second, p2)];
  let sum = 0;
  for (let x1 = 0; x1 <= first; x1++) {
    let part = 0;
    for (let x2 = 0; x2 <= second; x2++) if (inside[x1 * (second + 1) + x2] === 1) part += law2[x2]!;
    sum += law1[x1]! * part;
  }
  return Math.min(1, sum);
}

/** P(0), ..., P(n), from the mode outward, adding up to 1. */
export function binomialLaw(n: number, p: number): Float64Array {
  const law = new Float64Array(n + 1);
  if (p <= 0 || p >= 1) {
    law[p <= 0 ? 0 : n] = 1;
    return law;
  }
  const mode = Math.min(n, Math.floor((n + 1) * p));
  const odds = p / (1 - p);
  const log =
    logFactorial(n) - logFactorial(mode) - logFactorial(n - mode) + mode * Math.log(p) + (n - mode) * Math.log1p(-p);
  law[mode] = Math.exp(log);
  for (let x = mode; x < n; x++) law[x + 1] = law[x]! * (((n - x) / (x + 1)) * odds);
  for (let x = mode; x > 0; x--) law[x - 1] = law[x]! * (x / ((n - x + 1) * odds));
  const whole = law.reduce((a, b) => a + b, 0);
  return law.map((mass) => mass / whole);
}
