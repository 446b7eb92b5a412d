// Pictures by their structure: what is marked, how often, in which words.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import type { PlanOptions } from '../../../src/plan/plan.js';
import { drawPicture, lackOf } from '../../../src/report/pictures/pictures.js';
import { smallTable } from '../../helpers/tables.js';
import { expectSoundSvg, marksOf, wordsOf } from './picture-parts.js';

const orchids = {
  counts: [
    [13, 2, 6],
    [1, 9, 4],
    [5, 2, 12],
  ],
  rowLabels: ['meadow', 'slope', 'wood'],
  columnLabels: ['lilac', 'white', 'yellow'],
};
const withSummary = (options: PlanOptions = {}): PlanOptions => ({ ...options, nullSummary: true });

describe('the null distribution', () => {
  it('has a bar for each bin that holds something, the tail hatched, and the observed value marked', async () => {
    const result = await analyse(orchids, withSummary({ tail: 'upper' }));
    const svg = drawPicture(result, 'null');
    expectSoundSvg(svg);
    const { bins } = result.nullSummary!;
    expect(marksOf(svg, 'keepsum-tail')).toBe(bins.filter(({ inTail }) => inTail > 0).length);
    expect(marksOf(svg, 'keepsum-bulk')).toBe(bins.filter(({ mass, inTail }) => mass > inTail).length);
    expect(marksOf(svg, 'keepsum-curve')).toBe(1);
    expect(marksOf(svg, 'keepsum-observed')).toBe(1);
    expect(wordsOf(svg)).toContain('observed 24.13');
    expect(svg).toContain(`fill="url(#keepsum-null-hatching)"`);
  });

  it('hatches both ends of a two-sided test', async () => {
    const svg = drawPicture(
      await analyse(
        {
          counts: [
            [8, 2],
            [1, 9],
          ],
        },
        withSummary({ statistic: 'score' }),
      ),
      'null',
    );
    expectSoundSvg(svg);
    expect(marksOf(svg, 'keepsum-tail')).toBe(2);
  });

  it('points to an observed value that is far away', async () => {
    const counts = [
      [30, 20, 60],
      [10, 90, 40],
    ];
    const svg = drawPicture(
      await analyse({ counts }, withSummary({ method: 'sample', draws: 1000, seed: 'a' })),
      'null',
    );
    expectSoundSvg(svg);
    expect(wordsOf(svg).join(' ')).toContain('far to the right');
  });

  it('is refused where there is no summary, with a way out', async () => {
    const result = await analyse(orchids);
    expect(lackOf(result, 'null')!.hint).toContain('mosaic');
    expect(lackOf(result, 'mosaic')).toBeUndefined();
    expect(() => drawPicture(result, 'null')).toThrow(/no picture "null"/);
  });
});

describe('the mosaic', () => {
  it('of many rows stays legible, and of too many is none', async () => {
    const tableOf = (rows: number) => ({
      counts: Array.from({ length: rows }, (_, i) => [1 + (i % 3), i === 0 ? 900 : 1]),
    });
    const cheap = { method: 'sample' as const, draws: 100, seed: 'a' };
    const svg = drawPicture(await analyse(tableOf(60), cheap), 'mosaic');
    expectSoundSvg(svg);
    const heights = [...svg.matchAll(/<text x="[\d.]+" y="([\d.]+)"[^>]*text-anchor="end"/g)].map(([, y]) => Number(y));
    expect(heights).toHaveLength(60);
    heights.forEach((y, k) => {
      if (k > 0) expect(y - heights[k - 1]!).toBeGreaterThanOrEqual(11.9);
    });
    expect(lackOf(await analyse(tableOf(61), cheap), 'mosaic')).toBeDefined();
  });

  it('has a tile for each cell, marked by sign and hatching as its adjusted residual says', async () => {
    const result = await analyse(orchids);
    const svg = drawPicture(result, 'mosaic');
    expectSoundSvg(svg);
    expect(marksOf(svg, 'keepsum-tile')).toBe(9);
    const far = result.cells!.filter(({ adjustedResidual }) => Math.abs(adjustedResidual!) >= 2);
    const hatched = svg.match(/keepsum-tile"[^>]*fill="url\(#keepsum-mosaic-(more|fewer)-[12]\)"/g)!;
    expect(hatched).toHaveLength(far.length);
    expect(wordsOf(svg)).toEqual(
      expect.arrayContaining(['meadow', 'slope', 'wood', 'lilac', 'white', 'yellow', '9 ++']),
    );
  });

  it('gives areas in proportion to counts', async () => {
    const svg = drawPicture(await analyse(orchids), 'mosaic');
    const areas = [...svg.matchAll(/keepsum-tile" x="[^"]*" y="[^"]*" width="([^"]*)" height="([^"]*)"/g)].map(
      ([, width, height]) => Number(width) * Number(height),
    );
    const perCount = orchids.counts.flat().map((count, k) => areas[k]! / count);
    for (const area of perCount) expect(area / perCount[0]!).toBeCloseTo(1, 1);
  });

  it('shows empty cells as rings and says when no residuals are there', async () => {
    const svg = drawPicture(
      await analyse(
        {
          counts: [
            [5, 0],
            [3, 4],
          ],
        },
        { cells: false },
      ),
      'mosaic',
    );
    expectSoundSvg(svg);
    // One in the key, one in the table.
    expect(marksOf(svg, 'keepsum-none')).toBe(2);
    expect(wordsOf(svg).join(' ')).toContain('residuals of cells were not worked out');
  });
});

describe('any table', () => {
  it('is drawn soundly, its labels as text only', async () => {
    const hostile = fc.constantFrom(
      '<script>alert(1)</script>',
      '"&\'',
      '\u001b[31m',
      '',
      'a'.repeat(300),
      '測定値の高い群',
    );
    await fc.assert(
      fc.asyncProperty(smallTable, hostile, async (counts, words) => {
        const rowLabels = counts.map((_, i) => `${words}${i === 0 ? '' : i}`);
        const columnLabels = counts[0]!.map((_, j) => `${words}${j === 0 ? '' : j}`);
        const result = await analyse({ counts, rowLabels, columnLabels }, withSummary());
        for (const name of ['null', 'mosaic'] as const) {
          const svg = drawPicture(result, name);
          expectSoundSvg(svg);
          expect(svg).not.toContain('<script');
          expect(svg).not.toContain('\u001b');
        }
      }),
      { numRuns: 30 },
    );
  });
});
