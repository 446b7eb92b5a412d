// Near ties are decided in whole numbers: the comparisons behind the statistics, against plain big-integer products.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factorial } from '../../fixtures/reference/generator/oracle.js';
import { compareFactorialProducts } from '../../src/statistic/comparison/factorial-products.js';
import { coprimeBase, compareSelfPowers, productIsOne } from '../../src/statistic/comparison/self-powers.js';

const counts = fc.array(fc.integer({ min: 0, max: 30 }), { minLength: 4, maxLength: 9 });
/** A table and another with the same total: units moved from cell to cell. */
const pair = counts.chain((ours) =>
  fc.array(fc.tuple(fc.nat(ours.length - 1), fc.nat(ours.length - 1)), { maxLength: 12 }).map((moves) => {
    const theirs = [...ours];
    for (const [from, to] of moves) {
      if (theirs[from]! > 0) {
        theirs[from]!--;
        theirs[to]!++;
      }
    }
    return [ours, theirs] as const;
  }),
);

const sign = (a: bigint, b: bigint): number => (a > b ? 1 : a < b ? -1 : 0);

describe('exact comparisons', () => {
  it('products of factorials order as the products themselves', () => {
    fc.assert(
      fc.property(pair, ([ours, theirs]) => {
        const product = (list: readonly number[]): bigint => list.reduce((p, n) => p * factorial(n), 1n);
        expect(compareFactorialProducts(ours, theirs)).toBe(sign(product(ours), product(theirs)));
      }),
      { numRuns: 2000, seed: 4 },
    );
  });

  it('products of n^n order as the products themselves', () => {
    fc.assert(
      fc.property(pair, ([ours, theirs]) => {
        const product = (list: readonly number[]): bigint => list.reduce((p, n) => p * BigInt(n) ** BigInt(n), 1n);
        expect(compareSelfPowers(ours, theirs)).toBe(sign(product(ours), product(theirs)));
      }),
      { numRuns: 2000, seed: 5 },
    );
  });

  it('finds products that are equal although their factors differ', () => {
    // 6! 7! 1! = 10! 0! ... and 4^4 x 1 = 2^2 x 2^2 x ... in exponents only: 4^4 = 2^8 = (2^2)^4.
    expect(compareFactorialProducts([6, 7, 0], [10, 0, 0])).toBe(0);
    expect(compareSelfPowers([4, 1, 1, 1, 1], [2, 2, 2, 2, 0])).toBe(0);
    expect(compareSelfPowers([4, 1, 1, 1, 1], [2, 2, 2, 1, 1])).toBe(1);
  });

  it('tells apart products that agree to sixteen digits', () => {
    const large = 10 ** 15;
    // (n + 1) n against the same: 2 n ln n against (n+1) ln(n+1) + (n-1) ln(n-1), which differ by about 1/n of 7e16.
    expect(compareSelfPowers([large + 1, large - 1], [large, large])).toBe(1);
    expect(compareFactorialProducts([large + 1, large - 1], [large, large])).toBe(1);
    expect(compareFactorialProducts([large, large], [large + 1, large - 1])).toBe(-1);
  });

  it('a coprime base is coprime and factors every number completely', () => {
    fc.assert(
      fc.property(fc.array(fc.bigInt({ min: 2n, max: 5000n }), { minLength: 1, maxLength: 8 }), (numbers) => {
        const base = coprimeBase(numbers);
        for (const n of numbers) {
          let rest = n;
          for (const factor of base) while (rest % factor === 0n) rest /= factor;
          expect(rest).toBe(1n);
        }
        const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
        base.forEach((a, i) => base.slice(i + 1).forEach((b) => expect(gcd(a, b)).toBe(1n)));
      }),
      { numRuns: 500, seed: 6 },
    );
    expect(
      productIsOne(
        new Map([
          [6n, 1n],
          [2n, -1n],
          [3n, -1n],
        ]),
      ),
    ).toBe(true);
    expect(
      productIsOne(
        new Map([
          [6n, 1n],
          [2n, -1n],
          [3n, -2n],
        ]),
      ),
    ).toBe(false);
  });
});
