// The p of the declared design stands first, the conditional one beside it, and the panel tells the same as a run would.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import type { Problem } from '../../src/problem/problem.js';
import { render } from '../../src/report/formats.js';
import type { Result } from '../../src/result/result.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference } from '../helpers/tables.js';

const table = [
  [7, 27],
  [1, 33],
];
const run = async (counts: number[][], options: PlanOptions = {}): Promise<Result> =>
  checked(await analyse({ counts }, options));
const refusal = async (counts: number[][], options: PlanOptions): Promise<string> =>
  run(counts, options).then(
    () => 'not refused',
    (thrown: unknown) => (thrown as Problem).code,
  );

describe('two groups of fixed size', () => {
  it('put the unconditional p first and the conditional one beside it', async () => {
    const { plan, pValues } = await run(table, { fixed: 'rows', statistic: 'score' });
    expect(plan).toMatchObject({ fixed: 'rows', groups: 'rows', method: 'exact', outcomeOrder: 'statistic' });
    expect(plan.forecast.engine).toBe('unconditional');
    expect(pValues.map(({ method, tail }) => `${method} ${tail}`)).toEqual([
      'unconditional both',
      'unconditional upper',
      'unconditional lower',
      'exact both',
      'asymptotic both',
    ]);
    expect(pValues[0]!.p).toBeCloseTo(0.0281058411163, 12);
    expect(pValues[0]!.nuisance!.value).toBeCloseTo(0.1316245, 5);
    expect(pValues[0]).toMatchObject({ guaranteed: true, strict: null, mid: null });
  });

  it('order outcomes by conditional p where asked to, two-tailed by probability or doubled', async () => {
    const probability = await run(table, { fixed: 'rows', statistic: 'score', outcomeOrder: 'conditional-p' });
    expect(probability.plan.twoSidedRule).toBe('probability');
    const plain = await run(table, { fixed: 'rows', outcomeOrder: 'conditional-p' });
    expect(plain.plan.statistic).toBe('probability');
    expect(plain.pValues[0]!.p).toBe(probability.pValues[0]!.p);
    const doubled = await run(table, {
      fixed: 'rows',
      statistic: 'score',
      outcomeOrder: 'conditional-p',
      twoSidedRule: 'doubled',
    });
    const [both, upper, lower] = doubled.pValues;
    expect(both!.p).toBe(Math.min(1, 2 * Math.min(upper!.p!, lower!.p!)));
  });

  it('add the risk of a restricted nuisance proportion, and say so', async () => {
    const result = await run(table, { fixed: 'rows', nuisanceRisk: 0.001 });
    const { p, nuisance } = result.pValues[0]!;
    expect(p! - nuisance!.certifiedUpper).toBeCloseTo(0.001, 14);
    expect(result.methods).toContain('Berger & Boos 1994');
    expect(render(result, 'text').replace(/\s+/g, ' ')).toContain('nuisance risk 0.001');
  });

  it('keep an empty column: nothing was learned, p is 1', async () => {
    const counts = [
      [5, 0],
      [3, 0],
    ];
    for (const statistic of ['pearson', 'score', 'wald']) {
      const result = await run(counts, { fixed: 'rows', statistic });
      expect(result.pValues[0]).toMatchObject({ method: 'unconditional', p: 1 });
      expect(result.notes.map(({ code }) => code)).not.toContain('only-one-table');
      expect(result.notes.map(({ code }) => code)).not.toContain('empty-lines');
    }
  });

  it('keep the direction when event and groups are named', async () => {
    const parts = { counts: table, rowLabels: ['a', 'b'], columnLabels: ['x', 'y'] };
    const plain = await analyse(parts, { fixed: 'rows', statistic: 'score', tail: 'upper' });
    const turned = await analyse(parts, {
      fixed: 'rows',
      statistic: 'score',
      tail: 'upper',
      event: 'y',
      reference: 'a',
    });
    expect(relativeDifference(turned.pValues[0]!.p!, plain.pValues[0]!.p!)).toBeLessThan(1e-10);
    const opposite = await analyse(parts, { fixed: 'rows', statistic: 'score', tail: 'lower', reference: 'a' });
    expect(relativeDifference(opposite.pValues[0]!.p!, plain.pValues[0]!.p!)).toBeLessThan(1e-10);
  });
});

