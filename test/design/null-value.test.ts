// A stated value other than none through the whole of an analysis: entries, plan, words, the command to run again, refusals.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { readInline } from '../../src/input/inline.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import type { Problem } from '../../src/problem/problem.js';
import { render } from '../../src/report/formats.js';
import { againCommand } from '../../src/report/run-again.js';
import type { Result } from '../../src/result/result.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference } from '../helpers/tables.js';

const counts = [
  [62, 18],
  [55, 25],
];
const run = async (options: PlanOptions, table: number[][] = counts): Promise<Result> =>
  checked(await analyse({ counts: table }, options));
const refusal = async (options: PlanOptions, table: number[][] = counts): Promise<string> =>
  analyse({ counts: table }, options).then(
    () => 'not refused',
    (thrown: unknown) => `${(thrown as Problem).code}: ${(thrown as Problem).hint ?? ''}`,
  );

describe('a stated odds ratio', () => {
  it.each(['doubled', 'probability'] as const)('of 1 gives the usual conditional p, rule %s', async (rule) => {
    const stated = await run({ nullValue: 'odds-ratio=1', twoSidedRule: rule });
    const usual = await run({ statistic: 'score', twoSidedRule: rule });
    expect(stated.pValues.map(({ tail }) => tail)).toEqual(['both', 'upper', 'lower']);
    for (const [k, p] of stated.pValues.entries()) {
      for (const part of ['p', 'strict', 'mid', 'point'] as const) {
        expect(relativeDifference(p[part]!, usual.pValues[k]![part]!), `${p.tail} ${part}`).toBeLessThan(1e-11);
      }
    }
  });

  it('is named in plan and p-values, and nothing about no effect stands beside', async () => {
    const result = await run({ nullValue: 'odds-ratio=2' });
    expect(result.plan).toMatchObject({
      nullValue: { of: 'odds-ratio', value: 2 },
      twoSidedRule: 'doubled',
      fixed: 'both',
      method: 'exact',
    });
    expect(result.pValues.map(({ nullValue, method }) => [method, nullValue])).toEqual(
      Array.from({ length: 3 }, () => ['exact', { of: 'odds-ratio', value: 2 }]),
    );
    expect([result.designs, result.fragility, result.cells]).toEqual([undefined, undefined, undefined]);
  });

  it('follows the event and the groups that are named', async () => {
    const parts = { counts, rowLabels: ['new', 'old'], columnLabels: ['healed', 'open'] };
    const plain = await analyse(parts, { nullValue: 'odds-ratio=2', tail: 'upper' });
    const turned = await analyse(parts, { nullValue: 'odds-ratio=0.5', tail: 'lower', reference: 'new' });
    const byColumns = await analyse(parts, { nullValue: 'odds-ratio=2', tail: 'upper', groups: 'columns' });
    expect(relativeDifference(turned.pValues[0]!.p!, plain.pValues[0]!.p!)).toBeLessThan(1e-11);
    expect(relativeDifference(byColumns.pValues[0]!.p!, plain.pValues[0]!.p!)).toBeLessThan(1e-11);
  });

  it('of margins that allow one table only has p = 1', async () => {
    const { pValues, notes } = await run({ nullValue: 'odds-ratio=3' }, [
      [5, 0],
      [4, 0],
    ]);
    expect(pValues.map(({ p }) => p)).toEqual([1, 1, 1]);
    expect(notes.map(({ code }) => code)).toContain('only-one-table');
  });
});

describe('a stated difference or ratio', () => {
  it.each(['difference=0', 'ratio=1'])('of none gives the unconditional p of the score (%s)', async (nullValue) => {
    for (const twoSidedRule of ['distance', 'doubled'] as const) {
      const stated = await run({ nullValue, fixed: 'rows', twoSidedRule });
      const usual = await run({ statistic: 'score', fixed: 'rows', twoSidedRule });
      for (const [k, { p, method }] of stated.pValues.entries()) {
        expect(method).toBe('unconditional');
        expect(relativeDifference(p!, usual.pValues[k]!.p!)).toBeLessThan(1e-10);
      }
      expect(relativeDifference(stated.statistic.value as number, usual.statistic.value as number)).toBeLessThan(1e-9);
    }
  });

  it('reads columns as groups where the study fixed those', async () => {
    const turned = await run({ nullValue: 'difference=-0.1', fixed: 'columns' }, [
      [62, 55],
      [18, 25],
    ]);
    const plain = await run({ nullValue: 'difference=-0.1', fixed: 'rows' });
    expect(turned.pValues[0]!.p).toBe(plain.pValues[0]!.p);
  });
});

describe('two values', () => {
  it.each<PlanOptions>([
    { nullValue: 'difference=-0.1,0.25', fixed: 'rows' },
    { nullValue: 'ratio=0.8,1.25', fixed: 'rows' },
    { nullValue: 'odds-ratio=0.5,4' },
  ])('test equivalence: p is the larger of the two one-tailed ones (%o)', async (options) => {
    const { plan, pValues } = await run(options);
    const [of, pair] = options.nullValue!.split('=') as [string, string];
    const [low, high] = pair.split(',') as [string, string];
    const above = await run({ ...options, nullValue: `${of}=${low}`, tail: 'upper' });
    const below = await run({ ...options, nullValue: `${of}=${high}`, tail: 'lower' });
    expect(pValues.slice(1).map(({ p }) => p)).toEqual([above.pValues[0]!.p, below.pValues[0]!.p]);
    expect(pValues[0]!.p).toBe(Math.max(above.pValues[0]!.p!, below.pValues[0]!.p!));
    expect(pValues[0]!.nullValue).toEqual({ of, between: [Number(low), Number(high)] });
    expect(plan.twoSidedRule).toBeNull();
  });
});

