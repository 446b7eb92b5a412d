// The ordering by the smaller tail against its definition in whole numbers, for 2x2 tables and for trend.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { tablesWith, factorial } from '../../../fixtures/reference/generator/oracle.js';
import { answer } from '../../../src/analyse.js';
import { relativeDifference, smallTable, twoByTwoTable } from '../../helpers/tables.js';

/** P(gamma(S) <= gamma(observed)) for S = sum i j n_ij, gamma the smaller tail, every table listed. */
function byDefinition(counts: number[][]): number {
  const width = counts[0]!.length;
  const rowTotals = counts.map((row) => row.reduce((a, b) => a + b, 0));
  const columnTotals = counts[0]!.map((_, j) => counts.reduce((sum, row) => sum + row[j]!, 0));
  const value = (table: readonly number[]): number =>
    table.reduce((sum, n, k) => sum + Math.floor(k / width) * (k % width) * n, 0);
  const all = factorial(rowTotals.reduce((a, b) => a + b, 0)) ** 2n;
  const law = new Map<number, bigint>();
  for (const table of tablesWith(rowTotals, columnTotals)) {
    const weight = table.reduce((rest, n) => rest / factorial(n), all);
    law.set(value(table), (law.get(value(table)) ?? 0n) + weight);
  }
  const whole = [...law.values()].reduce((a, b) => a + b, 0n);
  const tail = (holds: (s: number) => boolean): bigint =>
    [...law].reduce((sum, [s, weight]) => (holds(s) ? sum + weight : sum), 0n);
  const gamma = (s: number): bigint => {
    const [lower, upper] = [tail((t) => t <= s), tail((t) => t >= s)];
    return lower < upper ? lower : upper;
  };
  const limit = gamma(value(counts.flat()));
  const mass = [...law].reduce((sum, [s, weight]) => (gamma(s) <= limit ? sum + weight : sum), 0n);
  return Number((mass * 10n ** 20n) / whole) / 1e20;
}

describe('p by the smaller tail (Blaker 2000)', () => {
  it.each(['score', 'wald', 'trend'])('is that of its definition: 2x2, %s', async (statistic) => {
    await fc.assert(
      fc.asyncProperty(twoByTwoTable, async (counts) => {
        const { pValues } = await answer({ counts }, { statistic, twoSidedRule: 'blaker', method: 'exact' });
        expect(relativeDifference(pValues[0]!.p!, byDefinition(counts))).toBeLessThan(1e-12);
      }),
      { numRuns: 60 },
    );
  });

  it('is that of its definition: trend in larger tables', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, async (counts) => {
        const { pValues } = await answer({ counts }, { statistic: 'trend', twoSidedRule: 'blaker', method: 'exact' });
        expect(relativeDifference(pValues[0]!.p!, byDefinition(counts))).toBeLessThan(1e-12);
      }),
      { numRuns: 60 },
    );
  });

  it.each([
    ['score', 'rule-needs-exact'],
    ['trend', 'rule-needs-exact'],
  ])('is refused where tables are drawn: %s', async (statistic, code) => {
    const asked = answer({ counts: [[3, 4, 1], [5, 2, 6]].map((row) => (statistic === 'score' ? row.slice(0, 2) : row)) }, { statistic, twoSidedRule: 'blaker', method: 'sample' }); // prettier-ignore
    await expect(asked).rejects.toMatchObject({ code });
  });
});
