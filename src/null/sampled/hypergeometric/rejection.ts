// One hypergeometric count at a cost that does not grow with its spread: transformed rejection with squeeze
// (Hormann 1993, "The generation of binomial random variates"), whose hat and squeeze hold for hypergeometric laws too once
// the variance is 9 or more: test/null/sampled/rejection.law.test.ts evaluates both inequalities outcome by outcome over laws of
// every skewness. About 1.2 proposals a count, four in five accepted without looking at the law.
import type { UniformSource } from '../../../random/stream.js';
import { invert } from './inversion.js';
import type { HypergeometricMass } from './mass.js';
import { leastOf, modeOf, mostOf, varianceOf } from './spread.js';

/** From here on hat and squeeze are shown to hold. */
export const leastVarianceForRejection = 9;

/** Shape of the hat for a standard deviation; exported for the proof. A proposal is floor((2 a/(1/2 - |v|) + b) v + c). */
export const hatSlope = (deviation: number): number => 1.15 + 2.53 * deviation; // b
export const hatCurve = (slope: number): number => -0.0873 + 0.0248 * slope; // a
export const hatHeight = (deviation: number, slope: number): number => (2.83 + 5.1 / slope) * deviation; // alpha
export const squeezeHeight = (slope: number): number => 0.92 - 4.2 / slope;
export const squeezeEdge = 0.07;

/**
 * A count from the law of (total, marked, drawn), by inversion where the hat may not hold.
 * The position takes 53 bits, because a wide law spreads 2^32 points too thinly over its outcomes; so does the height where
 * it matters.
 */
export function reject(
  source: UniformSource,
  mass: HypergeometricMass,
  total: number,
  marked: number,
  drawn: number,
): number {
  const variance = varianceOf(total, marked, drawn);
  if (variance < leastVarianceForRejection) return invert(source, source.word(), mass, total, marked, drawn);
  const deviation = Math.sqrt(variance);
  const slope = hatSlope(deviation);
  const curve = 2 * hatCurve(slope);
  const centre = (drawn * marked) / total + 0.5;
  const whole = Math.floor(centre);
  const fraction = centre - whole;
  const squeeze = squeezeHeight(slope);
  for (;;) {
    const v = source.uniform() + source.uniform() * 2 ** -32 - 0.5;
    const height = source.uniform();
    const edge = 0.5 - Math.abs(v);
    const x = whole + Math.floor((curve / edge + slope) * v + fraction);
    if (edge >= squeezeEdge && height < squeeze) return x;
    if (x < leastOf(total, marked, drawn) || x > mostOf(marked, drawn)) continue;
    const fine = height + source.uniform() * 2 ** -32;
    const hat = hatHeight(deviation, slope) / (curve / 2 / (edge * edge) + slope);
    const mode = modeOf(total, marked, drawn);
    if (fine * hat <= mass.relativeTo(mode, total, marked, drawn, x)) return x;
  }
}
