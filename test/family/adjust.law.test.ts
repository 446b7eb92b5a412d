// Laws of adjusted p-values over arbitrary families, and what the discrete ones promise, by exact calculation.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { adjusted, adjustments, type FamilyMember } from '../../src/family/adjust.js';

const member: fc.Arbitrary<FamilyMember> = fc
  .tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }))
  .map(([a, b]) => ({ p: Math.max(a, b), leastAttainable: Math.min(a, b) }));
const family = fc.array(member, { minLength: 1, maxLength: 30 });

describe('adjusted p-values', () => {
  it.each(adjustments)('%s: never below the raw one, never above 1, in the order of the raw ones', (method) => {
    fc.assert(
      fc.property(family, (members) => {
        const values = adjusted(members, method, 0.05);
        members.forEach(({ p }, k) => {
          const value = values[k]!;
          if (value === null) return;
          expect(value).toBeGreaterThanOrEqual(p);
          expect(value).toBeLessThanOrEqual(1);
          members.forEach((other, j) => {
            if (other.p < p && values[j] !== null) expect(values[j]!).toBeLessThanOrEqual(value);
          });
        });
      }),
      { numRuns: 300 },
    );
  });

  it.each(adjustments)('%s: one test alone keeps its p', (method) => {
    fc.assert(
      fc.property(member, (one) => {
        const [value] = adjusted([one], method, 1);
        expect(value).toBeCloseTo(one.p, 14);
      }),
    );
  });

  it('hochberg never exceeds holm, holm never bonferroni; tarone never bonferroni', () => {
    fc.assert(
      fc.property(family, (members) => {
        const of = (method: (typeof adjustments)[number]): number[] => adjusted(members, method, 0.05) as number[];
        const [bonferroni, holm, hochberg, tarone] = [of('bonferroni'), of('holm'), of('hochberg'), of('tarone')];
        members.forEach((_, k) => {
          expect(hochberg[k]!).toBeLessThanOrEqual(holm[k]!);
          expect(holm[k]!).toBeLessThanOrEqual(bonferroni[k]!);
          expect(tarone[k]!).toBeLessThanOrEqual(bonferroni[k]!);
        });
      }),
      { numRuns: 300 },
    );
  });

  it('the discrete ones are the usual ones where every p can be attained', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 1, maxLength: 20 }), (ps) => {
        const members = ps.map((p) => ({ p, leastAttainable: 0 }));
        expect(adjusted(members, 'tarone', 0.05)).toEqual(adjusted(members, 'bonferroni', 0.05));
        expect(adjusted(members, 'gilbert', 0.05)).toEqual(adjusted(members, 'benjamini-hochberg', 0.05));
      }),
      { numRuns: 200 },
    );
  });
});

describe('tarone holds the family-wise error', () => {
  it('for independent discrete tests, all nulls true, at every level (added up outcome by outcome)', () => {
    // A discrete p: attainable values rise to 1, each with the mass that makes P(p <= value) = value.
    const attainable = fc
      .uniqueArray(fc.integer({ min: 1, max: 99 }), { minLength: 1, maxLength: 3 })
      .map((list) => [...list.sort((a, b) => a - b).map((k) => k / 100), 1]);
    fc.assert(
      fc.property(fc.array(attainable, { minLength: 2, maxLength: 4 }), (tests) => {
        const mass = (values: number[], k: number): number => values[k]! - (values[k - 1] ?? 0);
        const smallest: [number, number][] = [];
        const walk = (k: number, chance: number, chosen: FamilyMember[]): void => {
          if (k === tests.length) {
            smallest.push([Math.min(...(adjusted(chosen, 'tarone', 0.05) as number[])), chance]);
            return;
          }
          tests[k]!.forEach((p, place) =>
            walk(k + 1, chance * mass(tests[k]!, place), [...chosen, { p, leastAttainable: tests[k]![0]! }]),
          );
        };
        walk(0, 1, []);
        for (const [level] of smallest) {
          if (level >= 1) continue;
          const error = smallest.filter(([value]) => value <= level).reduce((sum, [, chance]) => sum + chance, 0);
          expect(error).toBeLessThanOrEqual(level * (1 + 1e-9));
        }
      }),
      { numRuns: 200 },
    );
  });
});
