// Exact probabilities of a sequence of looks: the law of the number of hits is carried from block to block, and what crosses a
// boundary is taken out. No simulation, hence no luck in the tests that use it.
import { logFactorial } from '../../../src/numeric/log-factorial.js';
import type { BetaMixture } from '../../../src/pvalue/sequential/beta-mixture.js';
import { limitsAt } from '../../../src/pvalue/sequential/limits.js';

/** For each look: hits at or below `low` stop below, at or above `high` above. */
export interface Boundaries {
  readonly blockSize: number;
  readonly low: readonly number[];
  readonly high: readonly number[];
}

export interface Walked {
  readonly below: number;
  readonly above: number;
  /** Still going after the last look. */
  readonly left: number;
  /** Left out because too small to carry; belongs to any of the three. */
  readonly lost: number;
  readonly expectedDraws: number;
}

/** What happens when every draw is a hit with probability p, 0 < p < 1. */
export function walk(p: number, { blockSize, low, high }: Boundaries): Walked {
  const block = blockLaw(p, blockSize);
  let law: Law = { from: 0, weights: Float64Array.of(1) };
  const result = { below: 0, above: 0, left: 1, lost: 0, expectedDraws: 0 };
  for (let k = 0; k < low.length && law.weights.length > 0; k++) {
    result.expectedDraws += blockSize * result.left;
    const { from, weights } = added(law, block);
    let first = 0;
    let last = weights.length - 1;
    for (; first <= last && from + first <= low[k]!; first++) result.below += weights[first]!;
    for (; last >= first && from + last >= high[k]!; last--) result.above += weights[last]!;
    for (; first <= last && weights[first]! < tooSmall; first++) result.lost += weights[first]!;
    for (; last >= first && weights[last]! < tooSmall; last--) result.lost += weights[last]!;
    law = { from: from + first, weights: weights.subarray(first, last + 1) };
    result.left = law.weights.reduce((sum, weight) => sum + weight, 0);
  }
  // What the block law leaves out at its ends goes missing at every look; it is counted with the lost.
  return { ...result, lost: Math.max(result.lost, 1 - result.below - result.above - result.left) };
}

/** The laws are sums of at most a few million terms below 1, each with a relative error of some 1e-13. */
export const roundingOfWalks = 1e-10;

/** Weights of from, from + 1 ... hits. */
export interface Law {
  readonly from: number;
  readonly weights: Float64Array;
}

const tooSmall = 1e-22;

/** Binomial, without the ends that hold less than 1e-18. */
export function blockLaw(p: number, size: number): Law {
  const spread = 9 * Math.sqrt(size * p * (1 - p)) + 20;
  const from = Math.max(0, Math.floor(size * p - spread));
  const to = Math.min(size, Math.ceil(size * p + spread));
  return {
    from,
    weights: Float64Array.from({ length: to - from + 1 }, (_, i) =>
      Math.exp(
        logFactorial(size) -
          logFactorial(from + i) -
          logFactorial(size - from - i) +
          (from + i) * Math.log(p) +
          (size - from - i) * Math.log1p(-p),
      ),
    ),
  };
}

export function added(one: Law, other: Law): Law {
  const weights = new Float64Array(one.weights.length + other.weights.length - 1);
  for (let i = 0; i < one.weights.length; i++) {
    const weight = one.weights[i]!;
    for (let j = 0; j < other.weights.length; j++) weights[i + j]! += weight * other.weights[j]!;
  }
  return { from: one.from + other.from, weights };
}

type Limits = readonly [number, number];

/**
 * Boundaries after each of `blocks` looks, from what their limits say.
 * @param tooLow whether limits stop below; if so for some hits, then for all fewer
 * @param tooHigh the same above, for all more
 */
export function boundaries(
  blocks: number,
  blockSize: number,
  limits: (hits: number, draws: number) => Limits,
  tooLow: (limits: Limits) => boolean,
  tooHigh: (limits: Limits) => boolean,
): Boundaries {
  const low: number[] = [];
  const high: number[] = [];
  for (let k = 1; k <= blocks; k++) {
    const draws = k * blockSize;
    low.push(lastWhere(draws, (hits) => tooLow(limits(hits, draws))));
    high.push(draws - lastWhere(draws, (misses) => tooHigh(limits(draws - misses, draws))));
  }
  return { blockSize, low, high };
}

/** Largest number up to `most` for which it holds, when it holds for all smaller ones; -1 if for none. */
function lastWhere(most: number, holds: (count: number) => boolean): number {
  let yes = -1;
  let no = most + 1;
  while (no - yes > 1) {
    const middle = Math.floor((yes + no) / 2);
    if (holds(middle)) yes = middle;
    else no = middle;
  }
  return yes;
}

/** Counts at which a look leaves the true p out. */
export const missing = (blocks: number, blockSize: number, mixture: BetaMixture, risk: number, p: number): Boundaries =>
  boundaries(
    blocks,
    blockSize,
    (hits, draws) => limitsAt(mixture, risk, hits, draws),
    ([, upper]) => upper < p,
    ([lower]) => lower > p,
  );

/** Counts at which p is settled against alpha. */
export const settling = (
  blocks: number,
  blockSize: number,
  mixture: BetaMixture,
  risk: number,
  alpha: number,
): Boundaries =>
  boundaries(
    blocks,
    blockSize,
    (hits, draws) => limitsAt(mixture, risk, hits, draws),
    ([, upper]) => upper + risk <= alpha,
    ([lower]) => lower > alpha,
  );
