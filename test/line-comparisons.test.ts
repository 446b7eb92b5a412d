// Lines compared two by two: the very p of each table of two lines, adjusted by Holm (1979).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import type { Result } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';
import { tableOf, transpose } from './helpers/tables.js';

const run = async (counts: number[][], options: PlanOptions): Promise<Result> =>
  checked(await analyse({ counts }, options.method === 'exact' ? options : { draws: 2000, seed: 'a', ...options }));

const line = [[8, 2, 1], [3, 9, 4], [2, 3, 7], [0, 0, 0]]; // prettier-ignore

describe('comparisons', () => {
  it('are of every two rows that hold counts, or of each with the control', async () => {
    const names = ({ comparisons }: Result): string[] =>
      comparisons!.pairs.map(({ first, second }) => `${first}-${second}`);
    expect(names(await run(line, { compare: 'rows' }))).toEqual(['row 1-row 2', 'row 1-row 3', 'row 2-row 3']);
    expect(names(await run(line, { compare: 'rows', control: 'row 2' }))).toEqual(['row 1-row 2', 'row 3-row 2']);
    expect(names(await run(line, { compare: 'columns' }))).toHaveLength(3);
  });

  it('have the exact p of their two lines alone, whatever the statistic', async () => {
    await fc.assert(
      fc.asyncProperty(
        tableOf({ rows: [3, 4], columns: [2, 3], largest: 4 }),
        fc.constantFrom('pearson', 'likelihood-ratio', 'trend', 'kruskal-wallis', 'max-residual'),
        async (counts, statistic) => {
          const { comparisons } = await run(counts, { statistic, compare: 'rows', method: 'exact' });
          const [pair] = comparisons!.pairs;
          const alone = await run([counts[0]!, counts[1]!], {
            statistic,
            method: 'exact',
            // Columns keep the scores they have in the whole table.
            ...(statistic === 'kruskal-wallis'
              ? { columnScores: (await run(counts, { statistic, method: 'exact' })).plan.columnScores! }
              : {}),
          });
          expect(alone.pValues[0]).toMatchObject(pair!.p);
        },
      ),
      { numRuns: 40 },
    );
  });

  it('of columns are those of rows of the table turned', async () => {
    const rows = await run(line, { compare: 'rows', method: 'exact' });
    const columns = await run(transpose(line), { compare: 'columns', method: 'exact' });
    expect(columns.comparisons!.pairs.map(({ p }) => p.p)).toEqual(rows.comparisons!.pairs.map(({ p }) => p.p));
  });

  it('are adjusted step-down: the smallest p times the number of pairs, none below its own', async () => {
    const { pairs } = (await run(line, { compare: 'rows', method: 'exact' })).comparisons!;
    const sorted = [...pairs].sort((a, b) => a.p.p! - b.p.p!);
    expect(sorted[0]!.adjustedP).toBeCloseTo(Math.min(1, 3 * sorted[0]!.p.p!), 14);
    for (const { p, adjustedP } of pairs) expect(adjustedP!).toBeGreaterThanOrEqual(p.p!);
  });

  it('when sampled, draw apart from each other and repeat with the seed', async () => {
    const one = await run(line, { compare: 'rows', method: 'sample' });
    expect(await run(line, { compare: 'rows', method: 'sample' })).toEqual(one);
    expect(one.comparisons!.pairs.every(({ p }) => p.method === 'sample')).toBe(true);
  });
});

describe('refused', () => {
  it.each([
    [{ control: 'row 1' }, 'option-without-effect'],
    [{ compare: 'rows', control: 'row 9' }, 'unknown-label'],
    [{ compare: 'rows', control: 'row 4' }, 'empty-line-named'],
    [{ compare: 'both' as 'rows' }, 'unknown-value'],
  ] as const)('%j: %s', async (options, code) => {
    await expect(run(line, options)).rejects.toMatchObject({ code });
  });
});
