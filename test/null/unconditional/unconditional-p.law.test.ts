// Laws of the unconditional p over arbitrary small designs, judged in fractions of whole numbers: the set is right, no
// probability of it exceeds the certified bound anywhere on a dense grid, and the bound is met at the place reported.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toNumber } from '../../../fixtures/reference/generator/oracle.js';
import {
  compareFractions,
  conditionalP,
  outcomes,
  probabilityOf,
  signedSquare,
  type Fraction,
  type Outcome,
} from '../../../fixtures/reference/generator/unconditional.js';
import { nuisanceInterval } from '../../../src/null/unconditional/nuisance-interval.js';
import type { TwoGroupsSeen } from '../../../src/null/unconditional/outcomes.js';
import {
  outcomeSet,
  unconditionalP,
  type UnconditionalOrder,
} from '../../../src/null/unconditional/unconditional-p.js';
import { relativeDifference } from '../../helpers/tables.js';

const orders: UnconditionalOrder[] = [
  ...(['score', 'wald'] as const).flatMap((by) =>
    (['upper', 'lower', 'distance'] as const).map((tail) => ({ by, tail })),
  ),
  ...(['upper', 'lower', 'probability'] as const).map((tail) => ({ by: 'conditional-p' as const, tail })),
];

const seenUpTo = (most: number): fc.Arbitrary<TwoGroupsSeen> =>
  fc.tuple(fc.integer({ min: 1, max: most }), fc.integer({ min: 1, max: most })).chain(([firstSize, secondSize]) =>
    fc.record({
      firstSize: fc.constant(firstSize),
      secondSize: fc.constant(secondSize),
      firstEvents: fc.integer({ min: 0, max: firstSize }),
      secondEvents: fc.integer({ min: 0, max: secondSize }),
    }),
  );

/** The set by definition, compared in fractions. */
function slowSet(seen: TwoGroupsSeen, { by, tail }: UnconditionalOrder): Outcome[] {
  const { firstSize: n1, secondSize: n2, firstEvents, secondEvents } = seen;
  const value = (outcome: Outcome): Fraction => {
    if (by === 'conditional-p') {
      const [top, bottom] = conditionalP(n1, n2, outcome, tail as 'upper' | 'lower' | 'probability');
      return [-top, bottom];
    }
    const [top, bottom] = signedSquare(n1, n2, outcome, by === 'score');
    return [tail === 'lower' || (tail === 'distance' && top < 0n) ? -top : top, bottom];
  };
  const target = value([firstEvents, secondEvents]);
  return outcomes(n1, n2, (outcome) => compareFractions(value(outcome), target) >= 0);
}

describe.each(orders)('$by, $tail', (order) => {
  it('holds just the outcomes at least as extreme', () => {
    fc.assert(
      fc.property(seenUpTo(11), (seen) => {
        const { inside, secondSize } = outcomeSet(seen, order.by, order.tail as 'upper');
        const found = [...inside.keys()].filter((k) => inside[k] === 1);
        expect(found).toEqual(slowSet(seen, order).map(([x1, x2]) => x1 * (secondSize + 1) + x2));
      }),
      { numRuns: 60 },
    );
  });

  it('bounds the probability of that set everywhere, and meets it where it says', () => {
    fc.assert(
      fc.property(seenUpTo(9), (seen) => {
        const { p, relativeError, nuisance } = unconditionalP(seen, order);
        const set = slowSet(seen, order);
        const at = (share: Fraction): number => {
          const [top, bottom] = probabilityOf(seen.firstSize, seen.secondSize, set, share);
          return toNumber(top, bottom);
        };
        for (let k = 0; k <= 200; k++) expect(at([BigInt(k), 200n])).toBeLessThanOrEqual(nuisance.certifiedUpper);
        const places = 2n ** 60n;
        const here = at([BigInt(Math.round(nuisance.value * 2 ** 53)) * 2n ** 7n, places]);
        expect(here).toBeLessThanOrEqual(p);
        expect(here * (1 + relativeError + 1e-13)).toBeGreaterThanOrEqual(p);
        expect(relativeError).toBeLessThan(1e-10);
      }),
      { numRuns: 12 },
    );
  });

  it('turns with the groups and with the event', () => {
    fc.assert(
      fc.property(seenUpTo(25), (seen) => {
        const { firstSize, secondSize, firstEvents, secondEvents } = seen;
        const swapped = {
          firstSize: secondSize,
          secondSize: firstSize,
          firstEvents: secondEvents,
          secondEvents: firstEvents,
        };
        const other = { ...seen, firstEvents: firstSize - firstEvents, secondEvents: secondSize - secondEvents };
        const turned: UnconditionalOrder = {
          ...order,
          tail: order.tail === 'upper' ? 'lower' : order.tail === 'lower' ? 'upper' : order.tail,
        };
        const { p } = unconditionalP(seen, order);
        expect(relativeDifference(unconditionalP(swapped, turned).p, p)).toBeLessThan(1e-10);
        expect(relativeDifference(unconditionalP(other, turned).p, p)).toBeLessThan(1e-10);
      }),
      { numRuns: 25 },
    );
  });
});

