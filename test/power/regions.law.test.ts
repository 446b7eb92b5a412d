// Rejection regions against brute force: conditional ones in whole numbers outcome by outcome, unconditional ones by the p of
// every outcome on its own.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimalRational } from '../../src/numeric/rational.js';
import { unconditionalP } from '../../src/null/unconditional/unconditional-p.js';
import { bestPower } from '../../src/power/best-power.js';
import { conditionalRegion } from '../../src/power/conditional-region.js';
import type { PowerRule, PowerTail, TwoGroupTesting } from '../../src/power/design.js';
import { exactPower } from '../../src/power/exact-power.js';
import { unconditionalRegion } from '../../src/power/unconditional-region.js';

const choose = (n: number, k: number): bigint => {
  if (k < 0 || k > n) return 0n;
  let value = 1n;
  for (let i = 1; i <= k; i++) value = (value * BigInt(n - i + 1)) / BigInt(i);
  return value;
};

/** Twice the p of x given t events, as a fraction over C(n, t). */
function doubledP(
  n1: number,
  n2: number,
  x: number,
  y: number,
  { test, tail, rule }: TwoGroupTesting,
): [bigint, bigint] {
  const t = x + y;
  const all = Array.from({ length: n1 + 1 }, (_, k) => k).filter((k) => t - k >= 0 && t - k <= n2);
  const weight = (k: number): bigint => choose(n1, k) * choose(n2, t - k);
  const mass = (extremeness: (k: number) => bigint): bigint =>
    all.reduce((sum, k) => {
      const [a, b] = [extremeness(k), extremeness(x)];
      return sum + (a < b ? 0n : a === b && test === 'mid' ? weight(k) : 2n * weight(k));
    }, 0n);
  const up = mass((k) => BigInt(k));
  const down = mass((k) => BigInt(-k));
  const whole = choose(n1 + n2, t);
  if (tail === 'upper') return [up, whole];
  if (tail === 'lower') return [down, whole];
  if (rule === 'doubled') return [2n * (up < down ? up : down), whole];
  if (rule === 'probability') return [mass((k) => -weight(k)), whole];
  return [mass((k) => BigInt(Math.abs(k * (n1 + n2) - n1 * t))), whole];
}

const tails: readonly [PowerTail, PowerRule | null][] = [
  ['upper', null],
  ['lower', null],
  ['both', 'distance'],
  ['both', 'probability'],
  ['both', 'doubled'],
];
const sizes = fc.record({ first: fc.integer({ min: 1, max: 12 }), second: fc.integer({ min: 1, max: 12 }) });
// Levels that a p can meet exactly (1/20, 1/10) among them.
const alphas = fc.constantFrom('0.05', '0.1', '0.2', '0.01', '0.5');

describe('a conditional region', () => {
  it.each(tails)('holds the outcomes with p <= alpha, in whole numbers: %s %s', (tail, rule) => {
    fc.assert(
      fc.property(sizes, alphas, fc.constantFrom('conditional', 'mid'), ({ first, second }, level, test) => {
        const alpha = decimalRational(level)!;
        const testing: TwoGroupTesting = { test: test as 'mid', order: 'score', tail, rule, alpha };
        const { inside } = conditionalRegion({ first, second }, testing);
        for (let x = 0; x <= first; x++) {
          for (let y = 0; y <= second; y++) {
            const [p, whole] = doubledP(first, second, x, y, testing);
            const rejected = p * alpha.denominator <= 2n * alpha.numerator * whole;
            expect(inside[x * (second + 1) + y], `${first},${second} at ${x},${y}`).toBe(rejected ? 1 : 0);
          }
        }
      }),
      { numRuns: 60 },
    );
  });

  it('holds a p of exactly alpha: 3 of 3 against 0 of 3 has p = 1/20', () => {
    const testing: TwoGroupTesting = {
      test: 'conditional',
      order: 'score',
      tail: 'upper',
      rule: null,
      alpha: decimalRational('0.05')!,
    };
    expect(exactPower({ first: 3, second: 3 }, [1, 0], testing).power).toBe(1);
  });
});

