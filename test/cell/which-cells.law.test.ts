// Per-cell p and adjusted p against every table listed, in whole numbers (fixtures/reference/generator/cell-oracle.ts), and laws that
// hold for any table.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { oracleCells } from '../../fixtures/reference/generator/cell-oracle.js';
import { toNumber } from '../../fixtures/reference/generator/oracle.js';
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import type { Result } from '../../src/result/result.js';
import { checked } from '../helpers/checked-result.js';
import { followDraws } from './follow-draws.js';
import { relativeDifference, smallTable, tableOf, transpose, twoByTwoTable } from '../helpers/tables.js';

type Cells = NonNullable<Result['cells']>;

const cellsOf = async (counts: number[][], options: PlanOptions = {}): Promise<Cells> =>
  (await analyse({ counts }, { method: 'asymptotic', cells: true, ...options })).cells!;

const bound = 1e-12;

describe('against every table listed', () => {
  it('p and adjusted p of every cell, 2,000 small tables', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, async (table) => {
        const { p, adjusted, whole } = oracleCells(table);
        const cells = await cellsOf(table);
        cells.forEach((cell, k) => {
          expect(relativeDifference(cell.p!, toNumber(p[k]!, whole))).toBeLessThan(bound);
          expect(cell.method).toBe('exact');
          expect(relativeDifference(cell.adjustedP!, toNumber(adjusted[k]!, whole))).toBeLessThan(bound);
        });
      }),
      { numRuns: 1000, seed: 5 },
    );
  });

  it('1,500 2x2 tables: all four cells have the p of score by distance, and adjusting changes nothing', async () => {
    await fc.assert(
      fc.asyncProperty(twoByTwoTable, async (table) => {
        const { p, adjusted, whole } = oracleCells(table);
        const result = await analyse({ counts: table }, { statistic: 'score', method: 'exact' });
        for (const [k, cell] of result.cells!.entries()) {
          expect(relativeDifference(cell.p!, toNumber(p[k]!, whole))).toBeLessThan(bound);
          expect(relativeDifference(cell.adjustedP!, toNumber(adjusted[k]!, whole))).toBeLessThan(bound);
          expect(relativeDifference(cell.p!, result.pValues[0]!.p!)).toBeLessThan(bound);
          expect(cell.adjustedP).toBe(result.cells![0]!.adjustedP);
        }
      }),
      { numRuns: 1000, seed: 6 },
    );
  });
});

