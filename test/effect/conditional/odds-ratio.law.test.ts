// Laws of the exact intervals of the odds ratio: what they invert, how they turn over, and what level they keep.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import { conditionalOddsRatio } from '../../../src/effect/conditional/conditional-odds-ratio.js';
import { asNumber, type Interval } from '../../../src/effect/contract.js';
import type { TwoGroups } from '../../../src/effect/two-groups.js';
import { twoByTwoTable } from '../../helpers/tables.js';
import { lawAt, pAt, type Rule } from './plain-law.js';

const groupsOf = ([[a, b], [c, d]]: number[][]): TwoGroups => ({
  first: { events: a!, size: a! + b! },
  second: { events: c!, size: c! + d! },
}); // prettier-ignore
const intervalOf = (groups: TwoGroups, method: string, confidence = 0.95): Interval =>
  conditionalOddsRatio(groups, { confidence }).intervals.find((one) => one.method === method)!;
const endsOf = ({ lower, upper }: Interval): [number, number] => [asNumber(lower!), asNumber(upper!)];

describe('exact intervals of the odds ratio', () => {
  it('a central interval at level 1 - p, p doubled and below 1, has the value of no effect at its end', async () => {
    await fc.assert(
      fc.asyncProperty(twoByTwoTable, async (counts) => {
        const result = await analyse({ counts }, { statistic: 'score', twoSidedRule: 'doubled', method: 'exact' });
        const p = result.pValues[0]!.p!;
        fc.pre(p < 1 && p > 1e-5); // 1 - p loses the digits of a smaller p
        const ends = endsOf(intervalOf(groupsOf(counts), 'central', 1 - p));
        expect(Math.min(...ends.map((end) => Math.abs(Math.log(end))))).toBeLessThan(1e-10);
      }),
      { numRuns: 100 },
    );
  });

  it.each(['probability', 'blaker'] as const)(
    'the hull of %s ends where its p crosses the level, and no value beyond has more',
    (rule: Rule) => {
      fc.assert(
        fc.property(twoByTwoTable, fc.constantFrom(0.01, 0.05, 0.2, 0.6), (counts, alpha) => {
          const interval = intervalOf(groupsOf(counts), rule, 1 - alpha);
          const [low, high] = endsOf(interval).map(Math.log) as [number, number];
          const p = (x: number): number => pAt(counts, rule, x);
          const step = 1e-9;
          if (Number.isFinite(high)) {
            expect(p(high - step)).toBeGreaterThan(alpha - 1e-7);
            for (const further of [step, 0.003, 0.03, 0.1, 0.3, 1, 3])
              expect(p(high + further)).toBeLessThan(alpha + 1e-7);
          } else expect(p(30)).toBeGreaterThan(alpha);
          if (Number.isFinite(low)) {
            expect(p(low + step)).toBeGreaterThan(alpha - 1e-7);
            for (const further of [step, 0.003, 0.03, 0.1, 0.3, 1, 3])
              expect(p(low - further)).toBeLessThan(alpha + 1e-7);
          } else expect(p(-30)).toBeGreaterThan(alpha);
          if (!Number.isFinite(low) || !Number.isFinite(high)) return;
          const inside = Array.from({ length: 200 }, (_, k) => p(low + ((high - low) * (k + 0.5)) / 200));
          if (Math.min(...inside) <= alpha - 1e-9) expect(interval.setHasGap).toBe(true);
        }),
        { numRuns: 150 },
      );
    },
  );

  it.each(['probability', 'blaker'] as const)('a level at which p dips and rises again gives a set with a gap: %s', (rule: Rule) => {
    let dips = 0;
    for (const counts of [[[2, 9], [5, 4]], [[1, 6], [3, 5]], [[4, 8], [9, 6]], [[3, 11], [6, 7]], [[6, 2], [5, 9]]]) {
      const p = Array.from({ length: 1200 }, (_, k) => pAt(counts, rule, -6 + k / 100));
      for (let k = 1; k + 1 < p.length; k++) {
        const alpha = p[k]! + 1e-5;
        const isDip = p[k - 1]! > alpha && p.slice(0, k).some((x) => x > alpha) && p.slice(k + 1).some((x) => x > alpha);
        if (!isDip || alpha > 0.9) continue;
        dips++;
        expect(intervalOf(groupsOf(counts), rule, 1 - alpha).setHasGap).toBe(true);
      }
    }
    expect(dips).toBeGreaterThan(0);
  }); // prettier-ignore

  it('exchanging the groups, or the outcomes, turns every interval upside down', () => {
    fc.assert(
      fc.property(twoByTwoTable, ([[a, b], [c, d]]) => {
        const here = conditionalOddsRatio(groupsOf([[a!, b!], [c!, d!]]), { confidence: 0.95 });
        for (const other of [[[c!, d!], [a!, b!]], [[b!, a!], [d!, c!]]]) {
          const there = conditionalOddsRatio(groupsOf(other), { confidence: 0.95 });
          here.intervals.forEach((interval, k) => {
            const [low, high] = endsOf(interval);
            const [otherLow, otherHigh] = endsOf(there.intervals[k]!);
            expect(Math.abs(low * otherHigh - 1) < 1e-12 || (low === 0 && otherHigh === Infinity)).toBe(true);
            expect(Math.abs(high * otherLow - 1) < 1e-12 || (high === Infinity && otherLow === 0)).toBe(true);
          });
        }
      }),
      { numRuns: 80 },
    ); // prettier-ignore
  });

  it('coverage, worked out exactly, is never below the level', () => {
    for (const [first, second, events] of [[6, 6, 5], [9, 4, 6], [12, 15, 9], [20, 7, 11]] as const) {
      const lowest = Math.max(0, events - second);
      const tables = Array.from({ length: Math.min(first, events) - lowest + 1 }, (_, k) => lowest + k).map((a) => [
        [a, first - a],
        [events - a, second - events + a],
      ]);
      for (const method of ['central', 'probability', 'blaker']) {
        const ends = tables.map((table) => endsOf(intervalOf(groupsOf(table), method)));
        for (let x = -3; x <= 3; x += 0.25) {
          const law = lawAt(tables[0]!, x);
          const covered = law.reduce(
            (sum, p, k) => (ends[k]![0] <= Math.exp(x) && Math.exp(x) <= ends[k]![1] ? sum + p : sum),
            0,
          );
          expect(covered).toBeGreaterThan(0.95 - 1e-9);
        }
      }
    } // prettier-ignore
  });
});
