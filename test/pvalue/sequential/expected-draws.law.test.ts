// How many draws it takes, by exact calculation, at the standard settings; and what boundaries without limits and p would take.
import { describe, expect, it } from 'vitest';
import { mixtureAround } from '../../../src/pvalue/sequential/beta-mixture.js';
import { settling, walk, type Boundaries } from './exact-walk.js';
import { spentBoundaries } from './spent-boundaries.js';

const blockSize = 1000;
const limit = 1_000_000;

const rule = (alpha: number): Boundaries =>
  settling(limit / blockSize, blockSize, mixtureAround(alpha), alpha / 100, alpha);

describe('draws until p is settled against 0.05, at most a million', () => {
  const boundary = rule(0.05);

  it.each([
    // true p, expected draws (rounded up)
    [1e-6, 1000],
    [0.01, 1001],
    [0.02, 1360],
    [0.03, 2740],
    [0.04, 10_300],
    [0.045, 46_200],
    [0.0475, 249_000],
    [0.05, 1_000_000],
    [0.0525, 164_000],
    [0.055, 40_500],
    [0.06, 10_800],
    [0.075, 2430],
    [0.1, 1070],
    [0.2, 1000],
    [0.5, 1000],
  ])('a true p of %d takes %d on average', (p, draws) => {
    const { expectedDraws } = walk(p, boundary);
    expect(expectedDraws).toBeLessThanOrEqual(draws);
    expect(expectedDraws).toBeGreaterThan(0.98 * draws);
  });
});

describe('against boundaries that spend the same risk exactly at the level', () => {
  it.each([0.05, 0.01])(
    'level %d: it takes a ninth more draws at most, on average over true p from 0 to twice the level',
    (alpha) => {
      const risk = alpha / 100;
      const ours = rule(alpha);
      const sides = { belowAt: alpha - risk, aboveAt: alpha, risk: risk / 2 };
      for (const halfTime of [1000, 10_000]) {
        const spent = spentBoundaries({ blocks: limit / blockSize, blockSize, ...sides, halfTime });
        const ratios = [0.2, 0.4, 0.6, 0.7, 0.8, 0.9, 0.94, 1.06, 1.1, 1.2, 1.3, 1.5, 2].map(
          (times) => walk(times * alpha, ours).expectedDraws / walk(times * alpha, spent).expectedDraws,
        );
        const onAverage = Math.exp(ratios.reduce((sum, ratio) => sum + Math.log(ratio), 0) / ratios.length);
        expect(onAverage).toBeLessThan(1.111);
        expect(Math.max(...ratios)).toBeLessThan(1.35);
      }
    },
  );
});

describe('a risk of a hundredth of alpha', () => {
  const draws = (risk: number, p: number): number =>
    walk(p, settling(limit / blockSize, blockSize, mixtureAround(0.05), risk, 0.05)).expectedDraws;

  it('takes fewer draws just below alpha than a fiftieth, and fewer just above than a five-hundredth', () => {
    expect(draws(0.001, 0.045) / draws(0.0005, 0.045)).toBeGreaterThan(1.15);
    expect(draws(0.0001, 0.055) / draws(0.0005, 0.055)).toBeGreaterThan(1.15);
    expect(draws(0.0001, 0.045) / draws(0.0005, 0.045)).toBeGreaterThan(0.97);
    expect(draws(0.001, 0.055) / draws(0.0005, 0.055)).toBeGreaterThan(0.92);
  });
});
