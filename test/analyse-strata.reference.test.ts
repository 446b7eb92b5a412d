// Strata against published tables: answers worked out by another program in exact arithmetic (fixtures/reference/README.md), and figures
// that sources print or that base R 4.2's mantelhaen.test gives for the same tables.
import { describe, expect, it } from 'vitest';
import cases from '../fixtures/reference/data/strata.json' with { type: 'json' };
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import type { Result } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';
import { relativeDifference } from './helpers/tables.js';

interface Case {
  id: string;
  title: string;
  source: string;
  strata: number[][][];
  exact: {
    probability: { p: number; strict: number; midP: number };
    lower: number;
    upper: number;
    midLower: number;
    midUpper: number;
    doubled: number;
    conditionalOddsRatio: number;
    conditionalOddsRatioCI95: [number, number];
    zelenHomogeneity: number | null;
  };
  asymptotic: Record<'cmh', { statistic: number; p: number }> & {
    cmhCorrected: { clampedStatistic: number; clampedP: number };
    breslowDay: { statistic: number; df: number; p: number };
    tarone: { statistic: number; df: number; p: number };
  };
  effects: { mantelHaenszelOddsRatio: number; rbgCI95: [number, number] };
}

const all = cases as unknown as Case[];
const run = async (strata: number[][][], options: PlanOptions = {}): Promise<Result> =>
  checked(await analyse({ strata }, { method: 'exact', ...options }));
const near = (ours: unknown, theirs: number, bound = 1e-12): void => {
  expect(typeof ours).toBe('number');
  expect(relativeDifference(ours as number, theirs)).toBeLessThan(bound);
};
const pOf = (result: Result, statistic: string, tail = 'both') =>
  result.pValues.find((p) => p.statistic === statistic && p.tail === tail)!;
const effect = (result: Result, name: string) => result.effects!.find((one) => one.name === name)!;

describe.each(all)('$id: $title ($source)', ({ strata, exact, asymptotic, effects }) => {
  it('exact p in both tails and by every rule', async () => {
    const byProbability = await run(strata, { twoSidedRule: 'probability' });
    const [both, upper, lower] = byProbability.pValues;
    near(both!.p, exact.probability.p);
    near(both!.strict, exact.probability.strict);
    near(both!.mid, exact.probability.midP);
    near(upper!.p, exact.upper);
    near(upper!.mid, exact.midUpper);
    near(lower!.p, exact.lower);
    near(lower!.mid, exact.midLower);
    near((await run(strata, { twoSidedRule: 'doubled' })).pValues[0]!.p, exact.doubled);
  });

  it('conditional odds ratio and its limits', async () => {
    const { estimate, intervals } = effect(await run(strata), 'conditional-odds-ratio');
    near(estimate, exact.conditionalOddsRatio);
    near(intervals[0]!.lower, exact.conditionalOddsRatioCI95[0]);
    near(intervals[0]!.upper, exact.conditionalOddsRatioCI95[1]);
  });

  it('Mantel-Haenszel odds ratio, limits and chi-square', async () => {
    const result = await run(strata);
    const { estimate, intervals } = effect(result, 'mantel-haenszel-odds-ratio');
    near(estimate, effects.mantelHaenszelOddsRatio);
    near(intervals[0]!.lower, effects.rbgCI95[0]);
    near(intervals[0]!.upper, effects.rbgCI95[1]);
    near(pOf(result, 'mantel-haenszel').value, asymptotic.cmh.statistic);
    near(pOf(result, 'mantel-haenszel').p, asymptotic.cmh.p);
    near(pOf(result, 'mantel-haenszel-corrected').value, asymptotic.cmhCorrected.clampedStatistic);
    near(pOf(result, 'mantel-haenszel-corrected').p, asymptotic.cmhCorrected.clampedP);
  });

  it('homogeneity', async () => {
    const result = await run(strata);
    for (const [name, reference] of [
      ['breslow-day', asymptotic.breslowDay],
      ['tarone', asymptotic.tarone],
    ] as const) {
      // The expected corners are roots of quadratics; their digits go down where a cell expects almost nothing.
      near(pOf(result, name, 'upper').value, reference.statistic, 1e-11);
      expect(pOf(result, name, 'upper').degreesOfFreedom).toBe(reference.df);
      near(pOf(result, name, 'upper').p, reference.p, 1e-10);
    }
    const zelen = pOf(result, 'zelen', 'upper');
    if (exact.zelenHomogeneity === null) {
      expect(zelen).toBeUndefined();
      expect(result.notes.map(({ code }) => code)).toContain('zelen-out-of-reach');
    } else near(zelen.p, exact.zelenHomogeneity);
  });
});

describe('figures that were published or quoted with the tables', () => {
  const named = (id: string): number[][][] => all.find((one) => one.id === id)!.strata;
  const digits = (ours: unknown, theirs: number, significant: number): void =>
    expect(Number((ours as number).toPrecision(significant))).toBe(theirs);

  it('penicillin and rabbits (Mantel 1963)', async () => {
    const result = await run(named('s01-rabbits'), { twoSidedRule: 'probability' });
    digits(result.pValues[0]!.p, 0.0399449036, 9);
    const { estimate, intervals } = effect(result, 'conditional-odds-ratio');
    digits(estimate, 10.3610463495, 12);
    digits(intervals[0]!.lower, 1.07738776, 9);
    digits(intervals[0]!.upper, 531.512783, 9);
  });

  it("admissions (Bickel, Hammel & O'Connell 1975)", async () => {
    const result = await run(named('s02-ucb'));
    digits(effect(result, 'mantel-haenszel-odds-ratio').estimate, 0.904696828, 9);
    digits(pOf(result, 'mantel-haenszel').value, 1.52460666, 9);
    digits(pOf(result, 'mantel-haenszel-corrected').value, 1.42694623, 9);
    digits(pOf(result, 'breslow-day', 'upper').value, 18.8255137, 9);
    const codes = result.notes.map(({ code }) => code);
    expect(codes).toContain('pooled-differs-in-sign');
    expect(codes).toContain('strata-differ');
  });

  // Counts as in the documentation of base R's mantelhaen.test (women, then men), printed in Agresti (2002), Table 7.8.
  const satisfaction = [
    [
      [1, 3, 11, 2],
      [2, 3, 17, 3],
      [0, 1, 8, 5],
      [0, 2, 4, 2],
    ],
    [
      [1, 1, 2, 1],
      [0, 3, 5, 1],
      [0, 0, 7, 3],
      [0, 1, 9, 6],
    ],
  ];
  const scores = { rowScores: [3, 10, 20, 35], columnScores: [1, 3, 4, 5] };

  it.each([
    ['any-association', {}, 10.2000888, 9],
    ['mean-scores', { columnScores: scores.columnScores }, 9.0342221, 3],
    ['score-correlation', scores, 6.1563015, 1],
  ] as const)('income by satisfaction by sex (Agresti 2002): %s', async (statistic, options, value, degrees) => {
    const result = await run(satisfaction, { statistic, method: 'asymptotic', ...options });
    const [p] = result.pValues;
    const chiSquare = statistic === 'score-correlation' ? p!.value! : result.statistic.value;
    expect(Math.abs((chiSquare as number) - value)).toBeLessThan(6e-8);
    expect(p!.degreesOfFreedom).toBe(degrees);
  });
});
