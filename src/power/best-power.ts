// No test of level alpha can do better than the most powerful one against a single pair of proportions (Neyman & Pearson 1933):
// sizes at which even that one falls short need not be tried.
import type { Sizes } from './design.js';
import { binomialLaw } from './exact-power.js';

/** Where between the two proportions a common one is tried: the same for all sizes, so that the bound rises with them. */
const shares = [0.25, 0.375, 0.5, 0.625, 0.75];

/**
 * An upper bound on the power of every test that rejects with probability at most alpha when both proportions are equal.
 * Each common proportion tried gives a bound; the smallest is returned. O(n1 n2 log).
 */
export function bestPower({ first, second }: Sizes, [p1, p2]: readonly [number, number], alpha: number): number {
  return Math.min(...shares.map((share) => mostPowerful(first, second, p1, p2, p1 + share * (p2 - p1), alpha)));
}

function mostPowerful(first: number, second: number, p1: number, p2: number, q: number, alpha: number): number {
  const [a1, a2] = [binomialLaw(first, p1), binomialLaw(second, p2)];
  const [n1, n2] = [binomialLaw(first, q), binomialLaw(second, q)];
  const outcomes: { ratio: number; alternative: number; null: number }[] = [];
  for (let x1 = 0; x1 <= first; x1++) {
    for (let x2 = 0; x2 <= second; x2++) {
      const alternative = a1[x1]! * a2[x2]!;
      const byNull = n1[x1]! * n2[x2]!;
      if (alternative > 0)
        outcomes.push({ ratio: byNull === 0 ? Infinity : alternative / byNull, alternative, null: byNull });
    }
  }
  outcomes.sort((a, b) => b.ratio - a.ratio);
  let [power, spent] = [0, 0];
  for (const outcome of outcomes) {
    if (spent + outcome.null > alpha) return power + outcome.alternative * ((alpha - spent) / outcome.null);
    spent += outcome.null;
    power += outcome.alternative;
  }
  return Math.min(1, power);
}
