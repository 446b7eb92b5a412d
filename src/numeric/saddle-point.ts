// The two pieces of the saddle-point expansion of factorials (Loader 2000, "Fast and accurate computation of binomial
// probabilities"): they stay small where ln n! and n ln n are large, so that nothing cancels.
import { logFactorial } from './log-factorial.js';

const halfLogTwoPi = 0.9189385332046727;

/** Stirling's error: ln n! - [(n + 1/2) ln n - n + ln(2 pi)/2], n whole and at least 1, or any n from 16. Absolute error below 1e-14. */
export function stirlingError(n: number): number {
  if (n < 16) return logFactorial(n) - ((n + 0.5) * Math.log(n) - n + halfLogTwoPi);
  const square = n * n;
  return (1 / 12 - (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / square) / square) / square) / square) / n;
}

/**
 * The deviance of a count from its expectation: n ln(n/e) - (n - e), at least 0; n >= 0, e > 0.
 * Relative error below 2^-46 of itself plus |n - e| 2^-52: near n = e by a series in ((n - e)/(n + e))^2, which does not cancel.
 */
export function devianceTerm(n: number, e: number): number {
  if (n === 0) return e;
  const difference = n - e;
  if (Math.abs(difference) < 0.1 * (n + e)) {
    const v = difference / (n + e);
    const square = v * v;
    let sum = difference * v;
    let term = 2 * n * v;
    for (let k = 3; k < 100; k += 2) {
      term *= square;
      const next = sum + term / k;
      if (next === sum) return next;
      sum = next;
    }
    return sum;
  }
  return n * Math.log(n / e) - difference;
}

/** What ln n! adds to n ln n - n: ln(2 pi n)/2 + Stirling's error, n whole; 0 for n = 0. Absolute error below 2e-14. */
export const beyondEntropy = (n: number): number => (n === 0 ? 0 : halfLogTwoPi + 0.5 * Math.log(n) + stirlingError(n));
