// Quantiles of the standard normal, from our own tail.
import { normalUpperTail } from './chi-square-tail.js';

const density = (z: number): number => Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);

/**
 * z with P(Z >= z) = share, 0 < share <= 0.5. Relative error below 1e-13. Newton's steps on the logarithm of the tail, which is
 * concave: from above the root they come down to it and never pass it.
 */
export function upperNormalQuantile(share: number): number {
  const target = Math.log(share);
  let z = Math.sqrt(-2 * target);
  for (let turn = 0; turn < 60; turn++) {
    const { p, ln } = normalUpperTail(z);
    const step = ((ln - target) * p) / density(z);
    z += step;
    if (Math.abs(step) < 1e-15 * Math.max(1, z)) break;
  }
  return z;
}

/** The z of a two-sided interval: `confidence` of the law lies within z of its centre. */
export const zOfConfidence = (confidence: number): number => upperNormalQuantile((1 - confidence) / 2);
