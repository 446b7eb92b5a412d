import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { render } from '../../src/report/formats.js';
import { histogramLines, histogramWords } from '../../src/report/histogram.js';
import type { NullSummary } from '../../src/result/result.js';
import { displayWidth } from '../../src/report/display-width.js';

const summary: NullSummary = {
  statistic: 'pearson',
  observed: 3,
  tail: 'upper',
  orderedBy: 'upper',
  method: 'exact',
  tables: 12,
  bins: [
    { from: 0, to: 1, mass: 0.5, inTail: 0 },
    { from: 1, to: 2, mass: 0.25, inTail: 0 },
    { from: 2, to: 3, mass: 0.15, inTail: 0 },
    { from: 3, to: 'infinity', mass: 0.1, inTail: 0.1 },
  ],
};

describe('the histogram in characters', () => {
  it('fills the tail otherwise, marks it on the axis and points to the observed value', () => {
    expect(histogramLines(summary, 40, 'ascii')).toEqual([
      '0.50 |####',
      '     |####',
      '     |####',
      '     |####',
      '     |########',
      '     |########::::',
      '     |############xxxx',
      '     |############xxxx',
      '   0 +------------====',
      '                    ^ observed 3.000',
    ]);
    expect(histogramLines(summary, 40, 'blocks').slice(5)).toEqual([
      '     |████████▄▄▄▄',
      '     |████████████▒▒▒▒',
      '     |████████████▓▓▓▓',
      '   0 +------------====',
      '                    ▲ observed 3.000',
    ]);
    expect(histogramWords(summary)).toContain('hold 0.10 of the probability');
  });

  it('says when the observed value lies beyond the bars', () => {
    const far = {
      ...summary,
      observed: 99,
      bins: summary.bins.map((bin) => ({ ...bin, to: bin.to === 'infinity' ? 4 : bin.to })),
    };
    expect(histogramLines(far, 60, 'ascii').at(-1)).toContain('observed 99.00, further out');
  });

  it('keeps to the width', async () => {
    const counts = [
      [13, 2, 6],
      [1, 9, 4],
      [5, 2, 12],
    ];
    const { nullSummary } = await analyse({ counts }, { nullSummary: true });
    for (const width of [38, 60, 78]) {
      for (const line of histogramLines(nullSummary!, width, 'blocks'))
        expect(displayWidth(line)).toBeLessThanOrEqual(width);
    }
  });

  it('joins bars where there is no room for each, and leaves none out', () => {
    const bins = Array.from({ length: 60 }, (_, k) => ({
      from: k,
      to: k + 1,
      mass: 1 / 60,
      inTail: k < 40 ? 0 : 1 / 60,
    }));
    const lines = histogramLines({ ...summary, observed: 40.5, bins }, 38, 'ascii');
    expect(lines.slice(-3)).toEqual([
      '      |#############xxxxxxx',
      '    0 +-------------=======',
      '                    ^ observed 40.50',
    ]);
  });

  it('is drawn in text and markdown when wanted only', async () => {
    const result = await analyse(
      {
        counts: [
          [8, 2],
          [1, 9],
        ],
      },
      { nullSummary: true },
    );
    for (const format of ['text', 'markdown'] as const) {
      expect(render(result, format)).not.toContain('observed 9.899\n');
      expect(render(result, format, { histogram: 'ascii' })).toMatch(/\^ observed 9.899\n|observed 9.899 \^\n/);
    }
  });
});
