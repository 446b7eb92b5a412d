// What a plan settles before work starts, and what it refuses.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import type { Problem } from '../../src/problem/problem.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { makePlan } from '../../src/plan/make-plan.js';
import { liveTable } from '../../src/table/live-table.js';
import { makeTable } from '../../src/table/table.js';

const twoByTwo = [
  [8, 2],
  [1, 9],
];
const larger = [
  [3, 0, 2],
  [1, 4, 0],
  [2, 2, 3],
];
const enormous = Array.from({ length: 8 }, () => Array.from({ length: 8 }, () => 20));

const planFor = (counts: number[][], options: PlanOptions = {}): ReturnType<typeof makePlan>['plan'] => {
  const table = makeTable({ counts });
  return makePlan(table, liveTable(table), options).plan;
};

const refusal = (counts: number[][], options: object): { code: string; status: number; hint: string } => {
  try {
    planFor(counts, options as PlanOptions);
  } catch (thrown) {
    const { code, exitStatus, hint } = thrown as Problem;
    return { code, status: exitStatus, hint };
  }
  throw new Error('was not refused');
};

describe('a plan', () => {
  it('is exact where exact is cheap and says so', () => {
    const plan = planFor(larger);
    expect(plan).toMatchObject({
      statistic: 'pearson',
      tail: 'upper',
      method: 'exact',
      methodAsked: 'auto',
      draws: null,
      seed: null,
    });
    expect(plan.methodReason).toMatch(/tables have these margins; exact work is forecast at/);
    expect(plan.forecast.tables).toBeGreaterThan(1);
  });

  it('samples where it is not, with the reason and a seed, until p is settled', () => {
    const plan = planFor(enormous);
    expect(plan).toMatchObject({ method: 'sample', draws: 'auto', mostDraws: 1e7, relativeError: 0.02 });
    expect(plan.samplingRisk).toBeCloseTo(0.05 / 500, 12);
    expect(plan.methodReason).toMatch(/^exact is out of reach: about/);
    expect(plan.seed).toMatch(/^[2-9a-hjkmnp-z]{8}$/);
    expect(planFor(enormous).seed).not.toBe(plan.seed);
  });

  it('is frozen', () => {
    expect(Object.isFrozen(planFor(larger))).toBe(true);
  });

  it('names the groups, the event and the reference for signed statistics', () => {
    expect(planFor(twoByTwo, { statistic: 'wald' })).toMatchObject({
      tail: 'both',
      twoSidedRule: 'distance',
      groups: 'rows',
      event: 'column 1',
      reference: 'row 2',
    });
    expect(
      planFor(twoByTwo, { statistic: 'score', groups: 'columns', event: 'row 2', reference: 'column 1' }),
    ).toMatchObject({
      groups: 'columns',
      event: 'row 2',
      reference: 'column 1',
    });
  });

  it('takes scores as text, numbers or midranks, for all lines before empty ones are left out', () => {
    const counts = [
      [3, 0, 2],
      [0, 0, 0],
      [2, 4, 3],
    ];
    expect(planFor(counts, { statistic: 'trend', rowScores: '0, -1.50, 2e1', columnScores: 'midranks' })).toMatchObject(
      {
        rowScores: [0, -1.5, 20],
        columnScores: [3, 7.5, 12],
      },
    );
    expect(planFor(counts, { statistic: 'trend', rowScores: [0.1, 0.2, 0.3] })).toMatchObject({
      rowScores: [0.1, 0.2, 0.3],
      columnScores: [1, 2, 3],
      tail: 'both',
      twoSidedRule: 'distance',
      groups: null,
    });
  });

  it('reads lambda as the fraction it is, and echoes it in lowest terms', () => {
    const lambdaOf = (lambda?: string | number): string | undefined =>
      planFor(larger, { statistic: 'power-divergence', ...(lambda === undefined ? {} : { lambda }) }).lambda;
    expect([undefined, '4/6', 0.25, '-0.5', 2].map(lambdaOf)).toEqual(['2/3', '2/3', '1/4', '-1/2', '2']);
  });

  it.each([
    ['a name that is no statistic', twoByTwo, { statistic: 'pearsen' }, 'unknown-statistic', /did you mean pearson/],
    ['wald on a 3x3', larger, { statistic: 'wald' }, 'not-two-by-two', /pearson/],
    ['both tails of an upper statistic', twoByTwo, { tail: 'both' }, 'tail-of-upper-statistic', /--tail upper/],
    [
      'a two-sided rule for one tail',
      twoByTwo,
      { statistic: 'wald', tail: 'upper', twoSidedRule: 'doubled' },
      'option-without-effect',
      /leave it out/,
    ],
    ['groups for pearson', larger, { groups: 'columns' }, 'option-without-effect', /wald or score/],
    ['scores for pearson', larger, { rowScores: '1,2,3' }, 'option-without-effect', /use trend/],
    ['groups for trend', larger, { statistic: 'trend', groups: 'rows' }, 'option-without-effect', /wald or score/],
    ['too few scores', larger, { statistic: 'trend', rowScores: '1,2' }, 'score-count', /--row-scores 1,2,3/],
    ['a word as a score', larger, { statistic: 'trend', columnScores: '1,two,3' }, 'not-a-score', /midranks/],
    [
      'a score that no number holds',
      larger,
      { statistic: 'trend', columnScores: '1,2,3.00000000000000000001' },
      'score-digits',
      /15 significant/,
    ],
    [
      'random tables for the rule probability',
      larger,
      { statistic: 'trend', twoSidedRule: 'probability', method: 'sample' },
      'rule-needs-exact',
      /distance or doubled/,
    ],
    ['a lambda for pearson', larger, { lambda: 1 }, 'option-without-effect', /use power-divergence/],
    [
      'a lambda of -1',
      larger,
      { statistic: 'power-divergence', lambda: -1 },
      'lambda-out-of-range',
      /infinitely far out/,
    ],
    ['a lambda in words', larger, { statistic: 'power-divergence', lambda: 'two' }, 'not-a-lambda', /2\/3/],
    ['an unknown event', twoByTwo, { statistic: 'wald', event: 'colum 1' }, 'unknown-label', /did you mean column 1/],
    ['no draws', enormous, { draws: 0 }, 'out-of-range', /--draws/],
    ['half a draw', enormous, { draws: 1.5 }, 'out-of-range', /--draws/],
    ['draws for an exact p', twoByTwo, { method: 'exact', draws: 100 }, 'option-without-effect', /--method sample/],
    [
      'most draws beside a fixed number',
      enormous,
      { draws: 1000, mostDraws: 5000 },
      'option-without-effect',
      /--draws auto/,
    ],
    ['a risk above alpha', enormous, { samplingRisk: 0.2 }, 'option-without-effect', /--sampling-risk/],
    ['a limit below one block', enormous, { mostDraws: 500 }, 'out-of-range', /--most-draws/],
    ['an empty seed', enormous, { seed: '' }, 'empty-seed', /any text/],
    ['an alpha of 2', twoByTwo, { alpha: 2 }, 'not-a-share', /0\.05/],
    ['an unknown tail', twoByTwo, { tail: 'uper' }, 'unknown-value', /did you mean upper/],
    [
      'an asymptotic p of the probability',
      twoByTwo,
      { statistic: 'probability', method: 'asymptotic' },
      'no-asymptotic-form',
      /pearson/,
    ],
  ])('refuses %s as wrong usage', (_, counts, options, code, hint) => {
    const found = refusal(counts, options);
    expect(found).toMatchObject({ code, status: 2 });
    expect(found.hint).toMatch(hint);
  });

  it('refuses exact work over the bound with the forecast and what works instead', () => {
    const found = refusal(enormous, { method: 'exact' });
    expect(found).toMatchObject({ code: 'exact-over-bound', status: 3 });
    // More than a day's work is no advice.
    expect(found.hint).toBe('use --method sample');
    const large = [
      [31, 22, 9, 14],
      [18, 34, 27, 12],
      [7, 19, 41, 22],
      [12, 15, 18, 33],
    ];
    expect(refusal(large, { method: 'exact' }).hint).toMatch(
      /^use --method sample, or raise the bound with --effort \d\.\de\d$/,
    );
  });
});

describe('one table only', () => {
  it.each([
    ['one column', [[3], [4]]],
    [
      'an empty row',
      [
        [0, 0],
        [5, 8],
      ],
    ],
  ])('%s: p is 1, with a note', async (_, counts) => {
    const result = await analyse({ counts });
    expect(result.pValues).toHaveLength(1);
    expect(result.pValues[0]).toMatchObject({ p: 1, strict: 0, mid: 0.5, tied: 1, method: 'exact' });
    expect(result.notes.map(({ code }) => code)).toContain('only-one-table');
  });
});
