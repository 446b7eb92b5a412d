// The probability of a set of outcomes when both groups have one proportion: sum over t of w_t C(n, t) q^t (1 - q)^(n - t), a
// polynomial in q whose Bernstein coefficients w_t are the conditional probabilities of the set given t events.
import { logFactorial } from '../../numeric/log-factorial.js';
import { groupLaw, lawError, type GroupLaw } from './group-law.js';
import type { OutcomeSet } from './outcomes.js';

export interface ScaledPolynomial {
  /** Bernstein coefficients divided by e^lnScale, all >= 0, the largest near 1. */
  readonly coefficients: Float64Array;
  readonly lnScale: number;
  readonly relativeError: number;
}

/** O(firstSize x secondSize). */
export function pooledPolynomial(set: OutcomeSet): ScaledPolynomial {
  const { firstSize, secondSize } = set;
  const degree = firstSize + secondSize;
  const logs = new Float64Array(degree + 1).fill(-Infinity);
  for (let t = 0; t <= degree; t++) {
    const law = groupLaw(firstSize, secondSize, t);
    const sum = massInside(set, law, t);
    if (sum === law.whole) logs[t] = 0;
    else if (sum > 0) logs[t] = Math.log(sum) - Math.log(law.whole);
    else logs[t] = farMass(set, law, t);
  }
  const lnScale = logs.reduce((most, one) => Math.max(most, one), -Infinity);
  return {
    coefficients: logs.map((log) => Math.exp(log - lnScale)),
    lnScale,
    relativeError: lawError(firstSize, secondSize) + 1e-13 + Math.abs(lnScale) * 2 ** -51,
  };
}

function massInside(
  { secondSize, inside }: OutcomeSet,
  { lowest, highest, weights, whole }: GroupLaw,
  t: number,
): number {
  let sum = 0;
  let left = 0;
  for (let x = lowest; x <= highest; x++) {
    if (inside[x * (secondSize + 1) + t - x] === 1) sum += weights[x - lowest]!;
    else left++;
  }
  return left === 0 ? whole : sum;
}

/** ln of a mass below 1e-600 of the mode: the sum by logarithms, the largest term first. */
function farMass({ firstSize, secondSize, inside }: OutcomeSet, { lowest, highest }: GroupLaw, t: number): number {
  const logChoose = (n: number, k: number): number => logFactorial(n) - logFactorial(k) - logFactorial(n - k);
  const whole = logChoose(firstSize + secondSize, t);
  const logs: number[] = [];
  for (let x = lowest; x <= highest; x++) {
    if (inside[x * (secondSize + 1) + t - x] === 1) {
      logs.push(logChoose(firstSize, x) + logChoose(secondSize, t - x) - whole);
    }
  }
  if (logs.length === 0) return -Infinity;
  const most = logs.reduce((a, b) => Math.max(a, b));
  return most + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - most), 0));
}
