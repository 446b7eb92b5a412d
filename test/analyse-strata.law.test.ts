// Laws over strata: what must not matter does not, and one stratum is one table.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import type { Result } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';
import { relativeDifference, smallTable, tableOf, twoByTwoTable } from './helpers/tables.js';

const run = async (strata: number[][][], options: PlanOptions): Promise<Result> =>
  checked(await analyse({ strata }, { method: 'exact', ...options }));
const exactOf = (result: Result): number[] =>
  result.pValues.filter(({ method }) => method === 'exact').map(({ p }) => p!);
const asymptoticOf = (result: Result): number[] =>
  result.pValues.filter(({ method }) => method === 'asymptotic').map(({ p }) => p!);
const expectSame = (ours: readonly number[], theirs: readonly number[], bound = 1e-12): void => {
  expect(ours).toHaveLength(theirs.length);
  ours.forEach((p, k) => expect(relativeDifference(p, theirs[k]!)).toBeLessThan(bound));
};

describe('one stratum', () => {
  it('of a 2x2 table has the p of the table itself, by every rule', async () => {
    await fc.assert(
      fc.asyncProperty(twoByTwoTable, fc.constantFrom('distance', 'probability', 'doubled'), async (counts, rule) => {
        const ours = await run([counts], { twoSidedRule: rule });
        const alone = await analyse({ counts }, { statistic: 'score', twoSidedRule: rule, method: 'exact' });
        expectSame(exactOf(ours).slice(0, 3), exactOf(alone));
        expect(ours.pValues[0]!.point).toBeCloseTo(alone.pValues[0]!.point!, 12);
      }),
      { numRuns: 150, seed: 51 },
    );
  });

  it('has the p of Pearson, and a chi-square of (n - 1)/n times his', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, async (counts) => {
        const n = counts.flat().reduce((sum, x) => sum + x, 0);
        const ours = await run([counts], { statistic: 'any-association' });
        const alone = await analyse({ counts }, { statistic: 'pearson', method: 'exact' });
        expectSame([ours.pValues[0]!.p!], [alone.pValues[0]!.p!]);
        const scaled = ((alone.statistic.value as number) * (n - 1)) / n;
        expect(Math.abs((ours.statistic.value as number) - scaled)).toBeLessThan(1e-9 * Math.max(1, scaled));
        expect(ours.statistic.degreesOfFreedom).toBe(alone.statistic.degreesOfFreedom);
      }),
      { numRuns: 100, seed: 52 },
    );
  });

  it('with the same scores has the p of the trend', async () => {
    await fc.assert(
      fc.asyncProperty(tableOf({ rows: [2, 3], columns: [2, 4], largest: 3 }), async (counts) => {
        const scores = { rowScores: counts.map((_, i) => i * i), columnScores: counts[0]!.map((_, j) => 2 * j + 1) };
        const ours = await run([counts], { statistic: 'score-correlation', ...scores });
        const alone = await analyse({ counts }, { statistic: 'trend', method: 'exact', ...scores });
        expectSame(exactOf(ours), exactOf(alone));
        expectSame(asymptoticOf(ours), asymptoticOf(alone).slice(0, 1), 1e-9);
      }),
      { numRuns: 60, seed: 53 },
    );
  });
});

const strataOf = (table: fc.Arbitrary<number[][]>): fc.Arbitrary<number[][][]> =>
  fc.array(table, { minLength: 1, maxLength: 3 });
const emptied = (table: number[][]): number[][] => table.map((row) => row.map(() => 0));
const oneRowOnly = (table: number[][]): number[][] => table.map((row, i) => row.map((_, j) => (i === 0 ? j + 1 : 0)));

