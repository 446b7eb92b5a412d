// Is the odds ratio the same in all strata? Breslow & Day (1980): observed corners against those expected under the common odds ratio of
// Mantel & Haenszel, with the correction of Tarone (1985) that makes the statistic chi-square.
import { oddsRatio } from './mantel-haenszel.js';
import { highestCorner, lowestCorner, speaks, type Stratum } from './stratum.js';

export interface Homogeneity {
  readonly breslowDay: number;
  readonly tarone: number;
  readonly degreesOfFreedom: number;
}

/** undefined with fewer than two strata that speak, and where the common odds ratio is 0 or infinite. */
export function breslowDay(strata: readonly Stratum[]): Homogeneity | undefined {
  const used = strata.filter(speaks);
  const common = oddsRatio(strata);
  if (used.length < 2 || common === null || common === 0 || common === Infinity) return undefined;
  let statistic = 0;
  let gaps = 0;
  let variances = 0;
  for (const stratum of used) {
    const expected = expectedCorner(stratum, common);
    const { a, first, second, events } = stratum;
    const variance =
      1 / (1 / expected + 1 / (first - expected) + 1 / (events - expected) + 1 / (second - events + expected));
    statistic += (a - expected) ** 2 / variance;
    gaps += a - expected;
    variances += variance;
  }
  return {
    breslowDay: statistic,
    tarone: statistic - gaps ** 2 / variances,
    degreesOfFreedom: used.length - 1,
  };
}

/** The e in the support with e (second - events + e) = psi (first - e)(events - e), by the root that does not cancel. */
export function expectedCorner(stratum: Stratum, psi: number): number {
  const { first, second, events } = stratum;
  // (1 - psi) e^2 + (second - events + psi (first + events)) e - psi first events = 0
  const square = 1 - psi;
  const linear = second - events + psi * (first + events);
  const constant = psi * first * events;
  const root = Math.sqrt(Math.max(0, linear * linear + 4 * square * constant));
  // linear may be negative only where psi is small; then the other form keeps its digits.
  const e = linear >= 0 ? (2 * constant) / (linear + root) : (root - linear) / (2 * square);
  return Math.min(highestCorner(stratum), Math.max(lowestCorner(stratum), e));
}