describe('the panel', () => {
  it.each<PlanOptions>([
    {},
    { statistic: 'score' },
    { statistic: 'score', tail: 'upper' },
    { statistic: 'score', twoSidedRule: 'doubled' },
    { statistic: 'probability' },
  ])('tells for each design what a run under it finds (%o)', async (options) => {
    const { designs } = await run(table, options);
    expect(designs!.map(({ fixed, assumed }) => [fixed, assumed])).toEqual([
      ['both', true],
      ['rows', false],
      ['columns', false],
      ['total', false],
    ]);
    for (const line of designs!) {
      const order = options.statistic === 'probability' ? { outcomeOrder: 'conditional-p' as const } : {};
      const asked =
        line.fixed === 'total'
          ? { ...options, statistic: options.statistic === 'probability' ? 'pearson' : options.statistic }
          : options;
      const { pValues } = await run(table, {
        ...asked,
        ...(line.fixed === 'rows' || line.fixed === 'columns' ? order : {}),
        fixed: line.fixed,
      } as PlanOptions);
      expect(line.p).toBe(pValues[0]!.p);
    }
  });

  it('leaves out what would take long, and says so', async () => {
    const result = await run([
      [60, 40],
      [45, 55],
    ]);
    const line = result.designs!.find(({ fixed }) => fixed === 'total')!;
    expect(line).toMatchObject({ p: null, reason: 'over-bound' });
    expect(render(result, 'text').replace(/\s+/g, ' ')).toContain(
      'had the study fixed the total only (--fixed total), which takes more work than is done unasked',
    );
  });

  it('is there for 2x2 tables only', async () => {
    expect(
      (
        await run([
          [3, 4, 5],
          [6, 7, 1],
        ])
      ).designs,
    ).toBeUndefined();
    expect((await run(table, { method: 'asymptotic' })).designs).toBeUndefined();
  });
});

describe('a larger table with one margin fixed', () => {
  it('keeps the permutation p, and says why', async () => {
    const counts = [
      [3, 4, 5],
      [6, 7, 1],
    ];
    const [free, fixed] = [await run(counts), await run(counts, { fixed: 'rows' })];
    expect(fixed.pValues).toEqual(free.pValues);
    expect(fixed.notes.map(({ code }) => code)).toContain('conditional-p-stays-valid');
  });
});

describe('what a design leaves without an answer is refused', () => {
  it.each<[string, PlanOptions]>([
    ['unknown-value', { fixed: 'row' as 'rows' }],
    ['groups-not-fixed', { fixed: 'rows', groups: 'columns', statistic: 'score' }],
    ['no-unconditional-order', { fixed: 'rows', statistic: 'likelihood-ratio' }],
    ['no-unconditional-order', { fixed: 'rows', tail: 'lower' }],
    ['rule-without-order', { fixed: 'rows', statistic: 'score', twoSidedRule: 'probability' }],
    [
      'rule-without-order',
      { fixed: 'rows', statistic: 'score', twoSidedRule: 'distance', outcomeOrder: 'conditional-p' },
    ],
    ['unconditional-not-sampled', { fixed: 'rows', method: 'sample' }],
    ['option-without-effect', { outcomeOrder: 'conditional-p' }],
    ['option-without-effect', { nuisanceRisk: 0.001 }],
    ['not-a-share', { fixed: 'rows', nuisanceRisk: 2 }],
    ['exact-over-bound', { fixed: 'rows', effort: 100 }],
    ['no-exact-total', { fixed: 'total', statistic: 'wald', method: 'exact' }],
    ['no-bootstrap', { fixed: 'total', statistic: 'wald', twoSidedRule: 'probability' }],
    ['option-without-effect', { fixed: 'total', method: 'sample', draws: 'auto' }],
  ])('%s: %o', async (code, options) => {
    expect(await refusal(table, options)).toBe(code);
  });
});
