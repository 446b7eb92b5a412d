// Notes for when p and interval, or the two-sided rules, do not say the same.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { asNumber } from '../../src/effect/contract.js';
import { checked } from '../helpers/checked-result.js';
import { twoByTwoTable } from '../helpers/tables.js';

const notesOf = async (counts: number[][], options: PlanOptions): Promise<Record<string, string>> =>
  Object.fromEntries(checked(await analyse({ counts }, options)).notes.map(({ code, text }) => [code, text]));

describe('agreement of p and interval', () => {
  it('holds for every rule and the interval that inverts it, whatever the table', async () => {
    await fc.assert(
      fc.asyncProperty(
        twoByTwoTable,
        fc.constantFrom('doubled', 'probability', 'blaker'),
        async (counts, twoSidedRule) => {
          const options = { statistic: 'score', twoSidedRule, method: 'exact' } as const;
          const { pValues, effects } = await analyse({ counts }, options);
          const exact = effects!.find(({ name }) => name === 'conditional-odds-ratio')!;
          const paired = exact.intervals.find(({ invertsP }) => invertsP === twoSidedRule)!;
          const inside = asNumber(paired.lower!) <= 1 && 1 <= asNumber(paired.upper!);
          if (pValues[0]!.p! > 0.05) expect(inside).toBe(true);
          else if (!paired.setHasGap) expect(inside).toBe(false);
        },
      ),
      { numRuns: 120 },
    );
  });

  it('says which intervals differ from p, and which one goes with it', async () => {
    const counts = [[7, 2], [3, 8]]; // prettier-ignore
    const found = await findDisagreement();
    expect(found['interval-disagrees']).toMatch(/^p is (at most|above) 0\.05, yet these 95% intervals/);
    expect(await notesOf(counts, { alpha: 0.01 })).not.toHaveProperty('interval-disagrees'); // the levels do not match
  });

  it('says when the rules lie on both sides of the level', async () => {
    const notes = await notesOf([[2, 8], [9, 5]], { statistic: 'score' }); // prettier-ignore
    expect(notes['two-sided-rules-straddle']).toMatch(/distance 0\.\d+, probability 0\.\d+, doubled 0\.\d+, blaker 0\.\d+/);
    expect(await notesOf([[2, 15], [10, 3]], { statistic: 'score' })).not.toHaveProperty('two-sided-rules-straddle'); // prettier-ignore
  }); // prettier-ignore
});

async function findDisagreement(): Promise<Record<string, string>> {
  for (let a = 4; a < 9; a++) {
    const notes = await notesOf([[a, 9 - a], [3, 8]], {}); // prettier-ignore
    if ('interval-disagrees' in notes) return notes;
  }
  return {};
}