describe('strata that say nothing', () => {
  it.each(['common-odds-ratio', 'any-association', 'mean-scores', 'score-correlation'])(
    'change no p of %s: an empty one, and one with a single row',
    async (statistic) => {
      const table =
        statistic === 'common-odds-ratio' ? twoByTwoTable : tableOf({ rows: [2, 2], columns: [3, 3], largest: 2 });
      await fc.assert(
        fc.asyncProperty(strataOf(table), async (strata) => {
          const plain = await run(strata, { statistic });
          const more = await run([emptied(strata[0]!), ...strata, oneRowOnly(strata[0]!)], { statistic });
          expectSame(exactOf(more), exactOf(plain));
          expectSame(asymptoticOf(more), asymptoticOf(plain), 1e-9);
          expect(more.strata!.decides).toEqual([false, ...plain.strata!.decides, false]);
          expect(more.notes.map(({ code }) => code)).toContain('silent-strata');
        }),
        { numRuns: 25, seed: 54 },
      );
    },
  );

  it('alone give p = 1 with the reason', async () => {
    const result = await run(
      [
        [
          [3, 0],
          [2, 0],
        ],
        [
          [0, 4],
          [0, 1],
        ],
      ],
      {},
    );
    expect(result.pValues[0]!.p).toBe(1);
    expect(result.notes.map(({ code }) => code)).toContain('only-one-table');
  });
});

describe('symmetries', () => {
  it('groups exchanged exchange the tails, and turn the odds ratio over', async () => {
    await fc.assert(
      fc.asyncProperty(strataOf(twoByTwoTable), async (strata) => {
        const [both, upper, lower] = exactOf(await run(strata, {}));
        const turned = await run(
          strata.map(([x, y]) => [y!, x!]),
          {},
        );
        expectSame(exactOf(turned).slice(0, 3), [both!, lower!, upper!]);
      }),
      { numRuns: 100, seed: 55 },
    );
  });

  it('order reversed exchanges the tails of the correlation', async () => {
    await fc.assert(
      fc.asyncProperty(strataOf(tableOf({ rows: [2, 2], columns: [3, 3], largest: 2 })), async (strata) => {
        const [both, upper, lower] = exactOf(await run(strata, { statistic: 'score-correlation' }));
        const turned = await run(
          strata.map((table) => table.map((row) => [...row].reverse())),
          { statistic: 'score-correlation' },
        );
        expectSame(exactOf(turned), [both!, lower!, upper!]);
      }),
      { numRuns: 50, seed: 56 },
    );
  });

  it('strata in another order are the same question', async () => {
    await fc.assert(
      fc.asyncProperty(strataOf(twoByTwoTable), async (strata) => {
        expectSame(exactOf(await run([...strata].reverse(), {})), exactOf(await run(strata, {})));
      }),
      { numRuns: 50, seed: 57 },
    );
  });
});

describe('sampled within strata', () => {
  const strata = [
    [
      [6, 2, 4],
      [1, 5, 3],
      [2, 2, 6],
    ],
    [
      [3, 1, 1],
      [0, 4, 2],
      [1, 1, 3],
    ],
  ];

  it.each(['any-association', 'mean-scores', 'score-correlation'])(
    '%s: the exact p lies in the interval',
    async (statistic) => {
      const exact = (await run(strata, { statistic, effort: 1e9 })).pValues[0]!;
      const drawn = (await run(strata, { statistic, method: 'sample', draws: 20_000, seed: 'strata' })).pValues[0]!;
      const [error] = drawn.errors;
      const [low, high] = error!.kind === 'sampling' ? error!.interval : [2, 2];
      expect(exact.p!).toBeGreaterThan(low);
      expect(exact.p!).toBeLessThan(high);
    },
  );

  it('a common odds ratio, until settled, gives the same digits for the same seed', async () => {
    const tables = [
      [
        [9, 3],
        [4, 8],
      ],
      [
        [5, 5],
        [2, 9],
      ],
    ];
    const options = { method: 'sample', seed: 'a' } as const;
    const [one, other] = await Promise.all([run(tables, options), run(tables, { ...options })]);
    expect(JSON.stringify(one)).toBe(JSON.stringify(other));
    const exact = (await run(tables, {})).pValues[0]!.p!;
    const [error] = one.pValues[0]!.errors;
    const [low, high] = error!.kind === 'sequential' ? error!.interval : [2, 2];
    expect(exact > low && exact < high).toBe(true);
  });
});
