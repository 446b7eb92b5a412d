// The doubled rule under a stopping rule: two sequences on the same draws.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Decision } from '../../../src/pvalue/sequential/contract.js';
import { startDoubledSequence, startSequence } from '../../../src/pvalue/sequential/stopping-rule.js';

const standard = { alpha: 0.05, risk: 0.0005, targetRelativeError: 0.02, limit: 10_000_000, blockSize: 1000 };

describe('the doubled rule', () => {
  it('doubles the smaller limits of two tails, each at half the risk around half of alpha', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 0, max: 100 }), fc.integer({ min: 0, max: 100 })), { minLength: 1 }),
        (blocks) => {
          const options = { ...standard, risk: 0.01, blockSize: 100 };
          const half = { ...options, alpha: options.alpha / 2, risk: options.risk / 2 };
          const doubled = startDoubledSequence(options);
          const swapped = startDoubledSequence(options);
          const [upper, lower] = [startSequence(half), startSequence(half)];
          for (const [up, down] of blocks) {
            const decision = doubled.add({ upper: up, lower: down }, 100);
            expect(swapped.add({ upper: down, lower: up }, 100)).toEqual(decision);
            upper.add(up, 100);
            lower.add(down, 100);
          }
          const [one, other, both] = [upper.state(), lower.state(), doubled.state()];
          expect(both.lower).toBe(Math.min(1, 2 * Math.min(one.lower, other.lower)));
          expect(both.upper).toBe(Math.min(1, 2 * Math.min(one.upper, other.upper)));
          expect(both.p).toBe(Math.min(1, both.upper + 0.01));
          expect(both.tails).toEqual({ upper: one.atLeast, lower: other.atLeast });
          expect(both.atLeast).toBe(Math.min(one.atLeast, other.atLeast));
          expect(both.estimate).toBe(Math.min(1, (2 * both.atLeast) / both.draws));
          expect(swapped.state()).toMatchObject({ lower: both.lower, upper: both.upper, p: both.p });
        },
      ),
    );
  });

  it('tells the draws that would settle it, and 0 once it is settled', () => {
    const sequence = startDoubledSequence(standard);
    expect(sequence.add({ upper: 20, lower: 982 }, 1000)).toEqual({ stop: false });
    const more = sequence.state().drawsToSettle!;
    let decision: Decision = { stop: false };
    for (let draws = 0; draws < 1.05 * more && !decision.stop; draws += 1000) {
      decision = sequence.add({ upper: 20, lower: 982 }, 1000);
    }
    expect(decision).toEqual({ stop: true, because: 'settled-below' });
    expect(sequence.state().drawsToSettle).toBe(0);
  });
});
