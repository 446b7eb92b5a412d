// Exact unconditional intervals: coverage added up over every outcome at pairs of proportions, and p at their limits.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { exactLimits } from '../../src/null/unconditional/exact-limits.js';
import { nullValueP } from '../../src/null/unconditional/null-value-p.js';
import { checked } from '../helpers/checked-result.js';

const binomial = (n: number, p: number): number[] => {
  const law = [(1 - p) ** n];
  for (let k = 1; k <= n; k++) law.push((((law[k - 1]! * (n - k + 1)) / k) * p) / (1 - p));
  return law;
};

describe.each(['difference', 'ratio'] as const)('the exact interval of a %s', (of) => {
  it.each([
    [4, 4],
    [3, 6],
  ])('covers at least as often as it says in groups of %i and %i', (firstSize, secondSize) => {
    const limits = Array.from({ length: (firstSize + 1) * (secondSize + 1) }, (_, k) => {
      const [firstEvents, secondEvents] = [Math.floor(k / (secondSize + 1)), k % (secondSize + 1)];
      return exactLimits({ firstSize, secondSize, firstEvents, secondEvents }, of, 0.05)!;
    });
    const grid = [0.02, 0.1, 0.25, 0.4, 0.5, 0.6, 0.75, 0.9, 0.98];
    for (const p1 of grid) {
      for (const p2 of grid) {
        const truth = of === 'difference' ? p1 - p2 : p1 / p2;
        const [first, second] = [binomial(firstSize, p1), binomial(secondSize, p2)];
        const covered = limits.reduce((sum, { lower, upper }, k) => {
          const weight = first[Math.floor(k / (secondSize + 1))]! * second[k % (secondSize + 1)]!;
          return lower <= truth && truth <= upper ? sum + weight : sum;
        }, 0);
        expect(covered).toBeGreaterThanOrEqual(0.9 - 1e-12);
      }
    }
  });

  it.each([
    [10, 7, 10, 2],
    [12, 11, 9, 4],
    [8, 1, 14, 6],
  ])('ends where the one-tailed p passes half of 1 - confidence (%i, %i, %i, %i)', (firstSize, a, secondSize, b) => {
    const seen = { firstSize, firstEvents: a, secondSize, secondEvents: b };
    const { lower, upper } = exactLimits(seen, of, 0.025)!;
    const step = (limit: number): number => (of === 'difference' ? 1e-8 : 1e-8 * (1 + limit) ** 2);
    const p = (value: number, tail: 'upper' | 'lower'): number => nullValueP(seen, { of, value }, tail).p;
    expect(p(lower - step(lower), 'upper')).toBeLessThanOrEqual(0.025);
    expect(p(lower + step(lower), 'upper')).toBeGreaterThan(0.025);
    expect(p(upper + step(upper), 'lower')).toBeLessThanOrEqual(0.025);
    expect(p(upper - step(upper), 'lower')).toBeGreaterThan(0.025);
  });
});

describe('in a result', () => {
  const counts = [
    [7, 3],
    [2, 8],
  ];
  const found = async (options: object, table = counts) =>
    checked(await analyse({ counts: table }, options))
      .effects!.filter(({ name }) => name === 'risk-difference' || name === 'risk-ratio')
      .map(({ intervals }) => intervals.find(({ method }) => method === 'chan-zhang'));

  it('they stand where the study fixed both group sizes, and only there', async () => {
    expect(await found({})).toEqual([undefined, undefined]);
    for (const interval of await found({ fixed: 'rows' })) expect(interval).toMatchObject({ guaranteed: true });
  });

  it('a reason stands in their place where they would take too much work', async () => {
    const reasons = (intervals: Awaited<ReturnType<typeof found>>) => intervals.map((one) => one!.reason);
    const large = counts.map((row) => row.map((n) => 20 * n));
    expect(reasons(await found({ fixed: 'rows' }, large))).toEqual(['beyond-effort', 'beyond-effort']);
  });
});
