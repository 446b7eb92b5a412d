// The main job against published and constructed tables whose answers another program worked out in exact arithmetic
// (fixtures/reference/README.md names definitions and sources; each case carries its own).
import { describe, expect, it } from 'vitest';
import cases from '../fixtures/reference/data/conditional.json' with { type: 'json' };
import ownAnswers from '../fixtures/reference/data/own-answers.json' with { type: 'json' };
import { toNumber } from '../fixtures/reference/generator/oracle.js';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import { relativeDifference } from './helpers/tables.js';
import { checked } from './helpers/checked-result.js';

interface Tails {
  p: number;
  strict: number;
  midP: number;
}
interface Signed {
  T: number | 'Infinity' | '-Infinity' | null;
  upper: number;
  lower: number;
  twoTailed: number;
}
interface Case {
  id: string;
  title: string;
  source: string;
  table: number[][];
  exact:
    | (Record<'pearson' | 'likelihood-ratio' | 'probability', Tails | undefined> & {
        lower?: number;
        upper?: number;
        doubled?: number;
        point?: number;
        midUpper?: number;
        midLower?: number;
        tables?: number;
        permutation?: Record<'rows' | 'columns', Record<'wald' | 'score', Signed | null>>;
      })
    | null;
  asymptotic: Record<'pearson' | 'likelihoodRatio', { statistic: number; p: number }> & { df: number };
}

const all = cases as unknown as Case[];
const upperStatistics = ['pearson', 'likelihood-ratio', 'probability'] as const;
/** Exact cases beyond what this machine's test run should spend on them. */
const affordable = ({ exact, table }: Case): boolean =>
  exact !== null && (exact.tables ?? (table.length * table[0]!.length === 4 ? 0 : Infinity)) <= 2e6;
const bound = 1e-12;

const run = async (table: number[][], options: PlanOptions): Promise<ReturnType<typeof checked>> =>
  checked(await analyse({ counts: table }, options));

describe.each(all.filter(affordable))('$id: $title ($source)', (reference) => {
  const exact = reference.exact!;

  it.each(upperStatistics.filter((name) => exact[name] !== undefined))('%s, exact', async (statistic) => {
    const truth = exact[statistic]!;
    const { pValues } = await run(reference.table, { statistic, method: 'exact' });
    const [headline] = pValues;
    for (const [what, ours, theirs] of [
      ['p', headline!.p, truth.p],
      ['strict', headline!.strict, truth.strict],
      ['mid', headline!.mid, truth.midP],
    ] as const) {
      expect(relativeDifference(ours!, theirs), `${what}: ${ours} not ${theirs}`).toBeLessThan(bound);
    }
    if (exact.point !== undefined) expect(relativeDifference(headline!.point!, exact.point)).toBeLessThan(bound);
  });

  it('asymptotic pearson and likelihood-ratio', async () => {
    for (const [statistic, key] of [
      ['pearson', 'pearson'],
      ['likelihood-ratio', 'likelihoodRatio'],
    ] as const) {
      if (reference.asymptotic[key] === null) continue;
      const result = await run(reference.table, { statistic, method: 'asymptotic' });
      const truth = reference.asymptotic[key];
      expect(relativeDifference(result.statistic.value as number, truth.statistic)).toBeLessThan(1e-12);
      expect(relativeDifference(result.pValues[0]!.p!, truth.p)).toBeLessThan(1e-11);
      expect(result.statistic.degreesOfFreedom).toBe(reference.asymptotic.df);
    }
  });

  const { permutation } = exact;
  if (permutation === undefined) return;
  for (const groups of ['rows', 'columns'] as const) {
    for (const statistic of ['wald', 'score'] as const) {
      const truth = permutation[groups][statistic];
      if (truth === null) continue; // one group empty: nothing to compare
      it(`${statistic} with ${groups} as groups: value, both tails, two tails by distance, doubled, probability`, async () => {
        const options = { statistic, groups, method: 'exact' } as const;
        const result = await run(reference.table, options);
        const [both, upper, lower] = result.pValues;
        if (typeof truth.T === 'number') {
          expect(relativeDifference(result.statistic.value as number, truth.T)).toBeLessThan(1e-12);
        } else if (truth.T !== null) expect(result.statistic.value).toBe(truth.T.toLowerCase());
        expect(relativeDifference(both!.p!, truth.twoTailed)).toBeLessThan(bound);
        expect(relativeDifference(upper!.p!, truth.upper)).toBeLessThan(bound);
        expect(relativeDifference(lower!.p!, truth.lower)).toBeLessThan(bound);
        const doubled = await run(reference.table, { ...options, twoSidedRule: 'doubled' });
        expect(relativeDifference(doubled.pValues[0]!.p!, exact.doubled!)).toBeLessThan(bound);
        const probability = await run(reference.table, { ...options, twoSidedRule: 'probability' });
        expect(relativeDifference(probability.pValues[0]!.p!, exact.probability!.p)).toBeLessThan(bound);
        const midUpper = await run(reference.table, { ...options, tail: 'upper' });
        expect(relativeDifference(midUpper.pValues[0]!.mid!, exact.midUpper!)).toBeLessThan(bound);
      });
    }
  }
});

describe('the carried answers and our own oracle', () => {
  it.each(ownAnswers)('$id agrees', ({ id, cuts }) => {
    const carried = all.find((one) => one.id === id)!;
    for (const statistic of upperStatistics) {
      const [numerator, denominator] = cuts[statistic].p.split('/') as [string, string];
      const ours = toNumber(BigInt(numerator), BigInt(denominator));
      expect(relativeDifference(ours, carried.exact![statistic]!.p)).toBeLessThan(1e-15);
    }
  });
});

describe('single figures', () => {
  it('80,250 408,1080 by probability: a tie is decided, not taken by a tolerance', async () => {
    const counts = [
      [80, 250],
      [408, 1080],
    ];
    const { pValues } = await run(counts, { statistic: 'probability' });
    expect(relativeDifference(pValues[0]!.p!, 0.2441559705698148)).toBeLessThan(1e-13);
  });

  it("Fisher's (1935) twins, 2,15 10,3: one-tailed 0.000465 and probability-ordered 0.000537 (from memory)", async () => {
    const counts = [
      [2, 15],
      [10, 3],
    ];
    const { pValues } = await run(counts, { statistic: 'wald', twoSidedRule: 'probability' });
    expect(pValues[0]!.p!).toBeCloseTo(0.000537, 6);
    expect(pValues[2]!.p!).toBeCloseTo(0.000465, 6);
  });
});
