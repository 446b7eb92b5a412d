// Mantel & Haenszel (1959): one odds ratio, risk ratio and risk difference over strata, weighted so that sparse strata do no harm, with
// variances that hold for few large and for many small strata.
import { extended, type Effect, type EffectReason, type Interval } from '../../effect/contract.js';
import type { Stratum } from './stratum.js';

/** Over strata that hold units; empty ones add nothing. */
const sumOver = (strata: readonly Stratum[], term: (one: Stratum) => number): number =>
  strata.reduce((sum, one) => sum + (one.total === 0 ? 0 : term(one)), 0);

/** sum(a d / n) / sum(b c / n); null where both are 0. */
export function oddsRatio(strata: readonly Stratum[]): number | null {
  const above = sumOver(strata, ({ a, d, total }) => (a * d) / total);
  const below = sumOver(strata, ({ b, c, total }) => (b * c) / total);
  return above === 0 && below === 0 ? null : above / below;
}

/** Variance of ln OR (Robins, Breslow & Greenland 1986). */
export function logOddsRatioVariance(strata: readonly Stratum[]): number {
  const terms = strata
    .filter(({ total }) => total > 0)
    .map(({ a, b, c, d, total }) => ({
      p: (a + d) / total,
      q: (b + c) / total,
      r: (a * d) / total,
      s: (b * c) / total,
    }));
  const add = (of: (t: (typeof terms)[number]) => number): number => terms.reduce((sum, t) => sum + of(t), 0);
  const [r, s] = [add((t) => t.r), add((t) => t.s)];
  return (
    add((t) => t.p * t.r) / (2 * r * r) +
    add((t) => t.p * t.s + t.q * t.r) / (2 * r * s) +
    add((t) => t.q * t.s) / (2 * s * s)
  );
}

/** Strata with units in both groups: only there can risks be compared. */
const compared = (strata: readonly Stratum[]): Stratum[] =>
  strata.filter(({ first, second }) => first > 0 && second > 0);

/** sum(a n2 / n) / sum(c n1 / n); null where both are 0. */
export function riskRatio(strata: readonly Stratum[]): number | null {
  const above = sumOver(compared(strata), ({ a, second, total }) => (a * second) / total);
  const below = sumOver(compared(strata), ({ c, first, total }) => (c * first) / total);
  return above === 0 && below === 0 ? null : above / below;
}

/** Variance of ln RR (Greenland & Robins 1985). */
export function logRiskRatioVariance(strata: readonly Stratum[]): number {
  const both = compared(strata);
  const spread = sumOver(
    both,
    ({ a, c, first, second, events, total }) => (first * second * events - a * c * total) / total ** 2,
  );
  const above = sumOver(both, ({ a, second, total }) => (a * second) / total);
  const below = sumOver(both, ({ c, first, total }) => (c * first) / total);
  return spread / (above * below);
}

/** sum((a n2 - c n1) / n) / sum(n1 n2 / n); null where no stratum has units in both groups. */
export function riskDifference(strata: readonly Stratum[]): number | null {
  const both = compared(strata);
  if (both.length === 0) return null;
  const weight = sumOver(both, ({ first, second, total }) => (first * second) / total);
  return sumOver(both, ({ a, c, first, second, total }) => (a * second - c * first) / total) / weight;
}

/** Variance of RD (Sato 1989): holds for few large and for many small strata. */
export function riskDifferenceVariance(strata: readonly Stratum[], difference: number): number {
  const both = compared(strata);
  const p = sumOver(
    both,
    ({ a, c, first, second, total }) =>
      (first ** 2 * c - second ** 2 * a + (first * second * (second - first)) / 2) / total ** 2,
  );
  const q = sumOver(both, ({ a, c, first, second, total }) => (a * (second - c) + c * (first - a)) / (2 * total));
  const weight = sumOver(both, ({ first, second, total }) => (first * second) / total);
  return (difference * p + q) / weight ** 2;
}

/**
 * The three as effects with normal limits, ratios on the logarithmic scale.
 * @param z two-tailed normal quantile of the confidence
 */
export function mantelHaenszelEffects(strata: readonly Stratum[], z: number, confidence: number): Effect[] {
  const difference = riskDifference(strata);
  return [
    ratio('mantel-haenszel-odds-ratio', 'robins-breslow-greenland', oddsRatio(strata), () =>
      logOddsRatioVariance(strata),
    ),
    ratio('mantel-haenszel-risk-ratio', 'greenland-robins', riskRatio(strata), () => logRiskRatioVariance(strata)),
    {
      name: 'mantel-haenszel-risk-difference',
      estimate: difference,
      direction: 'first-minus-second',
      ...(difference === null ? { reason: 'empty-group' as const } : {}),
      intervals: difference === null ? [missing('sato', 'empty-group')] : [aroundDifference(difference)],
    },
  ];

  function ratio(name: string, method: string, estimate: number | null, variance: () => number): Effect {
    const direction = name.endsWith('risk-ratio') ? { direction: 'first-over-second' as const } : {};
    if (estimate === null) {
      return { name, estimate: null, reason: 'zero-cell', ...direction, intervals: [missing(method, 'zero-cell')] };
    }
    if (estimate === 0 || estimate === Infinity) {
      return { name, estimate: extended(estimate), ...direction, intervals: [missing(method, 'zero-cell')] };
    }
    const reach = z * Math.sqrt(Math.max(0, variance()));
    const interval = { method, confidence, lower: estimate * Math.exp(-reach), upper: estimate * Math.exp(reach) };
    return { name, estimate, ...direction, intervals: [{ ...interval, guaranteed: false }] };
  }

  function aroundDifference(estimate: number): Interval {
    const variance = riskDifferenceVariance(strata, estimate);
    if (!(variance > 0)) return missing('sato', 'zero-variance');
    const reach = z * Math.sqrt(variance);
    return { method: 'sato', confidence, lower: estimate - reach, upper: estimate + reach, guaranteed: false };
  }

  function missing(method: string, reason: EffectReason): Interval {
    return { method, confidence, lower: null, upper: null, reason };
  }
}

export interface ScoreTest {
  /** sum(a - E), positive when the event is more common in the first group. */
  readonly difference: number;
  readonly variance: number;
  /** difference^2 / variance. */
  readonly plain: number;
  /** (|difference| - 1/2)^2 / variance, 0 where |difference| < 1/2. */
  readonly corrected: number;
}

/** The chi-square on one degree of freedom of Mantel & Haenszel (1959). Strata of one table add nothing. */
export function scoreTest(strata: readonly Stratum[]): ScoreTest {
  const difference = sumOver(strata, ({ a, b, c, d, total }) => (a * d - b * c) / total);
  const variance = sumOver(strata, ({ first, second, events, others, total }) =>
    total < 2 ? 0 : ((((first / total) * second) / total) * events * others) / (total - 1),
  );
  const corrected = Math.max(0, Math.abs(difference) - 0.5);
  return { difference, variance, plain: difference ** 2 / variance, corrected: corrected ** 2 / variance };
}
