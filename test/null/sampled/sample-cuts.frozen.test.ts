// The counts behind a seed are a public promise, one table for each sampler: a change here is a major release.
import { describe, expect, it } from 'vitest';
import { prepareSampler, sampleCuts } from '../../../src/null/sampled/sample-cuts.js';
import { blockStream } from '../../../src/random/stream.js';
import { liveFrom, orderingOf } from '../../helpers/tables.js';

const sampling = { seed: '2026-03', tableKey: 'lots', draws: 20_500 };
const even = [
  [28, 20, 15, 15],
  [59, 44, 54, 49],
  [16, 17, 14, 14],
  [34, 64, 40, 36],
];

/** Draws below, tied with and above the observed table. */
function counted(counts: number[][], statistic = 'pearson'): number[] {
  const live = liveFrom(counts);
  const [cut] = sampleCuts(live, [orderingOf(live, statistic, 'upper')], sampling);
  return [cut!.below, cut!.tied, cut!.above];
}

describe('what a seed gives', () => {
  it.each([
    [
      'labels',
      [
        [3, 1, 2, 0, 2],
        [1, 4, 0, 2, 1],
        [0, 1, 3, 1, 2],
        [2, 0, 1, 1, 2],
      ],
      'pearson',
      [14134, 9, 6357],
    ],
    [
      'labels, turned',
      [
        [1, 0],
        [2, 1],
        [2, 7],
        [1, 6],
      ],
      'probability',
      [18127, 399, 1974],
    ],
    [
      'a guide',
      [
        [7, 13],
        [15, 9],
      ],
      'likelihood-ratio',
      [17746, 2077, 677],
    ],
    [
      'guides for a rare row',
      [
        [9, 3, 6, 2, 4],
        [11_000, 5200, 7300, 1900, 2576],
      ],
      'pearson',
      [5294, 28, 15178],
    ],
    ['guides and trials', even, 'pearson', [19247, 0, 1253]],
    [
      'rejection',
      [
        [9200, 4300, 2500],
        [6100, 2900, 1700],
        [7000, 3230, 1950],
      ],
      'likelihood-ratio',
      [4429, 0, 16071],
    ],
    [
      'a wide total',
      [
        [120_000, 98_000],
        [120_500, 97_500],
        [48, 20],
      ],
      'probability',
      [20283, 0, 217],
    ],
    [
      'a total of 2^43',
      [
        [2 ** 40, 2 ** 40 + 2 ** 19],
        [2 ** 41, 2 ** 41 - 2 ** 19],
      ],
      'pearson',
      [6859, 0, 13641],
    ],
  ])('is what every release has given: counts, %s', (_, counts, statistic, wanted) => {
    expect(counted(counts, statistic)).toEqual(wanted);
  });

  it('is what every release has given: the first tables of a block', () => {
    const sampler = prepareSampler(liveFrom(even), []);
    const stream = blockStream('2026-03', 'lots', 0);
    const tables = Array.from({ length: 3 }, () => {
      const table = new Array<number>(16).fill(0);
      sampler.drawTable(stream, table);
      return table.join();
    });
    expect(tables).toEqual([
      '24,19,17,18,56,60,43,47,16,12,15,18,41,54,48,31',
      '26,23,15,14,48,52,57,49,14,18,16,13,49,52,35,38',
      '30,17,17,14,42,59,58,47,12,17,15,17,53,52,33,36',
    ]);
  });
});
