// The unconditional p of a stated difference or ratio over arbitrary small designs: outcomes ordered by a score found another way,
// their probability added up in fractions of whole numbers along the line of proportions that the statement allows.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toNumber } from '../../../fixtures/reference/generator/oracle.js';
import type { NullValue } from '../../../src/null/unconditional/constrained-score.js';
import { nullValueP, type NullValueTail } from '../../../src/null/unconditional/null-value-p.js';
import type { TwoGroupsSeen } from '../../../src/null/unconditional/outcomes.js';
import { unconditionalP } from '../../../src/null/unconditional/unconditional-p.js';
import { relativeDifference } from '../../helpers/tables.js';

const seenUpTo = (most: number): fc.Arbitrary<TwoGroupsSeen> =>
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

/** C(n, x) a^x (parts - a)^(n - x) for all x: over parts^n, the law of a group with the proportion a / parts. */
const groupWeights = (n: number, a: number, parts: number): bigint[] =>
  Array.from({ length: n + 1 }, (_, x) => choose(n, x) * BigInt(a) ** BigInt(x) * BigInt(parts - a) ** BigInt(n - x));

type Holds = (x1: number, x2: number) => boolean;

/** Exact probability of the outcomes where p1 = a / parts and p2 = b / parts. */
function probabilityAt(n1: number, n2: number, holds: Holds, [a, b]: readonly [number, number], parts: number): number {
  const [first, second] = [groupWeights(n1, a, parts), groupWeights(n2, b, parts)];
  let sum = 0n;
  first.forEach((w1, x1) => {
    second.forEach((w2, x2) => {
      if (holds(x1, x2)) sum += w1 * w2;
    });
  });
  return toNumber(sum, BigInt(parts) ** BigInt(n1 + n2));
}

/** Pairs of proportions in parts of `parts` that the value allows; difference and ratio in hundredths. */
function allowed({ of, value }: NullValue, parts: number): [number, number][] {
  const pairs: [number, number][] = [];
  for (let b = 0; b <= parts; b++) {
    const a = of === 'difference' ? b + Math.round(value * parts) : (b * Math.round(value * 100)) / 100;
    if (Number.isInteger(a) && a >= 0 && a <= parts) pairs.push([a, b]);
  }
  return pairs;
}

/** The score with proportions found by halving the slope of the log-likelihood, nothing shared with the closed forms. */
function slowScore(n1: number, n2: number, { of, value }: NullValue): (x1: number, x2: number) => number {
  const first = (p: number): number => (of === 'difference' ? p + value : p * value);
  const pace = of === 'difference' ? 1 : value;
  const lowest = of === 'difference' ? Math.max(0, -value) : 0;
  const highest = of === 'difference' ? Math.min(1, 1 - value) : Math.min(1, 1 / value);
  const share = (count: number, p: number): number => (count === 0 ? 0 : count / p);
  return (x1, x2) => {
    let [low, high] = [lowest, highest];
    for (let turn = 0; turn < 100; turn++) {
      const p = (low + high) / 2;
      const slope = pace * (share(x1, first(p)) - share(n1 - x1, 1 - first(p))) + share(x2, p) - share(n2 - x2, 1 - p);
      if (slope > 0) low = p;
      else high = p;
    }
    const p2 = (low + high) / 2;
    const p1 = Math.min(1, Math.max(0, first(p2)));
    const away = x1 / n1 - first(x2 / n2);
    const variance = (p1 * (1 - p1)) / n1 + (pace * pace * p2 * (1 - p2)) / n2;
    return Math.abs(away) < 1e-12 ? 0 : away / Math.sqrt(Math.max(variance, 1e-25));
  };
}

const values: NullValue[] = [
  { of: 'difference', value: -0.1 },
  { of: 'difference', value: 0.25 },
  { of: 'ratio', value: 1.25 },
  { of: 'ratio', value: 0.5 },
];
const tails: NullValueTail[] = ['upper', 'lower', 'distance'];
const turned = (score: number, tail: NullValueTail): number =>
  tail === 'distance' ? Math.abs(score) : tail === 'lower' ? -score : score;

