// How often the intervals hold the truth, worked out exactly over pairs of binomial proportions: exact ones at least as often as
// they promise, the others as often as they do here (no promise: a change of the order of magnitude is a defect).
import { describe, expect, it } from 'vitest';
import { conditionalOddsRatio } from '../../src/effect/conditional/conditional-odds-ratio.js';
import { asNumber } from '../../src/effect/contract.js';
import { oddsRatio } from '../../src/effect/odds-ratio.js';
import { riskDifference } from '../../src/effect/risk-difference.js';
import { riskRatio } from '../../src/effect/risk-ratio.js';

const settings = { confidence: 0.95 };
const designs = [
  [10, 10],
  [10, 20],
] as const;
const grid = [0.05, 0.1, 0.2, 0.35, 0.5, 0.65, 0.8, 0.9, 0.95];

const binomial = (n: number, p: number): number[] => {
  const law = [(1 - p) ** n];
  for (let k = 1; k <= n; k++) law.push((((law[k - 1]! * (n - k + 1)) / k) * p) / (1 - p));
  return law;
};

const truths: Readonly<Record<string, (p1: number, p2: number) => number>> = {
  'risk-difference': (p1, p2) => p1 - p2,
  'risk-ratio': (p1, p2) => p1 / p2,
  'odds-ratio': (p1, p2) => ((p1 / (1 - p1)) * (1 - p2)) / p2,
  'conditional-odds-ratio': (p1, p2) => ((p1 / (1 - p1)) * (1 - p2)) / p2,
};

/** Smallest and mean coverage of each method over the grid, among the tables for which its interval exists. */
function coverages(): Map<string, { least: number; mean: number }> {
  const found = new Map<string, number[]>();
  for (const [first, second] of designs) {
    const intervals = new Map<string, { effect: string; ends: ([number, number] | undefined)[] }>();
    for (let a = 0; a <= first; a++) {
      for (let c = 0; c <= second; c++) {
        const groups = { first: { events: a, size: first }, second: { events: c, size: second } };
        for (const measure of [riskDifference, riskRatio, oddsRatio, conditionalOddsRatio]) {
          const effect = measure(groups, settings);
          for (const { method, lower, upper } of effect.intervals) {
            const key = `${effect.name} ${method}`;
            if (!intervals.has(key)) intervals.set(key, { effect: effect.name, ends: [] });
            intervals.get(key)!.ends.push(lower === null ? undefined : [asNumber(lower), asNumber(upper!)]);
          }
        }
      }
    }
    for (const p1 of grid) {
      for (const p2 of grid) {
        const [law1, law2] = [binomial(first, p1), binomial(second, p2)];
        for (const [key, { effect, ends }] of intervals) {
          const truth = truths[effect]!(p1, p2);
          // A truth that stands on a limit counts, whatever the last digit of either.
          const slack = 1e-11 * Math.max(1, Math.abs(truth));
          let covered = 0;
          let exists = 0;
          ends.forEach((interval, k) => {
            if (interval === undefined) return;
            const weight = law1[Math.floor(k / (second + 1))]! * law2[k % (second + 1)]!;
            exists += weight;
            if (interval[0] - slack <= truth && truth <= interval[1] + slack) covered += weight;
          });
          found.set(key, [...(found.get(key) ?? []), covered / exists]);
        }
      }
    }
  }
  return new Map(
    [...found].map(([key, all]) => [
      key,
      { least: Math.min(...all), mean: all.reduce((sum, one) => sum + one, 0) / all.length },
    ]),
  );
}

describe('coverage at 95%', () => {
  const found = coverages();

  it.each(['central', 'probability', 'blaker'])('exact, %s: never below', (method) => {
    expect(found.get(`conditional-odds-ratio ${method}`)!.least).toBeGreaterThan(0.95);
  });

  it.each([
    ['risk-difference newcombe', 0.9],
    ['risk-difference miettinen-nurminen', 0.9],
    ['risk-ratio log', 0.7],
    ['risk-ratio koopman', 0.9],
    ['risk-ratio miettinen-nurminen', 0.9],
    ['odds-ratio woolf', 0.88],
    ['conditional-odds-ratio mid-p', 0.93],
  ] as const)('%s: at least %d here, and near the level on average', (key, floor) => {
    const { least, mean } = found.get(key)!;
    expect(least).toBeGreaterThan(floor);
    expect(least).toBeLessThan(0.97);
    expect(mean).toBeGreaterThan(0.93);
  });
});
