// A sampled p must earn the interval printed beside it.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import { logFactorial } from '../src/numeric/log-factorial.js';
import type { Result } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';
import { smallTable, twoByTwoTable } from './helpers/tables.js';

const samplingOf = (result: Result): { atLeast: number; draws: number; interval: [number, number] } => {
  const error = result.pValues[0]!.errors[0]!;
  if (error.kind !== 'sampling') throw new Error('not sampled');
  return error;
};

/** Smallest k with P(Bin(n, p) <= k) at least the level. */
function binomialQuantile(n: number, p: number, level: number): number {
  let below = 0;
  for (let k = 0; ; k++) {
    const ln = logFactorial(n) - logFactorial(k) - logFactorial(n - k) + k * Math.log(p) + (n - k) * Math.log1p(-p);
    below += Math.exp(ln);
    if (below >= level) return k;
  }
}

describe('sampled p-values', () => {
  it('99% intervals of 2,000 tables miss the exact p no more often than chance allows (1 - 1e-6 quantile)', async () => {
    const tables = fc.sample(fc.oneof(smallTable, twoByTwoTable), { numRuns: 2000, seed: 21 });
    let missed = 0;
    for (const [k, counts] of tables.entries()) {
      const statistic = ['pearson', 'likelihood-ratio', 'probability'][k % 3]!;
      const exact = await analyse({ counts }, { statistic, method: 'exact' });
      const sampled = await analyse({ counts }, { statistic, method: 'sample', draws: 500, seed: `law ${k}` });
      const { interval } = samplingOf(k % 50 === 0 ? checked(sampled) : sampled);
      const p = exact.pValues[0]!.p!;
      // An exact p of 1 is met by an interval that ends at 1.
      if (p < interval[0] * (1 - 1e-12) || p > interval[1] * (1 + 1e-12)) missed++;
    }
    expect(missed).toBeLessThanOrEqual(binomialQuantile(2000, 0.01, 1 - 1e-6));
    // A generator stuck on one table, or an interval of everything, would miss far too rarely or far too often.
    expect(missed).toBeGreaterThan(0);
  });

  it('wald by every rule: the interval holds the exact p on a fixed table', async () => {
    const counts = [
      [8, 2],
      [1, 9],
    ];
    for (const twoSidedRule of ['distance', 'probability', 'doubled'] as const) {
      const options = { statistic: 'wald', twoSidedRule };
      const exact = await analyse({ counts }, { ...options, method: 'exact' });
      const sampled = checked(
        await analyse({ counts }, { ...options, method: 'sample', draws: 50_000, seed: 'rules' }),
      );
      sampled.pValues
        .filter((p) => p.method === 'sample')
        .forEach((p, k) => {
          const error = p.errors[0]!;
          if (error.kind !== 'sampling') throw new Error('not sampled');
          expect(error.interval[0]).toBeLessThanOrEqual(exact.pValues[k]!.p!);
          expect(error.interval[1]).toBeGreaterThanOrEqual(exact.pValues[k]!.p!);
        });
      const headline = sampled.pValues[0]!;
      if (twoSidedRule === 'doubled' && headline.errors[0]!.kind === 'sampling') {
        const { tails, draws } = headline.errors[0]!;
        expect(headline.p).toBe(Math.min(1, (2 * (Math.min(tails!.upper, tails!.lower) + 1)) / (draws + 1)));
      }
    }
  });

  it('the same seed gives the same result, another seed another; a seed is text', async () => {
    const counts = [
      [3, 0, 2],
      [1, 4, 0],
      [2, 2, 3],
    ];
    const run = async (seed: string): Promise<string> =>
      JSON.stringify(await analyse({ counts }, { method: 'sample', draws: 3000, seed }));
    expect(await run('1')).toBe(await run('1'));
    expect(samplingOf(JSON.parse(await run('1')) as Result).atLeast).not.toBe(
      samplingOf(JSON.parse(await run('01')) as Result).atLeast,
    );
  });

  it('p is (b + 1)/(m + 1), never 0, for a table that no draw reaches', async () => {
    const counts = [
      [60, 0],
      [0, 60],
    ];
    const result = checked(await analyse({ counts }, { method: 'sample', draws: 999, seed: 'far' }));
    expect(result.pValues[0]!.p).toBe(1 / 1000);
    expect(result.pValues[0]!.errors[0]).toMatchObject({ atLeast: 0, standardError: null, reason: 'no-spread-seen' });
  });
});
