// Decimals and fractions are read as the numbers they spell, and come back as the nearest doubles.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimalRational, fractionRational, lowest, rationalText, toDouble } from '../../src/numeric/rational.js';

describe('rational numbers', () => {
  it.each([
    ['0.1', '1/10'],
    ['-2.50', '-5/2'],
    ['+3', '3'],
    ['.5', '1/2'],
    ['7.', '7'],
    ['1e3', '1000'],
    ['25e-2', '1/4'],
    ['-0', '0'],
  ])('%s is %s', (text, answer) => {
    expect(rationalText(decimalRational(text)!)).toBe(answer);
  });

  it.each([
    ['2/3', '2/3'],
    ['-4/6', '-2/3'],
    ['0.5/-2', '-1/4'],
    ['10', '10'],
  ])('the fraction %s is %s', (text, answer) => {
    expect(rationalText(fractionRational(text)!)).toBe(answer);
  });

  it.each(['', '.', 'one', '1,5', '0x10', '1/0', '1/2/3', 'NaN', 'Infinity', '1 2'])('"%s" is none', (text) => {
    expect(fractionRational(text)).toBeUndefined();
  });

  it('the shortest decimal of any double comes back as that double', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e90, max: 1e90 }), (x) => {
        fc.pre(Math.abs(x) > 1e-90 || x === 0);
        expect(toDouble(decimalRational(String(x))!)).toBe(x === 0 ? 0 : x);
      }),
      { numRuns: 2000, seed: 51 },
    );
  });

  it('a quotient of large whole numbers is rounded once', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 1n, max: 2n ** 200n }), fc.bigInt({ min: 1n, max: 2n ** 200n }), (a, b) => {
        const x = toDouble(lowest(a, b));
        // a/b lies within half a unit of x: |a - x b| <= ulp/2 b, all times 2^k in whole numbers.
        const shift = 400n;
        const scaled = BigInt(x * 2 ** 300) << 100n;
        const apart = (a << shift) - scaled * b;
        const size = apart < 0n ? -apart : apart;
        expect(size <= ((a << shift) >> 53n) + (b << 101n)).toBe(true);
      }),
      { numRuns: 1000, seed: 52 },
    );
  });
});
