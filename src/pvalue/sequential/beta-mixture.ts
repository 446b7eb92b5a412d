// How well a whole law of possible p explains the counts, next to the best single p: the measure behind limits that hold
// at every look (Darling & Robbins 1967; Robbins 1970). Any prior is valid; this one spends no draws where they settle nothing.
import { stirlingError } from '../../numeric/saddle-point.js';

interface BetaPart {
  readonly logWeight: number;
  readonly a: number;
  readonly c: number;
  readonly logBeta: number;
}

/** Three beta laws with weights that sum to 1. */
export type BetaMixture = readonly BetaPart[];

/** Below this the prior stays where it is: its second shape would grow until logarithms lose the digits that count. */
const lowestCentre = 1e-6;

/**
 * The prior for comparing p with `level`, in (0, 1):
 * - 0.70 Beta(20, .) with mean `level`: for a p near the level, where nearly all draws are spent;
 * - 0.25 Beta(1/2, .) with mean `level`: for a tiny p, so that few draws without a hit settle it;
 * - 0.05 Beta(1/2, 1/2): for any other p, so that its interval is no wider than need be.
 * Weights and strength by computation: for true p from 0 to twice a level of 0.01, 0.05 or 0.1 the expected draws are on average
 * within 1% of the best of twenty such choices. Boundaries that spend the risk exactly at the level (Gandy 2009) take 5 to 10%
 * fewer at 0.05 and 3% more to 6% fewer at 0.01, but give a verdict only, neither limits nor p, and their cost grows with the draws.
 */
export function mixtureAround(level: number): BetaMixture {
  const centre = Math.max(level, lowestCentre);
  const otherShape = (a: number): number => (a * (1 - centre)) / centre;
  return [part(0.7, 20, otherShape(20)), part(0.25, 0.5, otherShape(0.5)), part(0.05, 0.5, 0.5)];
}

const part = (weight: number, a: number, c: number): BetaPart => ({
  logWeight: Math.log(weight),
  a,
  c,
  logBeta: logGamma(a) + logGamma(c) - logGamma(a + c),
});

/**
 * ln of: probability of such a sequence of draws under the mixture, over its probability under p = hits/draws. At most 0.
 * hits and draws need not be whole; 0 <= hits <= draws, 0 < draws <= 1e15. Absolute error below 1e-7, and below 1e-12 for a
 * level of 0.01 or more. It is found without n ln n, which would swamp it.
 */
export function logEvidence(mixture: BetaMixture, hits: number, draws: number): number {
  const logs = mixture.map(
    ({ logWeight, a, c, logBeta }) =>
      logWeight + beyondEntropy(hits, a) + beyondEntropy(draws - hits, c) - beyondEntropy(draws, a + c) - logBeta,
  );
  const largest = Math.max(...logs);
  return largest + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - largest), 0));
}

/** ln Gamma(n + shape) - (n ln n - n). */
const beyondEntropy = (n: number, shape: number): number =>
  n === 0 ? logGamma(shape) : n * Math.log1p(shape / n) - shape + (shape - 0.5) * Math.log(n + shape) + tail(n + shape);

/** ln Gamma(w) - [(w - 1/2) ln w - w]: Stirling's series from 16, below that by recurrence. */
function tail(w: number): number {
  if (w >= 16) return halfLogTwoPi + stirlingError(w);
  return logGamma(w) - ((w - 0.5) * Math.log(w) - w);
}

const halfLogTwoPi = 0.9189385332046727; // ln(2 pi) / 2

/** ln Gamma(x), x > 0. */
function logGamma(x: number): number {
  if (x >= 16) return (x - 0.5) * Math.log(x) - x + halfLogTwoPi + stirlingError(x);
  let product = 1;
  let shifted = x;
  for (; shifted < 16; shifted++) product *= shifted;
  return logGamma(shifted) - Math.log(product);
}
