// Logarithms of factorials and the pieces of their saddle-point form, against whole-number arithmetic.
import { describe, expect, it } from 'vitest';
import { factorial } from '../../fixtures/reference/generator/oracle.js';
import { bigLog } from '../../src/numeric/big-log.js';
import { logFactorial } from '../../src/numeric/log-factorial.js';
import { beyondEntropy, devianceTerm } from '../../src/numeric/saddle-point.js';
import { relativeDifference } from '../helpers/tables.js';

const fromFixedPoint = (value: bigint, bits: number): number => Number(value >> BigInt(bits - 60)) / 2 ** 60;

/** ln of a large whole number: of its leading 60 bits, plus the shift times ln 2. */
function lnOf(n: bigint): number {
  const shift = Math.max(0, n.toString(2).length - 60);
  return fromFixedPoint(bigLog(n >> BigInt(shift), 200) + BigInt(shift) * bigLog(2n, 200), 200);
}

describe('factorials', () => {
  it.each([1, 2, 5, 20, 170, 1023, 1024, 5000])('ln %d! to two units in the last place', (n) => {
    expect(relativeDifference(logFactorial(n), lnOf(factorial(n)))).toBeLessThan(5e-16);
  });

  it('ln 10 to 30 digits (from memory: 2.302585092994045684017991454684)', () => {
    const digits = (bigLog(10n, 200) * 10n ** 30n) >> 200n;
    expect(digits).toBe(2302585092994045684017991454684n);
  });

  it('n ln n - n + what lies beyond is ln n!', () => {
    for (const n of [1, 2, 3, 15, 16, 17, 100, 1000, 100_000]) {
      expect(relativeDifference(n * Math.log(n) - n + beyondEntropy(n), logFactorial(n)), `${n}`).toBeLessThan(1e-13);
    }
  });

  it('the deviance does not cancel near its zero: n ln(n/e) - (n - e) is (n - e)^2 / 2e there', () => {
    expect(relativeDifference(devianceTerm(1e12 + 1, 1e12), 1 / 2e12)).toBeLessThan(1e-11);
    expect(devianceTerm(7, 7)).toBe(0);
    expect(devianceTerm(0, 3)).toBe(3);
    expect(relativeDifference(devianceTerm(10, 2), 10 * Math.log(5) - 8)).toBeLessThan(1e-15);
  });
});
