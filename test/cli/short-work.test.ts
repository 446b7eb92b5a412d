import { describe, expect, it } from 'vitest';
import { isShort } from '../../src/cli/short-work.js';
import { forecastExact } from '../../src/null/forecast.js';
import { probability } from '../../src/statistic/probability.js';
import { liveTable } from '../../src/table/live-table.js';
import { makeTable } from '../../src/table/table.js';

const forecastOf = (counts: number[][]) => {
  const live = liveTable(makeTable({ counts }));
  return forecastExact(live, probability.bind(live, { groups: 'rows', event: 0, first: 0 }), 'probability');
};

describe('exact work for which code is optimized later', () => {
  it('is that of a middling table', () => {
    const counts = [
      [65, 17, 72, 154],
      [33, 10, 38, 86],
      [28, 11, 22, 64],
    ];
    expect(isShort(forecastOf(counts))).toBe(true);
  });

  it('is not that of a table so small that nothing is ever optimized, nor that of seconds', () => {
    const small = [
      [8, 2],
      [1, 9],
    ];
    const large = small.map((row) => [...row, ...row, ...row].map((count) => 40 * count));
    expect(isShort(forecastOf(small))).toBe(false);
    expect(isShort({ ...forecastOf(large), engine: 'network', workUnits: 1e9 })).toBe(false);
  });
});