describe('laws', () => {
  const larger = tableOf({ rows: [2, 4], columns: [2, 4], largest: 6 });

  it.each([
    ['pearson', {}],
    ['likelihood-ratio', {}],
    ['freeman-tukey', {}],
    ['power-divergence', {}],
    ['power-divergence', { lambda: '5/2' }],
  ] as const)('contributions add up to %s %o, and none is negative', async (statistic, settings) => {
    await fc.assert(
      fc.asyncProperty(larger, async (counts) => {
        const result = await analyse({ counts }, { statistic, ...settings, method: 'asymptotic' });
        const sum = result.cells!.reduce((all, { contribution }) => all + contribution, 0);
        expect(result.plan.cells!.contributionsTo).toBe(statistic);
        expect(Math.abs(sum - (result.statistic.value as number))).toBeLessThan(1e-10 * (1 + sum));
        expect(Math.min(...result.cells!.map(({ contribution }) => contribution))).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 40, seed: 7 },
    );
  });

  it('contributions of a statistic that is no sum over cells are those to pearson, and the plan says so', async () => {
    const counts = [
      [4, 1],
      [2, 7],
    ];
    const [trend, pearson] = await Promise.all([
      analyse({ counts }, { statistic: 'trend' }),
      analyse({ counts }, { statistic: 'pearson' }),
    ]);
    expect(trend.plan.cells!.contributionsTo).toBe('pearson');
    expect(trend.cells!.reduce((sum, cell) => sum + cell.contribution, 0)).toBeCloseTo(
      pearson.statistic.value as number,
      12,
    );
  });

  it('adjusted p is at least p, and rises with it', async () => {
    await fc.assert(
      fc.asyncProperty(larger, fc.constantFrom('exact', 'sample'), async (counts, method) => {
        const options: PlanOptions =
          method === 'sample' ? { method, draws: 2000, seed: 'law' } : { method: 'asymptotic' };
        const { cells } = await analyse({ counts }, { ...options, cells: true });
        const inOrder = [...cells!].sort((a, b) => a.p! - b.p! || a.adjustedP! - b.adjustedP!);
        inOrder.forEach((cell, k) => {
          expect(cell.adjustedP).toBeGreaterThanOrEqual(cell.p!);
          if (k > 0) expect(cell.adjustedP).toBeGreaterThanOrEqual(inOrder[k - 1]!.adjustedP!);
        });
      }),
      { numRuns: 30, seed: 8 },
    );
  });

  it('rows and columns swapped, lines reordered or an empty line added: every cell keeps its answers', async () => {
    await fc.assert(
      fc.asyncProperty(tableOf({ rows: [2, 3], columns: [2, 3], largest: 7 }), async (counts) => {
        const [plain, swapped, reordered, padded] = await Promise.all([
          cellsOf(counts),
          cellsOf(transpose(counts)),
          cellsOf([...counts].reverse()),
          cellsOf([...counts, counts[0]!.map(() => 0)]),
        ]);
        const [rows, columns] = [counts.length, counts[0]!.length];
        plain.forEach((cell, k) => {
          const [i, j] = [Math.floor(k / columns), k % columns];
          for (const other of [swapped[j * rows + i]!, reordered[(rows - 1 - i) * columns + j]!, padded[k]!]) {
            expect(relativeDifference(other.adjustedResidual!, cell.adjustedResidual!)).toBeLessThan(1e-13);
            expect(other.p).toBe(cell.p);
            expect(relativeDifference(other.adjustedP!, cell.adjustedP!)).toBeLessThan(1e-12);
          }
        });
        expect(padded.at(-1)).toMatchObject({ count: 0, expected: 0, p: null, reason: 'empty-line', adjustedP: null });
      }),
      { numRuns: 60, seed: 9 },
    );
  });
});

describe('sampled', () => {
  const counts = [
    [10, 2, 3, 4],
    [4, 9, 1, 3],
    [2, 3, 8, 5],
  ];

  it('100 seeds: the 99% intervals hold the exact adjusted p about that often, and (b + 1) / (m + 1) is reported', async () => {
    const exact = await cellsOf(counts);
    let missed = 0;
    for (let seed = 0; seed < 100; seed++) {
      const found = await followDraws(counts, 1000, `s${seed}`);
      found.forEach(({ p, interval, atLeast, draws }, cell) => {
        expect(p).toBe(Math.max((atLeast + 1) / (draws + 1), exact[cell]!.p!));
        const truth = exact[cell]!.adjustedP!;
        if (truth < interval[0] || truth > interval[1]) missed++;
      });
    }
    // 1,200 intervals at 99%, cells of one seed depending on each other: 12 expected, 30 already unlikely.
    expect(missed).toBeLessThan(30);
  });

  it('reads the draws of the run: the p of the run is the same with and without cells', async () => {
    const wide = [
      [68, 119, 26, 7],
      [20, 84, 17, 94],
      [15, 54, 14, 10],
      [5, 29, 14, 16],
    ];
    for (const draws of [3000, 'auto'] as const) {
      const options: PlanOptions = { method: 'sample', draws, seed: 'same', relativeError: 0.1 };
      const given = draws === 'auto' ? options : { method: 'sample' as const, draws, seed: 'same' };
      const [without, beside] = await Promise.all([
        analyse({ counts: wide }, { ...given, cells: false }),
        analyse({ counts: wide }, given),
      ]);
      expect(without.cells).toBeUndefined();
      expect(checked(beside).pValues).toEqual(without.pValues);
      expect(beside.plan.cells!.adjustment).toBe('sample');
      const error = beside.cells![0]!.errors[0]!;
      expect(error.kind).toBe(draws === 'auto' ? 'sequential' : 'sampling');
      expect('draws' in error && error.draws).toBe(
        draws === 'auto' ? (beside.pValues[0]!.errors[0] as { draws: number }).draws : draws,
      );
    }
  });
});