it.each([0, 0.001])('never rejects a true null more often than alpha, over a grid of designs (risk %s)', (risk) => {
  for (const [n1, n2] of [
    [5, 5],
    [4, 9],
    [8, 7],
  ] as const) {
    for (const order of [...orders, { by: 'conditional-p', tail: 'doubled' } as const]) {
      const all = outcomes(n1, n2, () => true).map((outcome) => {
        const [firstEvents, secondEvents] = outcome;
        return {
          outcome,
          ...unconditionalP({ firstSize: n1, secondSize: n2, firstEvents, secondEvents }, order, risk),
        };
      });
      for (const alpha of [0.01, 0.05, 0.2]) {
        const rejected = all.filter(({ p }) => p <= alpha).map(({ outcome }) => outcome);
        for (let k = 0; k <= 50; k++) {
          const [top, bottom] = probabilityOf(n1, n2, rejected, [BigInt(k), 50n]);
          expect(top * 1000n).toBeLessThanOrEqual(BigInt(alpha * 1000) * bottom);
        }
      }
    }
  }
});

describe('with a risk (Berger & Boos 1994)', () => {
  it('looks for the maximum in an interval that covers, and adds the risk', () => {
    const seen = { firstSize: 20, secondSize: 30, firstEvents: 2, secondEvents: 9 };
    const whole = unconditionalP(seen, { by: 'score', tail: 'distance' });
    const part = unconditionalP(seen, { by: 'score', tail: 'distance' }, 1e-6);
    const [low, high] = nuisanceInterval(11, 50, 1e-6);
    expect(part.nuisance.value).toBeGreaterThanOrEqual(low);
    expect(part.nuisance.value).toBeLessThanOrEqual(high);
    expect(part.p).toBeCloseTo(part.nuisance.certifiedUpper + 1e-6, 15);
    expect(part.nuisance.certifiedUpper).toBeLessThanOrEqual(whole.p);
  });

  it('covers the proportion with at least the stated probability', () => {
    const total = 12;
    const gamma = 0.05;
    for (let k = 1; k < 40; k++) {
      const covering = outcomes(total, 0, ([x]) => {
        const [low, high] = nuisanceInterval(x, total, gamma);
        return low <= k / 40 && k / 40 <= high;
      });
      const [top, bottom] = probabilityOf(total, 0, covering, [BigInt(k), 40n]);
      expect(toNumber(top, bottom)).toBeGreaterThanOrEqual(1 - gamma);
    }
  });

  it('never reports more than 1', () => {
    const seen = { firstSize: 4, secondSize: 4, firstEvents: 2, secondEvents: 2 };
    expect(unconditionalP(seen, { by: 'score', tail: 'distance' }, 0.01).p).toBe(1);
  });
});
