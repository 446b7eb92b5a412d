// Tails under a stated odds ratio against every table weighed in whole numbers, and the laws that tie them to the usual
// conditional p, to its exact limits and to their mirror images.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toNumber } from '../../../fixtures/reference/generator/oracle.js';
import { conditionalOddsRatio } from '../../../src/effect/conditional/conditional-odds-ratio.js';
import { asNumber } from '../../../src/effect/contract.js';
import { noncentralTails, type CountSeen } from '../../../src/null/stated-odds/noncentral-tails.js';
import { decimalRational } from '../../../src/numeric/rational.js';
import { relativeDifference } from '../../helpers/tables.js';

const seenUpTo = (most: number): fc.Arbitrary<CountSeen> =>
  fc.tuple(fc.integer({ min: 1, max: most }), fc.integer({ min: 1, max: most })).chain(([firstSize, secondSize]) =>
    fc.record({
      firstSize: fc.constant(firstSize),
      secondSize: fc.constant(secondSize),
      firstEvents: fc.integer({ min: 0, max: firstSize }),
      secondEvents: fc.integer({ min: 0, max: secondSize }),
    }),
  );

const choose = (n: number, k: number): bigint => {
  let ways = 1n;
  for (let i = 1; i <= k; i++) ways = (ways * BigInt(n - k + i)) / BigInt(i);
  return ways;
};

/** Whole-number weights of every count, and which of them is the observed one. */
function listed({ firstSize, secondSize, firstEvents, secondEvents }: CountSeen, oddsRatio: number) {
  const events = firstEvents + secondEvents;
  const { numerator, denominator } = decimalRational(String(oddsRatio))!;
  const lowest = Math.max(0, events - secondSize);
  const highest = Math.min(firstSize, events);
  const weights = Array.from({ length: highest - lowest + 1 }, (_, i) => {
    const ways = choose(firstSize, lowest + i) * choose(secondSize, events - lowest - i);
    return ways * numerator ** BigInt(i) * denominator ** BigInt(highest - lowest - i);
  });
  const whole = weights.reduce((sum, weight) => sum + weight, 0n);
  const of = (holds: (weight: bigint, i: number) => boolean): number =>
    toNumber(
      weights.reduce((sum, weight, i) => (holds(weight, i) ? sum + weight : sum), 0n),
      whole,
    );
  return { at: firstEvents - lowest, weights, of };
}

const oddsRatios = fc.constantFrom(1, 2, 0.5, 0.1, 3, 1.25, 10, 0.333, 1e-4, 2500);

describe('tails under a stated odds ratio', () => {
  it('are those of every table listed, ties counted exactly', () => {
    fc.assert(
      fc.property(seenUpTo(30), oddsRatios, (seen, oddsRatio) => {
        const { at, weights, of } = listed(seen, oddsRatio);
        const found = noncentralTails(seen, oddsRatio);
        const observed = weights[at]!;
        const expected = {
          upper: of((_, i) => i >= at),
          lower: of((_, i) => i <= at),
          probability: of((weight) => weight <= observed),
          point: of((_, i) => i === at),
          tied: of((weight) => weight === observed),
        };
        for (const name of ['upper', 'lower', 'probability', 'point', 'tied'] as const) {
          const { value, log10 } = found[name];
          expect(relativeDifference(value, expected[name]), name).toBeLessThan(found.relativeError + 1e-15);
          expect(Math.abs(log10 - Math.log10(expected[name])), name).toBeLessThan(1e-12);
        }
      }),
      { numRuns: 400 },
    );
  });

  it('mirror each other where the groups are exchanged', () => {
    fc.assert(
      fc.property(seenUpTo(300), fc.constantFrom(1, 2, 4, 0.125), (seen, oddsRatio) => {
        const { firstSize, secondSize, firstEvents, secondEvents } = seen;
        const swapped = {
          firstSize: secondSize,
          secondSize: firstSize,
          firstEvents: secondEvents,
          secondEvents: firstEvents,
        };
        const [one, other] = [noncentralTails(seen, oddsRatio), noncentralTails(swapped, 1 / oddsRatio)];
        const most = one.relativeError + other.relativeError;
        expect(relativeDifference(one.upper.value, other.lower.value)).toBeLessThan(most);
        expect(relativeDifference(one.lower.value, other.upper.value)).toBeLessThan(most);
        expect(relativeDifference(one.probability.value, other.probability.value)).toBeLessThan(most);
      }),
      { numRuns: 200 },
    );
  });

  it('are half of 1 - confidence at the exact limits', () => {
    fc.assert(
      fc.property(seenUpTo(60), (seen) => {
        const groups = {
          first: { events: seen.firstEvents, size: seen.firstSize },
          second: { events: seen.secondEvents, size: seen.secondSize },
        };
        const central = conditionalOddsRatio(groups, { confidence: 0.95 }).intervals.find(
          ({ method }) => method === 'central',
        )!;
        const [low, high] = [asNumber(central.lower!), asNumber(central.upper!)];
        if (low > 0) expect(noncentralTails(seen, low).upper.value).toBeCloseTo(0.025, 12);
        if (high < Infinity) expect(noncentralTails(seen, high).lower.value).toBeCloseTo(0.025, 12);
      }),
      { numRuns: 200 },
    );
  });

  it('keep their digits below the smallest double', () => {
    const seen = { firstSize: 2000, secondSize: 2000, firstEvents: 2000, secondEvents: 0 };
    const { upper, probability, lower } = noncentralTails(seen, 1);
    const digits = String(choose(4000, 2000));
    const log10 = -(digits.length - 17 + Math.log10(Number(digits.slice(0, 17))));
    expect(upper.value).toBe(0);
    expect(Math.abs(upper.log10 - log10)).toBeLessThan(1e-9);
    // The outcome at the other end is exactly as probable.
    expect(Math.abs(probability.log10 - log10 - Math.log10(2))).toBeLessThan(1e-9);
    expect(lower.value).toBe(1);
  });
});
