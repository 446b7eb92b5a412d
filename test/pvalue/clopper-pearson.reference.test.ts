// Clopper-Pearson limits against their definition: binomial tails that leave half the risk on each side.
import { jStat } from 'jstat';
import { describe, expect, it } from 'vitest';
import { logFactorial } from '../../src/numeric/log-factorial.js';
import { clopperPearson } from '../../src/pvalue/clopper-pearson.js';
import { relativeDifference } from '../helpers/tables.js';

const binomial = (k: number, n: number, p: number): number =>
  Math.exp(logFactorial(n) - logFactorial(k) - logFactorial(n - k) + k * Math.log(p) + (n - k) * Math.log1p(-p));

function upperTail(hits: number, n: number, p: number): number {
  let sum = 0;
  for (let k = hits; k <= n; k++) sum += binomial(k, n, p);
  return sum;
}

describe('the Clopper-Pearson interval', () => {
  it.each([
    [3, 10],
    [1, 1000],
    [500, 1000],
    [999, 1000],
    [37, 2000],
  ])('%d of %d: each limit leaves 0.5% in its tail', async (hits, draws) => {
    const [low, high] = await clopperPearson(hits, draws, 0.99);
    expect(relativeDifference(upperTail(hits, draws, low), 0.005)).toBeLessThan(1e-8);
    expect(relativeDifference(1 - upperTail(hits + 1, draws, high), 0.005)).toBeLessThan(1e-8);
  });

  it('0 of 10 at 95% ends at 0.3085 (common practice: 1 - 0.025^(1/10))', async () => {
    const [low, high] = await clopperPearson(0, 10, 0.95);
    expect(low).toBe(0);
    expect(high).toBeCloseTo(1 - 0.025 ** 0.1, 14);
    expect((await clopperPearson(10, 10, 0.95))[0]).toBeCloseTo(0.025 ** 0.1, 14);
  });

  it('agrees with the beta quantiles of jstat for a moderate number of draws', async () => {
    const [low, high] = await clopperPearson(12, 80, 0.95);
    expect(relativeDifference(low, jStat.beta.inv(0.025, 12, 69))).toBeLessThan(1e-8);
    expect(relativeDifference(high, jStat.beta.inv(0.975, 13, 68))).toBeLessThan(1e-8);
  });

  it('stays inside for a billion draws', async () => {
    const [low, high] = await clopperPearson(50_000_000, 1_000_000_000, 0.99);
    const half = 2.5758293035489 * Math.sqrt((0.05 * 0.95) / 1e9);
    expect(relativeDifference(0.05 - low, half)).toBeLessThan(1e-3);
    expect(relativeDifference(high - 0.05, half)).toBeLessThan(1e-3);
  });
});
