// Where an unconditional exact test rejects: outcomes in the order of the test, as many as keep the largest probability over
// the common proportion at or below alpha (Barnard 1945, 1947; Suissa & Shuster 1985; Boschloo 1970).
import { certifiedMaximum } from '../null/unconditional/certified-maximum.js';
import { pooledPolynomial } from '../null/unconditional/pooled-polynomial.js';
import { outcomeSet, type UnconditionalTail } from '../null/unconditional/unconditional-p.js';
import type { TwoGroupsSeen } from '../null/unconditional/outcomes.js';
import type { RejectionRegion, Sizes, TwoGroupTesting } from './design.js';

/** Two-tailed `doubled` is the union of both one-tailed regions at half the level. About log2(outcomes) maxima. */
export function unconditionalRegion(sizes: Sizes, testing: TwoGroupTesting): RejectionRegion {
  const alpha = Number(testing.alpha.numerator) / Number(testing.alpha.denominator);
  if (testing.tail === 'both' && testing.rule === 'doubled') {
    const [upper, lower] = (['upper', 'lower'] as const).map((tail) => regionOf(sizes, testing, tail, alpha / 2));
    return { ...sizes, inside: upper!.map((one, k) => (one === 1 || lower![k] === 1 ? 1 : 0)) };
  }
  const tail = testing.tail === 'both' ? testing.rule! : testing.tail;
  return { ...sizes, inside: regionOf(sizes, testing, tail as Exclude<UnconditionalTail, 'doubled'>, alpha) };
}

/**
 * The p of an outcome is the largest probability of all that are at least as extreme, so it rises from the most extreme one
 * on: the last outcome with p <= alpha is found by halving, and the region is its set.
 */
function regionOf(
  { first, second }: Sizes,
  { order }: TwoGroupTesting,
  tail: Exclude<UnconditionalTail, 'doubled'>,
  alpha: number,
): Uint8Array {
  const none = new Uint8Array((first + 1) * (second + 1));
  const seen = (index: number): TwoGroupsSeen => ({
    firstSize: first,
    secondSize: second,
    firstEvents: Math.floor(index / (second + 1)),
    secondEvents: index % (second + 1),
  });
  const setOf = (index: number): Uint8Array => outcomeSet(seen(index), order, tail).inside;
  let inside: Uint8Array = none;
  let left = inRoughOrder(first, second, tail);
  // Halving by the outcome in the middle of what is left: its set parts them into those as extreme and the others.
  while (left.length > 0) {
    const middle = left[left.length >> 1]!;
    const set = setOf(middle);
    const holds = largestProbability(first, second, set) <= alpha;
    if (holds) inside = set;
    left = left.filter((index) => (holds ? set[index] === 0 : set[index] === 1 && index !== middle));
  }
  return inside;
}

/** Most extreme first by the pooled statistic: near enough to every order to make good middles. */
function inRoughOrder(first: number, second: number, tail: Exclude<UnconditionalTail, 'doubled'>): number[] {
  const extremeness = new Float64Array((first + 1) * (second + 1));
  for (let x1 = 0, at = 0; x1 <= first; x1++) {
    for (let x2 = 0; x2 <= second; x2++, at++) {
      const events = x1 + x2;
      const apart = x1 * second - x2 * first;
      const value = apart === 0 ? 0 : apart / Math.sqrt(events * (first + second - events));
      extremeness[at] = tail === 'upper' ? value : tail === 'lower' ? -value : Math.abs(value);
    }
  }
  return Array.from(extremeness.keys()).sort((a, b) => extremeness[b]! - extremeness[a]!);
}

const sizeOf = (set: Uint8Array): number => set.reduce((sum, one) => sum + one, 0);

/** The proved upper bound, so that the level is held for certain. */
export function largestProbability(firstSize: number, secondSize: number, inside: Uint8Array): number {
  if (sizeOf(inside) === 0) return 0;
  const { coefficients, lnScale, relativeError } = pooledPolynomial({ firstSize, secondSize, inside });
  return Math.min(1, certifiedMaximum(coefficients, relativeError).upper * Math.exp(lnScale));
}
