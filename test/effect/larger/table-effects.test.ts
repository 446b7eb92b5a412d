// Measures of larger tables: the delta method against derivatives taken by differences, and the bootstrap digit by digit.
import { describe, expect, it } from 'vitest';
import { jStat } from 'jstat';
import { predictionEffects } from '../../../src/effect/larger/prediction.js';
import { tableEffects } from '../../../src/effect/larger/table-effects.js';
import { randomBinomial } from '../../../src/effect/larger/random-binomial.js';
import { upperNormalQuantile } from '../../../src/numeric/normal-quantile.js';
import { blockStream } from '../../../src/random/stream.js';
import type { LiveTable } from '../../../src/table/live-table.js';
import { liveFrom } from '../../helpers/tables.js';

const counts = [[13, 5, 3], [4, 19, 8]]; // prettier-ignore
const settings = { confidence: 0.95 };

/** A table whose counts need not be whole. */
function withCounts(live: LiveTable, cells: number[]): LiveTable {
  const { rows, columns } = live;
  const line = (of: (k: number) => boolean): number => cells.reduce((sum, n, k) => (of(k) ? sum + n : sum), 0);
  return {
    ...live,
    counts: Float64Array.from(cells),
    rowTotals: Float64Array.from({ length: rows }, (_, i) => line((k) => Math.floor(k / columns) === i)),
    columnTotals: Float64Array.from({ length: columns }, (_, j) => line((k) => k % columns === j)),
    total: line(() => true),
  };
}

describe('measures of prediction', () => {
  const live = liveFrom(counts);
  it.each(predictionEffects(live, settings).map(({ name, predicts }, k) => [name, predicts, k] as const))(
    '%s, %s: the interval is that of the derivatives',
    (_, __, k) => {
      const { estimate, intervals } = predictionEffects(live, settings)[k]!;
      const cells = [...live.counts];
      const step = 1e-4;
      const slopes = cells.map((_cell, c) => {
        const at = (change: number): number =>
          predictionEffects(withCounts(live, cells.map((n, d) => (d === c ? n + change : n))), settings)[k]!
            .estimate as number; // prettier-ignore
        return (at(step) - at(-step)) / (2 * step);
      });
      // Measures depend on shares alone, so the slopes by counts have mean 0, and the variance is sum n f^2.
      const deviation = Math.sqrt(cells.reduce((sum, n, c) => sum + n * slopes[c]! ** 2, 0));
      const half = 1.959963984540054 * deviation;
      expect(intervals[0]!.lower).toBeCloseTo(Math.max(0, (estimate as number) - half), 6);
      expect(intervals[0]!.upper).toBeCloseTo(Math.min(1, (estimate as number) + half), 6);
    },
  );

  it('are 1 where one side tells the other, and have no interval there', () => {
    for (const { estimate, intervals } of predictionEffects(liveFrom([[5, 0], [0, 7]]), settings)) {
      expect(estimate).toBeCloseTo(1, 12);
      expect(intervals[0]).toMatchObject({ lower: null, reason: 'at-boundary' });
    }
  }); // prettier-ignore
});

describe('the bootstrap', () => {
  it('has the same limits for the same seed, and none without being asked', () => {
    const of = (seed: string): unknown =>
      tableEffects(liveFrom(counts), settings, { draws: 250, seed, tableKey: '' })[1]!.intervals[0];
    expect(of('a')).toEqual(of('a'));
    expect(of('a')).not.toEqual(of('b'));
    expect(of('a')).toMatchObject({ method: 'bootstrap', draws: 250, guaranteed: false });
    expect(tableEffects(liveFrom(counts), settings, null)[1]!.intervals).toEqual([]);
  });

  it('draws binomial numbers by their law', () => {
    const source = blockStream('binomial', '', 0);
    const [n, p, draws] = [12, 0.3, 40_000];
    const seen = new Array<number>(n + 1).fill(0);
    for (let k = 0; k < draws; k++) seen[randomBinomial(n, p, source)]!++;
    let law = (1 - p) ** n;
    let distance = 0;
    for (let k = 0; k <= n; k++) {
      distance += (seen[k]! - draws * law) ** 2 / (draws * law);
      law *= ((n - k) / (k + 1)) * (p / (1 - p));
    }
    expect(distance).toBeLessThan(50); // chi-square with 12 degrees of freedom: P = 1e-6 or so
  });
});

it('normal quantiles agree with those of another package', () => {
  for (const share of [0.5, 0.4, 0.1, 0.025, 0.005, 1e-6]) {
    expect(upperNormalQuantile(share)).toBeCloseTo(-jStat.normal.inv(share, 0, 1), 9);
  }
});
