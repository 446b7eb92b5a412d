// Sums of numbers of any magnitude, against whole-number arithmetic.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toNumber } from '../../fixtures/reference/generator/oracle.js';
import { DoubleDouble } from '../../src/numeric/double-double.js';
import { exponentOf, scaleByPower, WideSum } from '../../src/numeric/wide-number.js';
import { relativeDifference } from '../helpers/tables.js';

const term = fc.tuple(fc.integer({ min: 1, max: 2 ** 31 - 1 }), fc.integer({ min: -40, max: 40 }));

describe('wide numbers', () => {
  it('a ratio of two sums is right to the last bit or two', () => {
    fc.assert(
      fc.property(
        fc.array(term, { minLength: 1, maxLength: 40 }),
        fc.array(term, { minLength: 1, maxLength: 40 }),
        (a, b) => {
          const wide = (terms: readonly (readonly [number, number])[], offset: number): WideSum => {
            const sum = new WideSum();
            for (const [m, e] of terms) sum.add(m, e + offset);
            return sum;
          };
          const whole = (terms: readonly (readonly [number, number])[]): bigint =>
            terms.reduce((sum, [m, e]) => sum + (BigInt(m) << BigInt(e + 40)), 0n);
          // The same ratio where both sums lie far outside the range of doubles.
          for (const offset of [0, -3000, 3000]) {
            const ours = wide(a, offset).over(wide(b, offset));
            const truth = toNumber(whole(a), whole(b));
            expect(relativeDifference(ours.value, truth)).toBeLessThan(2 ** -51);
            expect(Math.abs(ours.log10 - Math.log10(truth))).toBeLessThan(1e-13);
          }
        },
      ),
      { numRuns: 1000, seed: 7 },
    );
  });

  it('a ratio below the smallest double keeps its logarithm', () => {
    const tiny = new WideSum();
    tiny.add(1, -5000);
    const one = new WideSum();
    one.add(1, 0);
    const ratio = tiny.over(one);
    expect(ratio.value).toBe(0);
    expect(ratio.log10).toBeCloseTo(-5000 * Math.log10(2), 9);
  });

  it('exponents are those of the binary form, also beside powers of two', () => {
    for (const e of [-1000, -5, 0, 1, 30, 900]) {
      expect(exponentOf(2 ** e)).toBe(e);
      expect(exponentOf(2 ** e * (2 - 2 ** -52))).toBe(e);
      expect(scaleByPower(1, e)).toBe(2 ** e);
    }
    expect(scaleByPower(1, -1074)).toBe(2 ** -1074);
    expect(scaleByPower(1, -5000)).toBe(0);
  });

  it('multiplying by k and dividing by k a thousand times gives 1 to 30 digits', () => {
    const x = new DoubleDouble(1);
    for (let k = 3; k < 1000; k++) x.multiply(k).divide(k + 1);
    for (let k = 3; k < 1000; k++) x.multiply(k + 1).divide(k);
    expect(Math.abs(x.high - 1 + x.low)).toBeLessThan(1e-28);
  });
});