describe.each(values)('a stated $of of $value', (nullValue) => {
  it('has a p that no allowed pair of proportions exceeds and one of them meets', () => {
    fc.assert(
      fc.property(seenUpTo(8), fc.constantFrom(...tails), (seen, tail) => {
        const { firstSize: n1, secondSize: n2, firstEvents, secondEvents } = seen;
        const score = slowScore(n1, n2, nullValue);
        const target = turned(score(firstEvents, secondEvents), tail);
        const holds: Holds = (x1, x2) => turned(score(x1, x2), tail) >= target - 1e-7 * Math.max(1, Math.abs(target));
        const { p, relativeError, nuisance } = nullValueP(seen, nullValue, tail);
        const parts = 200;
        const found = allowed(nullValue, parts).map((pair) => probabilityAt(n1, n2, holds, pair, parts));
        const most = Math.max(...found);
        expect(most).toBeLessThanOrEqual(p * (1 + 1e-13));
        expect(relativeError).toBeLessThan(1e-9);
        // The place reported, to hundredths of a part in whole numbers.
        const fine = 2 ** 40;
        const b = Math.round(nuisance.value * fine);
        const a =
          nullValue.of === 'difference' ? b + Math.round(nullValue.value * fine) : Math.round(b * nullValue.value);
        const there = probabilityAt(n1, n2, holds, [Math.min(fine, Math.max(0, a)), Math.min(fine, b)], fine);
        expect(relativeDifference(there, p)).toBeLessThan(1e-9);
      }),
      { numRuns: 25 },
    );
  });

  it('mirrors where the groups are exchanged', () => {
    const { of, value } = nullValue;
    const opposite: NullValue = { of, value: of === 'difference' ? -value : 1 / value };
    fc.assert(
      fc.property(seenUpTo(20), (seen) => {
        const { firstSize, secondSize, firstEvents, secondEvents } = seen;
        const swapped = {
          firstSize: secondSize,
          secondSize: firstSize,
          firstEvents: secondEvents,
          secondEvents: firstEvents,
        };
        for (const [tail, other] of [
          ['upper', 'lower'],
          ['lower', 'upper'],
          ['distance', 'distance'],
        ] as const) {
          expect(
            relativeDifference(nullValueP(seen, nullValue, tail).p, nullValueP(swapped, opposite, other).p),
          ).toBeLessThan(1e-10);
        }
      }),
      { numRuns: 25 },
    );
  });

  it.each([
    [6, 6],
    [5, 9],
  ])('rejects at most as often as it says in groups of %i and %i', (n1, n2) => {
    for (const tail of tails) {
      const ps = new Map<string, number>();
      for (let x1 = 0; x1 <= n1; x1++) {
        for (let x2 = 0; x2 <= n2; x2++) {
          const seen = { firstSize: n1, secondSize: n2, firstEvents: x1, secondEvents: x2 };
          ps.set(`${x1},${x2}`, nullValueP(seen, nullValue, tail).p);
        }
      }
      for (const alpha of [0.05, 0.2]) {
        for (const pair of allowed(nullValue, 40)) {
          const size = probabilityAt(n1, n2, (x1, x2) => ps.get(`${x1},${x2}`)! <= alpha, pair, 40);
          expect(size).toBeLessThanOrEqual(alpha);
        }
      }
    }
  });
});

describe('no difference', () => {
  it('has the p of the score order, as a difference of 0 and as a ratio of 1', () => {
    fc.assert(
      fc.property(seenUpTo(25), fc.constantFrom(...tails), (seen, tail) => {
        const { p } = unconditionalP(seen, { by: 'score', tail });
        for (const nullValue of [
          { of: 'difference', value: 0 },
          { of: 'ratio', value: 1 },
        ] as const) {
          expect(relativeDifference(nullValueP(seen, nullValue, tail).p, p)).toBeLessThan(1e-10);
        }
      }),
      { numRuns: 60 },
    );
  });
});
