// Chi-square tails against 60-digit values (fixtures/reference/data/distributions.json) and two numeric packages.
import cephes from 'cephes';
import { jStat } from 'jstat';
import { beforeAll, describe, expect, it } from 'vitest';
import distributions from '../../fixtures/reference/data/distributions.json' with { type: 'json' };
import { chiSquareLowerTail, chiSquareUpperTail, normalUpperTail } from '../../src/numeric/chi-square-tail.js';
import { relativeDifference } from '../helpers/tables.js';

interface Point {
  x: number;
  df: number;
  upper: number;
  logUpper: number;
}

describe('chi-square tails', () => {
  beforeAll(() => cephes.compiled);

  const points = distributions.find(({ id }) => id === 'd03-chi2')!.points as unknown as Point[];
  it.each(points)('upper tail of $x with $df degrees of freedom to 1e-13', ({ x, df, upper, logUpper }) => {
    const tail = chiSquareUpperTail(x, df);
    expect(relativeDifference(tail.p, upper)).toBeLessThan(1e-13);
    expect(Math.abs(tail.ln - logUpper)).toBeLessThan(1e-13 * Math.max(1, Math.abs(logUpper)));
  });

  it('agrees with cephes over a grid of 500 points', () => {
    for (let df = 1; df <= 50; df += 5) {
      for (let x = 0.5; x < 300; x *= 1.14) {
        const theirs = cephes.igamc(df / 2, x / 2);
        expect(relativeDifference(chiSquareUpperTail(x, df).p, theirs), `${x} ${df}`).toBeLessThan(5e-13);
      }
    }
  });

  it('lower tails agree with jstat', () => {
    for (const df of [1, 2, 3, 7, 20]) {
      for (const x of [0.1, 1, 3, 8, 20]) {
        expect(relativeDifference(chiSquareLowerTail(x, df).p, jStat.chisquare.cdf(x, df)), `${x} ${df}`).toBeLessThan(
          1e-10,
        );
      }
    }
  });

  it('gives a logarithm where the tail is below every double', () => {
    // Upper tail with 2 degrees of freedom is exp(-x/2).
    const tail = chiSquareUpperTail(10_000, 2);
    expect(tail.p).toBe(0);
    expect(tail.ln).toBeCloseTo(-5000, 9);
  });

  it('normal tails at the usual quantiles (common practice: 1.959963984540054 leaves 2.5% above)', () => {
    expect(relativeDifference(normalUpperTail(1.959963984540054).p, 0.025)).toBeLessThan(1e-14);
    expect(relativeDifference(normalUpperTail(-1.959963984540054).p, 0.975)).toBeLessThan(1e-14);
    expect(normalUpperTail(0).p).toBe(0.5);
  });
});
