// McNemar without holding the changed pairs: the certified bracket against the polynomial itself, in whole numbers.
import { describe, expect, it } from 'vitest';
import { unconditionalAt } from '../../fixtures/reference/generator/pairs.js';
import { toNumber } from '../../fixtures/reference/generator/oracle.js';
import { unconditionalMcNemar } from '../../src/pairs/mcnemar-unconditional.js';

const steps = 40n;

describe('unconditional McNemar', () => {
  it('no nuisance value exceeds the upper bound, and the lower one is attained', () => {
    for (const [there, back, n] of [
      [1, 7, 21],
      [5, 0, 9],
      [0, 1, 3],
      [6, 3, 14],
      [4, 4, 8],
      [9, 2, 11],
    ] as const) {
      for (const tail of ['upper', 'lower', 'both'] as const) {
        const { lower, upper, at } = unconditionalMcNemar(there, back, n, tail);
        for (let k = 0n; k <= steps; k++) {
          expect(toNumber(...unconditionalAt(there, back, n, tail, [k, steps]))).toBeLessThanOrEqual(upper);
        }
        const place = BigInt(Math.round(at * 2 ** 30));
        const attained = toNumber(...unconditionalAt(there, back, n, tail, [place, 2n ** 30n]));
        expect(Math.abs(attained - lower)).toBeLessThan(1e-7);
        expect(upper / lower - 1).toBeLessThan(1.1e-6);
      }
    }
  });
});