describe('an unconditional region', () => {
  it.each([
    ['score', 'upper', null],
    ['score', 'both', 'distance'],
    ['wald', 'both', 'distance'],
    ['conditional-p', 'both', 'probability'],
    ['conditional-p', 'lower', null],
  ] as const)('holds the outcomes whose own p is at most alpha: %s %s %s', (order, tail, rule) => {
    fc.assert(
      fc.property(
        fc.record({ first: fc.integer({ min: 1, max: 7 }), second: fc.integer({ min: 1, max: 7 }) }),
        alphas,
        ({ first, second }, level) => {
          const testing: TwoGroupTesting = { test: 'unconditional', order, tail, rule, alpha: decimalRational(level)! };
          const { inside } = unconditionalRegion({ first, second }, testing);
          for (let x = 0; x <= first; x++) {
            for (let y = 0; y <= second; y++) {
              const { p } = unconditionalP(
                { firstSize: first, secondSize: second, firstEvents: x, secondEvents: y },
                { by: order, tail: tail === 'both' ? rule : tail },
              );
              if (Math.abs(p - Number(level)) < 1e-9) continue; // certified only to so many digits
              expect(inside[x * (second + 1) + y]).toBe(p <= Number(level) ? 1 : 0);
            }
          }
        },
      ),
      { numRuns: 12 },
    );
  });
});

describe('laws of power', () => {
  const proportions = fc
    .tuple(fc.integer({ min: 0, max: 20 }), fc.integer({ min: 0, max: 20 }))
    .map(([a, b]): [number, number] => [a / 20, b / 20]);

  it('a guaranteed test never rejects more often than alpha when the groups are alike, and Boschloo’s is no weaker than the conditional one', () => {
    fc.assert(
      fc.property(sizes, proportions, fc.constantFrom('0.05', '0.1'), ({ first, second }, truth, level) => {
        const common = { tail: 'upper', rule: null, alpha: decimalRational(level)! } as const;
        const conditional = exactPower({ first, second }, truth, { test: 'conditional', order: 'score', ...common });
        const boschloo = exactPower({ first, second }, truth, {
          test: 'unconditional',
          order: 'conditional-p',
          ...common,
        });
        expect(conditional.size).toBeLessThanOrEqual(Number(level) * (1 + 1e-9));
        expect(boschloo.size).toBeLessThanOrEqual(Number(level) * (1 + 1e-9));
        expect(boschloo.power).toBeGreaterThanOrEqual(conditional.power - 1e-12);
      }),
      { numRuns: 40 },
    );
  });

  it('no test of its level beats the bound of Neyman and Pearson, which rises with the sizes', () => {
    fc.assert(
      fc.property(sizes, proportions, ({ first, second }, truth) => {
        const alpha = decimalRational('0.05')!;
        const bound = bestPower({ first, second }, truth, 0.05);
        for (const test of ['conditional', 'unconditional'] as const) {
          const { power } = exactPower({ first, second }, truth, {
            test,
            order: 'score',
            tail: 'both',
            rule: 'distance',
            alpha,
          });
          expect(power).toBeLessThanOrEqual(bound + 1e-12);
        }
        expect(bestPower({ first: first + 1, second }, truth, 0.05)).toBeGreaterThanOrEqual(bound - 1e-12);
      }),
      { numRuns: 40 },
    );
  });

  it('swapping the groups exchanges the tails', () => {
    fc.assert(
      fc.property(sizes, proportions, ({ first, second }, [p1, p2]) => {
        const common = { test: 'conditional', order: 'score', rule: null, alpha: decimalRational('0.05')! } as const;
        const up = exactPower({ first, second }, [p1, p2], { ...common, tail: 'upper' }).power;
        const down = exactPower({ first: second, second: first }, [p2, p1], { ...common, tail: 'lower' }).power;
        expect(down).toBeCloseTo(up, 12);
      }),
      { numRuns: 60 },
    );
  });
});
