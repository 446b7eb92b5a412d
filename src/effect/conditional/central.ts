// Estimate and equal-tailed limits of the odds ratio given all margins: conditional maximum likelihood, the exact limits of
// Cornfield (1956), and those of the mid-p (Lancaster 1961). Each solves a balance of two positive sums, in which
// nothing cancels; the slope of its logarithm in ln psi is a difference of two means.
import { mirrored, tally, type OddsLaw } from './odds-law.js';
import { rootOfIncreasing } from './root.js';

/** ln psi with E(count) = observed; -Infinity or Infinity at the ends of what the margins allow. */
export function conditionalEstimate(law: OddsLaw): number {
  const { observed, lowest, highest } = law;
  if (observed === lowest) return -Infinity;
  if (observed === highest) return Infinity;
  // sum over k > a of (k - a) P(k) = sum over k < a of (a - k) P(k)
  return rootOfIncreasing((x) => {
    const sums = tally(law, x, observed + 1);
    return {
      value: Math.log(sums.upperFirst / sums.lowerFirst),
      slope: sums.upperSecond / sums.upperFirst + sums.lowerSecond / sums.lowerFirst,
    };
  }, startFor(law));
}

/** ln psi with P(count <= observed) = share, 0 < share < 1; Infinity when the count is the highest possible. */
export function exactUpperEnd(law: OddsLaw, share: number): number {
  const { observed, highest } = law;
  if (observed === highest) return Infinity;
  const target = Math.log((1 - share) / share);
  return rootOfIncreasing((x) => {
    const sums = tally(law, x, observed + 1);
    const lower = sums.lower + sums.at;
    return {
      value: Math.log(sums.upper / lower) - target,
      slope: sums.upperFirst / sums.upper + sums.lowerFirst / lower,
    };
  }, startFor(law));
}

/** The same with the observed count's own probability halved. */
export function midUpperEnd(law: OddsLaw, share: number): number {
  const { observed, lowest, highest } = law;
  if (observed === highest) return Infinity;
  if (observed === lowest && share >= 0.5) return -Infinity; // half of P(a) never reaches the share
  const target = Math.log((1 - share) / share);
  return rootOfIncreasing((x) => {
    const sums = tally(law, x, observed + 1);
    const upper = sums.upper + sums.at / 2;
    const lower = sums.lower + sums.at / 2;
    return { value: Math.log(upper / lower) - target, slope: sums.upperFirst / upper + sums.lowerFirst / lower };
  }, startFor(law));
}

/** Lower and upper limit in ln psi, from a rule for the upper one: the groups exchanged give the lower. */
export const bothEnds = (law: OddsLaw, upperEnd: (law: OddsLaw) => number): [number, number] => [
  -upperEnd(mirrored(law)),
  upperEnd(law),
];

/** A rough ln odds ratio, with half a unit in each cell to be finite: where the search begins, and nothing more. */
export function startFor({ first, second, events, observed }: OddsLaw): number {
  const odds = (x: number, n: number): number => Math.log((x + 0.5) / (n - x + 0.5));
  return odds(observed, first) - odds(events - observed, second);
}
