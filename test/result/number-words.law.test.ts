import fc from 'fast-check';
import { expect, it } from 'vitest';
import { percentWords, probabilityWords, roundedTo } from '../../src/result/number-words.js';

const probability = fc.double({ min: Number.MIN_VALUE, max: 1, noNaN: true });
const smallOrNot = fc.oneof(
  probability,
  probability.map((p) => Math.max(Number.MIN_VALUE, p ** 40)),
);

/** The place of the last digit shown, as a power of ten. */
function lastPlace(words: string): number {
  const [digits, exponent] = words.split('e');
  return Number(exponent ?? 0) - (digits!.split('.')[1]?.length ?? 0);
}

/** The place of the first digit of a number. */
const firstPlace = (value: number): number => Number(value.toExponential().split('e')[1]);

it('no probability above 0 is shown as 0, and none below 1 as 1', () => {
  fc.assert(
    fc.property(smallOrNot, (p) => {
      expect(Number(probabilityWords(p).replace('above ', ''))).toBeGreaterThan(0);
      if (p < 1) expect(probabilityWords(p)).not.toMatch(/^1(\.0*)?$/);
    }),
  );
});

it('what is shown of a probability is within half of its last digit', () => {
  fc.assert(
    fc.property(smallOrNot, (p) => {
      const words = probabilityWords(p);
      fc.pre(!words.startsWith('above') && p > 1e-300);
      expect(Math.abs(Number(words) - p)).toBeLessThanOrEqual(0.5 * 10 ** lastPlace(words) * (1 + 1e-9));
    }),
  );
});

it('no digit stands below the first one of the error, unless it is the only digit', () => {
  fc.assert(
    fc.property(smallOrNot, fc.double({ min: 1e-12, max: 0.5, noNaN: true }), (value, error) => {
      fc.pre(value < 1);
      const words = roundedTo(error, value).replace('above ', '');
      const significant = words.split('e')[0]!.replace('.', '').replace(/^0+/, '');
      if (significant.length > 1) expect(lastPlace(words)).toBeGreaterThanOrEqual(firstPlace(error));
      expect(significant.length).toBeGreaterThan(0);
    }),
  );
});

it('a share is called 0% or 100% only when it is', () => {
  fc.assert(
    fc.property(fc.bigInt(1n, 2n ** 53n - 1n), fc.bigInt(1n, 2n ** 53n - 1n), (a, b) => {
      fc.pre(a !== b);
      const share = Number(a < b ? a : b) / Number(a < b ? b : a);
      fc.pre(share < 1);
      expect(['0%', '100%']).not.toContain(percentWords(share));
    }),
  );
});
