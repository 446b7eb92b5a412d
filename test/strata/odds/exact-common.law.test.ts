// The law of the sum of corners, its tails and limits, and Zelen's test, against every set of tables in whole numbers.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toNumber } from '../../../fixtures/reference/generator/oracle.js';
import { conditionalEstimate, conditionalIntervals } from '../../../src/strata/odds/conditional-odds-ratio.js';
import { cornerCounts } from '../../../src/strata/odds/corner-counts.js';
import { commonCuts } from '../../../src/strata/odds/exact-common.js';
import { speaks, stratumOf, type Stratum } from '../../../src/strata/odds/stratum.js';
import { SumLaw } from '../../../src/strata/odds/sum-law.js';
import { zelenCut } from '../../../src/strata/odds/zelen.js';
import { relativeDifference, rowsFirst } from '../../helpers/tables.js';
import { cutOf, lawOf, zelenOf, type Counts, type Cut } from './strata-oracle.js';

const count = fc.oneof(fc.integer({ min: 0, max: 3 }), fc.integer({ min: 0, max: 12 }));
const stratum = fc.tuple(fc.tuple(count, count), fc.tuple(count, count));
const shaped = (tables: readonly Counts[]): Stratum[] => tables.map((one) => stratumOf(one, rowsFirst)).filter(speaks);
const strata = fc
  .array(stratum, { minLength: 1, maxLength: 5 })
  .filter((tables) => tables.every((one) => one.flat().some((n) => n > 0)) && shaped(tables).length > 0);
const observedOf = (speaking: readonly Stratum[]): number => speaking.reduce((sum, { a }) => sum + a, 0);
const bound = 1e-13;

const names = ['upper', 'lower', 'distance', 'probability'] as const;

function expectCut(
  ours: { below: { value: number }; tied: { value: number }; above: { value: number } },
  theirs: Cut,
): void {
  for (const side of ['below', 'tied', 'above'] as const) {
    expect(relativeDifference(ours[side].value, toNumber(theirs[side], theirs.whole))).toBeLessThan(bound);
  }
}

describe('the exact test of a common odds ratio', () => {
  it('has the masses of all sets of tables, in every ordering', () => {
    fc.assert(
      fc.property(strata, (tables) => {
        const speaking = shaped(tables);
        const cuts = commonCuts(new SumLaw(speaking), observedOf(speaking), names);
        names.forEach((name, k) => expectCut(cuts[k]!, cutOf(tables, name)));
      }),
      { numRuns: 2000, seed: 31 },
    );
  });

  it('keeps its digits where the masses leave the range of doubles', () => {
    const far: Counts[] = Array.from({ length: 60 }, (_, k) => [
      [19, 1 + (k % 2)],
      [k % 3, 20],
    ]);
    const speaking = shaped(far);
    const [upper, , distance] = commonCuts(new SumLaw(speaking), observedOf(speaking), names);
    const exact = cutOf(far, 'distance');
    const decimals = (x: bigint): number => {
      const text = x.toString();
      return Math.log10(Number(`0.${text.slice(0, 17)}`)) + text.length;
    };
    const log = decimals(exact.tied + exact.above) - decimals(exact.whole);
    expect(log).toBeLessThan(-320);
    expect(Math.abs(distance!.atLeast.log10 - log)).toBeLessThan(1e-9);
    expect(upper!.atLeast.log10).toBeLessThan(distance!.atLeast.log10);
  });

  it('counts arrangements as the oracle does', () => {
    fc.assert(
      fc.property(strata, (tables) => {
        const ways = cornerCounts(shaped(tables));
        // Strata of one table add their corner, and no other choice.
        const shift = tables
          .filter((one) => !speaks(stratumOf(one, rowsFirst)))
          .reduce((sum, [row]) => sum + row[0], 0);
        const scale = [...lawOf(tables)].map(([s, own]) => [own, ways(s - shift)] as const);
        const [theirs, ours] = scale[0]!;
        for (const [x, y] of scale) expect(x * ours).toBe(y * theirs);
      }),
      { numRuns: 200, seed: 32 },
    );
  });
});

/** P_psi of the values that `is` picks, by plain sums over the whole support. */
function shareUnder(tables: readonly Counts[], psi: number, is: (s: number) => number): number {
  const law = [...lawOf(tables)];
  const least = Math.min(...law.map(([s]) => s));
  let [part, whole] = [0, 0];
  for (const [s, ways] of law) {
    const weight = Number(ways) * psi ** (s - least);
    part += is(s) * weight;
    whole += weight;
  }
  return part / whole;
}

describe('the conditional odds ratio', () => {
  it('makes the expected sum the observed one, and its limits leave the stated risk in each tail', () => {
    fc.assert(
      fc.property(strata, fc.constantFrom(0.9, 0.95, 0.999), (tables, confidence) => {
        const speaking = shaped(tables);
        const law = new SumLaw(speaking);
        const observed = observedOf(speaking);
        const all = tables.reduce((sum, [row]) => sum + row[0], 0);
        const estimate = conditionalEstimate(law, observed);
        if (estimate > 0 && estimate < Infinity) {
          const least = Math.min(...lawOf(tables).keys());
          const mean = shareUnder(tables, estimate, (s) => s - least) + least;
          expect(Math.abs(mean - all)).toBeLessThan(1e-9 * Math.max(1, all));
        } else expect(observed === law.lowest ? estimate === 0 : estimate === Infinity).toBe(true);
        conditionalIntervals(law, observed, confidence).forEach(({ lower, upper }, k) => {
          const half = k === 0 ? 1 : 0.5;
          const risk = (1 - confidence) / 2;
          if (lower === 0) expect(observed).toBe(law.lowest);
          else {
            const tail = shareUnder(tables, lower as number, (s) => (s > all ? 1 : s === all ? half : 0));
            expect(relativeDifference(tail, risk)).toBeLessThan(1e-9);
          }
          if (upper === 'infinity') expect(observed).toBe(law.highest);
          else {
            const tail = shareUnder(tables, upper as number, (s) => (s < all ? 1 : s === all ? half : 0));
            expect(relativeDifference(tail, risk)).toBeLessThan(1e-9);
          }
        });
      }),
      { numRuns: 250, seed: 33 },
    );
  });
});

describe("Zelen's exact test of homogeneity", () => {
  it('adds up the sets of tables that are no more probable, ties decided exactly', () => {
    fc.assert(
      fc.property(strata, (tables) => {
        const speaking = shaped(tables);
        const law = new SumLaw(speaking);
        const inside = Math.min(law.highest - 0.25, Math.max(law.lowest + 0.25, observedOf(speaking)));
        const cut = zelenCut(speaking, law.psiFor(inside))!;
        const exact = zelenOf(tables);
        expectCut({ below: cut.below, tied: cut.tied, above: cut.above }, exact);
      }),
      { numRuns: 1000, seed: 34 },
    );
  });

  it('says so when the strata are too many and too large', () => {
    const large: Counts[] = Array.from({ length: 6 }, (_, k) => [
      [120 + 20 * k, 330 - 7 * k],
      [290 - 31 * k, 160 + 3 * k],
    ]);
    const speaking = shaped(large);
    const law = new SumLaw(speaking);
    expect(zelenCut(speaking, law.psiFor(observedOf(speaking)))).toBeNull();
  });
});