describe('its words', () => {
  it('say what was tested, and cite it', async () => {
    const odds = await run({ nullValue: 'odds-ratio=2' });
    expect(odds.sentence).toContain('the two-tailed conditional p (rule: doubled) against an odds ratio of 2 is');
    expect(odds.methods).toContain('noncentral hypergeometric law; Fisher 1935; Cornfield 1956');
    const difference = await run({ nullValue: 'difference=-0.1', fixed: 'rows', tail: 'upper' });
    expect(difference.sentence).toContain(
      'the upper-tailed unconditional p against a difference of -0.1 (that the difference is larger) is',
    );
    expect(difference.methods).toContain('Chan 1998');
    expect(difference.methods).toContain('Farrington & Manning 1990');
    expect(difference.notes.map(({ code }) => code)).toContain('near-ties-counted');
    const pair = await run({ nullValue: 'ratio=0.8,1.25', fixed: 'rows' });
    expect(pair.sentence).toContain('unconditional p for a ratio between 0.8 and 1.25 (the larger of two one-tailed)');
    expect(pair.methods).toContain('Schuirmann 1987');
    const text = render(pair, 'text').replace(/\s+/g, ' ');
    expect(text).toContain('over "row 2", between 0.8 and 1.25?');
    expect(text).not.toContain('common to both groups');
  });

  it.each<PlanOptions>([
    { nullValue: 'odds-ratio=2' },
    { nullValue: 'difference=-0.1', fixed: 'rows', tail: 'upper' },
    { nullValue: 'ratio=0.8,1.25', fixed: 'rows' },
  ])('hold the command to run it again (%o)', async (options) => {
    const result = checked(await analyse(readInline(['a=62,18', 'b=55,25']), options));
    expect(againCommand(result)!.map((word) => word.replace(/^'(.*)'$/, '$1'))).toContain(
      `--null-value ${options.nullValue!}`,
    );
    const { plan } = result;
    const again = await analyse(readInline(['a=62,18', 'b=55,25']), {
      nullValue: options.nullValue!,
      statistic: plan.statistic,
      tail: plan.tail,
      ...(plan.twoSidedRule === null ? {} : { twoSidedRule: plan.twoSidedRule }),
      ...(plan.fixed === 'rows' ? { fixed: 'rows' } : {}),
      method: plan.method,
    });
    expect(again.pValues).toEqual(result.pValues);
  });
});

describe('what does not go with it', () => {
  it.each<[string, PlanOptions, number[][]?]>([
    ['bad-null-value', { nullValue: 'odds-ratio' }],
    ['bad-null-value', { nullValue: 'odds-ratio=-2' }],
    ['bad-null-value', { nullValue: 'odds-ratio=2,1' }],
    ['bad-null-value', { nullValue: 'difference=1', fixed: 'rows' }],
    ['unknown-value', { nullValue: 'rato=2' }],
    ['null-value-with', { nullValue: 'difference=0.1' }],
    ['null-value-with', { nullValue: 'odds-ratio=2', fixed: 'rows' }],
    ['null-value-with', { nullValue: 'difference=0.1', fixed: 'total' }],
    ['null-value-with', { nullValue: 'odds-ratio=2', method: 'sample' }],
    ['null-value-with', { nullValue: 'odds-ratio=2', method: 'asymptotic' }],
    ['null-value-with', { nullValue: 'odds-ratio=2', statistic: 'pearson' }],
    ['null-value-with', { nullValue: 'odds-ratio=2', twoSidedRule: 'blaker' }],
    ['option-without-effect', { nullValue: 'odds-ratio=2', paired: true }],
    ['option-without-effect', { nullValue: 'odds-ratio=2', compare: 'rows' }],
    ['option-without-effect', { nullValue: 'odds-ratio=1,2', tail: 'upper' }],
    ['option-without-effect', { nullValue: 'odds-ratio=1,2', twoSidedRule: 'doubled' }],
    [
      'empty-group',
      { nullValue: 'difference=0.1', fixed: 'rows' },
      [
        [3, 4],
        [0, 0],
      ],
    ],
    [
      'not-two-by-two',
      { nullValue: 'odds-ratio=2' },
      [
        [3, 4],
        [2, 1],
        [5, 2],
      ],
    ],
    ['exact-over-bound', { nullValue: 'difference=0.1', fixed: 'rows', effort: 1000 }],
  ])('is refused with a hint: %s %o', async (code, options, table = counts) => {
    expect(await refusal(options, table)).toMatch(new RegExp(`^${code}: .`));
  });

  it('is refused over strata', async () => {
    const strata = [counts, counts].map((table, k) => ({ label: `s${k}`, counts: table }));
    await expect(analyse({ strata }, { nullValue: 'odds-ratio=2' })).rejects.toMatchObject({
      code: 'option-without-effect',
    });
  });
});
