// The interval of one look: all p that the mixture does not discredit, {p : mixture probability / probability under p < 1 / risk}.
// For a fixed p that ratio is a martingale of mean 1, so by Ville's inequality (1939) it ever reaches 1 / risk with
// probability at most risk: the intervals of all looks hold the true p together (Robbins 1970).
import { devianceTerm } from '../../numeric/saddle-point.js';
import { smallestDouble } from '../contract.js';
import { logEvidence, type BetaMixture } from './beta-mixture.js';

/** How far (in ln likelihood) p may fall behind hits/draws before it is discredited. Positive; grows with ln draws. */
export const allowedDeviance = (mixture: BetaMixture, risk: number, hits: number, draws: number): number =>
  -Math.log(risk) - logEvidence(mixture, hits, draws);

/** ln likelihood of hits/draws over that of p; 0 < p < 1. */
export const deviance = (hits: number, draws: number, p: number): number =>
  devianceTerm(hits, draws * p) + devianceTerm(draws - hits, draws * (1 - p));

/** [lower, upper] of one look, 0 <= hits <= draws, 0 < draws <= 1e15, 0 < risk < 1; limits are never inside the true ones by more than rounding. */
export function limitsAt(mixture: BetaMixture, risk: number, hits: number, draws: number): [number, number] {
  const allowed = allowedDeviance(mixture, risk, hits, draws);
  const misses = draws - hits;
  // Solved for the rarer of hits and misses, so that a limit near 1 is found by its distance from 1.
  return hits <= misses
    ? [below(hits, draws, allowed), above(hits, draws, allowed)]
    : [1 - above(misses, draws, allowed), 1 - below(misses, draws, allowed)];
}

/**
 * The p above hits/draws with that deviance; hits <= draws/2. Newton's steps from a point beyond the root: the deviance is convex in
 * p, so they come back to the root from outside and never pass it.
 */
function above(hits: number, draws: number, allowed: number): number {
  if (hits === 0) return -Math.expm1(-allowed / draws);
  const share = hits / draws;
  const misses = draws - hits;
  // Both are beyond the root: deviance >= draws (p - share)^2 / (2 p), and >= hits ln share + misses ln((1 - share)/(1 - p)).
  const step = allowed / draws;
  const byBernstein = share + step + Math.sqrt(step * (step + 2 * share));
  const byMisses = -Math.expm1(Math.log1p(-share) + (hits * Math.log(share) - allowed) / misses);
  return descend(hits, draws, allowed, Math.min(byBernstein, byMisses));
}

/** The same below hits/draws. */
function below(hits: number, draws: number, allowed: number): number {
  if (hits === 0) return 0;
  const share = hits / draws;
  const misses = draws - hits;
  // deviance >= draws (share - p)^2 / (2 share), and >= hits ln(share / p) + misses ln(1 - share).
  const bySquare = share - Math.sqrt((2 * share * allowed) / draws);
  const byHits = share * Math.exp((misses * Math.log1p(-share) - allowed) / hits);
  const start = Math.max(bySquare, byHits);
  // Beyond the doubles that have all their digits 0 is as good a limit, and no quotient overflows.
  return start < smallestDouble ? 0 : descend(hits, draws, allowed, start);
}

function descend(hits: number, draws: number, allowed: number, start: number): number {
  const share = hits / draws;
  let p = start;
  for (let step = 0; step < mostSteps && p > 0 && p < 1; step++) {
    const excess = deviance(hits, draws, p) - allowed;
    const next = p - (excess * p * (1 - p)) / (draws * (p - share));
    // From outside the steps point inwards; the first that does not is rounding, and so is one too small to see.
    if (excess <= 0 || Math.abs(next - p) <= 4 * Number.EPSILON * p) return p;
    p = next;
  }
  return p;
}

/** Each step at least doubles the digits once near; ten are enough from the worst start. */
const mostSteps = 60;
