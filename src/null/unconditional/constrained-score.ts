// How far an outcome of two groups lies from a stated difference or ratio of proportions: the score statistic, its variance at
// the proportions that fit best under the statement (Miettinen & Nurminen 1985; Farrington & Manning 1990; Koopman 1984 for
// the ratio). Their factor n / (n - 1) changes no order and is left out.
import type { TwoGroupsSeen } from './outcomes.js';

/** p1 - p2 = value, in (-1, 1); or p1 / p2 = value, above 0. */
export interface NullValue {
  readonly of: 'difference' | 'ratio';
  readonly value: number;
}

/** Rises with x1 and falls with x2; 0 where departure and variance are both 0, else infinite where the variance is 0. */
export type OutcomeScore = (x1: number, x2: number) => number;

/** Relative error below 1e-9 where the score is not near 0; absolute below 1e-9 there. */
export function constrainedScore(
  { firstSize: n1, secondSize: n2 }: Pick<TwoGroupsSeen, 'firstSize' | 'secondSize'>,
  nullValue: NullValue,
): OutcomeScore {
  const { of, value } = nullValue;
  return (x1, x2) => {
    if (of === 'difference') {
      const p1 = firstUnderDifference(n1, n2, x1, x2, value);
      const p2 = clamp(p1 - value);
      return standardised(x1 / n1 - x2 / n2 - value, (p1 * (1 - p1)) / n1 + (p2 * (1 - p2)) / n2);
    }
    const p2 = secondUnderRatio(n1, n2, x1, x2, value);
    const p1 = clamp(value * p2);
    return standardised(x1 / n1 - value * (x2 / n2), (p1 * (1 - p1)) / n1 + (value * value * p2 * (1 - p2)) / n2);
  };
}

const clamp = (share: number): number => Math.min(1, Math.max(0, share));

function standardised(departure: number, variance: number): number {
  if (Math.abs(departure) < 1e-14) return 0;
  return variance < 1e-300 ? Math.sign(departure) * Infinity : departure / Math.sqrt(variance);
}

/** The smaller root of a quadratic (Miettinen & Nurminen 1985), in the form without cancellation. */
function secondUnderRatio(n1: number, n2: number, x1: number, x2: number, ratio: number): number {
  const b = n1 * ratio + x1 + n2 + x2 * ratio;
  const c = x1 + x2;
  const root = Math.sqrt(Math.max(0, b * b - 4 * (n1 + n2) * ratio * c));
  return Math.min(1, 1 / ratio, (2 * c) / (b + root));
}

/** The root of the likelihood's cubic in closed form (Farrington & Manning 1990), then Newton steps that stay between signs. */
function firstUnderDifference(n1: number, n2: number, x1: number, x2: number, delta: number): number {
  const [lowest, highest] = [Math.max(0, delta), Math.min(1, 1 + delta)];
  const theta = n2 / n1;
  const [s1, s2] = [x1 / n1, x2 / n2];
  const a = 1 + theta;
  const b = -(1 + theta + s1 + theta * s2 + delta * (theta + 2));
  const c = delta * delta + delta * (2 * s1 + theta + 1) + s1 + theta * s2;
  const d = -s1 * delta * (1 + delta);
  const v = (b / (3 * a)) ** 3 - (b * c) / (6 * a * a) + d / (2 * a);
  const u = (v < 0 ? -1 : 1) * Math.sqrt(Math.max(0, (b / (3 * a)) ** 2 - c / (3 * a)));
  const w = (Math.PI + Math.acos(Math.min(1, Math.max(-1, u === 0 ? 0 : v / u ** 3)))) / 3;
  const value = (p: number): number => ((a * p + b) * p + c) * p + d;
  let p = Math.min(highest, Math.max(lowest, 2 * u * Math.cos(w) - b / (3 * a)));
  for (let step = 0; step < 3; step++) {
    const slope = (3 * a * p + 2 * b) * p + c;
    const next = p - value(p) / slope;
    if (!(next >= lowest && next <= highest) || Math.abs(next - p) > 1e-4) break;
    p = next;
  }
  return p;
}
