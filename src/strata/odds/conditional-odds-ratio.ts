// The common odds ratio given every margin: its conditional maximum likelihood estimate and limits that invert the exact test
// (Cornfield 1956; Gart 1970; Mehta, Patel & Gray 1985), with equal tails, and mid limits that count the observed value by half.
import type { Interval } from '../../effect/contract.js';
import type { SumLaw } from './sum-law.js';

/** The odds ratio under which the mean of S is the observed one; 0 or Infinity at the ends of the support. Relative error about 1e-13. */
export function conditionalEstimate(law: SumLaw, observed: number): number {
  if (observed === law.lowest) return 0;
  if (observed === law.highest) return Infinity;
  return law.psiFor(observed);
}

export function conditionalIntervals(law: SumLaw, observed: number, confidence: number): Interval[] {
  const risk = (1 - confidence) / 2;
  const limits = (share: number): Pick<Interval, 'lower' | 'upper'> => ({
    lower: observed === law.lowest ? 0 : limit(law, observed, 1, share, risk),
    upper: observed === law.highest ? 'infinity' : limit(law, observed, -1, share, risk),
  });
  return [
    { method: 'exact-conditional', confidence, ...limits(1), invertsP: 'doubled', guaranteed: true },
    { method: 'mid-p-conditional', confidence, ...limits(0.5), invertsP: 'doubled mid-p', guaranteed: false },
  ];
}

/**
 * The psi at which P_psi(S beyond the observed value) + share x P_psi(S = observed) = risk, by bisection in ln psi ended by secant
 * steps. @param beyond 1: upper tail (for the lower limit), -1: lower tail. Relative error about 1e-12.
 */
function limit(law: SumLaw, observed: number, beyond: 1 | -1, share: number, risk: number): number {
  // The tail rises with psi when it is the upper one.
  const gap = (theta: number): number =>
    Math.log(tailUnder(law, Math.exp(theta), observed, beyond, share) / risk) * beyond;
  const start = law.psiFor(Math.min(law.highest - 0.25, Math.max(law.lowest + 0.25, observed)));
  let low = Math.log(start);
  let high = low;
  let gapLow = gap(low);
  let gapHigh = gapLow;
  const standardError = 1 / Math.sqrt(law.moments(start).variance);
  for (let step = 2 * standardError; gapLow > 0; step *= 2) {
    [high, gapHigh] = [low, gapLow];
    gapLow = gap((low -= step));
  }
  for (let step = 2 * standardError; gapHigh < 0; step *= 2) {
    [low, gapLow] = [high, gapHigh];
    gapHigh = gap((high += step));
  }
  return Math.exp(rootBetween(gap, low, gapLow, high, gapHigh));
}

/** Regula falsi with the weight of a stuck end halved (Dowell & Jarratt 1971), from gapLow <= 0 <= gapHigh. */
function rootBetween(gap: (x: number) => number, a: number, gapA: number, b: number, gapB: number): number {
  let [low, atLow, high, atHigh, last] = [a, gapA, b, gapB, 0];
  for (let round = 0; round < 200 && atLow !== 0 && atHigh !== 0; round++) {
    let next = high - (atHigh * (high - low)) / (atHigh - atLow);
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (high - low <= 1e-14 * Math.max(1, Math.abs(next))) return next;
    const value = gap(next);
    if (Math.abs(value) < 1e-14) return next;
    if (value > 0) {
      [high, atHigh] = [next, value];
      if (last > 0) atLow /= 2;
      last = 1;
    } else {
      [low, atLow] = [next, value];
      if (last < 0) atHigh /= 2;
      last = -1;
    }
  }
  return atLow === 0 ? low : atHigh === 0 ? high : (low + high) / 2;
}

/** P_psi(S > observed) (or <) plus share x P_psi(S = observed), from a law worked out under an odds ratio near by. */
function tailUnder(law: SumLaw, psi: number, observed: number, beyond: 1 | -1, share: number): number {
  const near = law.nearby(psi);
  const { from, high } = near.law;
  const logTilt = Math.log(psi / near.psi);
  let tail = 0;
  let whole = 0;
  for (let i = 0; i < high.length; i++) {
    const s = from + i;
    const weight = high[i]! * Math.exp(logTilt * (s - near.centre));
    whole += weight;
    if (s === observed) tail += share * weight;
    else if (beyond > 0 ? s > observed : s < observed) tail += weight;
  }
  return Math.max(tail / whole, Number.MIN_VALUE);
}
