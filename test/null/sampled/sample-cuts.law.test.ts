import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Ordering } from '../../../src/null/contract.js';
import { blockSize } from '../../../src/null/sampled/limits.js';
import { blocksFor, drawsInBlock, prepareSampler, sampleCuts } from '../../../src/null/sampled/sample-cuts.js';
import { blockStream } from '../../../src/random/stream.js';
import type { LiveTable } from '../../../src/table/live-table.js';
import { liveFrom, orderingOf, smallTable, twoByTwoTable } from '../../helpers/tables.js';

const statistics = ['pearson', 'likelihood-ratio', 'probability'] as const;

/** Draws the same tables again and asks the ordering about each. */
function countOneByOne(live: LiveTable, ordering: Ordering, seed: string, draws: number): number[] {
  const sampler = prepareSampler(live, []);
  const stream = blockStream(seed, '', 0);
  const table = new Float64Array(live.counts.length);
  const counts = [0, 0, 0];
  for (let draw = 0; draw < draws; draw++) {
    sampler.drawTable(stream, table);
    counts[ordering.place(table) + 1]!++;
  }
  return counts;
}

const expectSameCounts = (live: LiveTable, orderings: readonly Ordering[], seed: string, draws: number): void => {
  const tallies = prepareSampler(live, orderings).countBlock(blockStream(seed, '', 0), draws);
  expect(tallies).toEqual(orderings.map((ordering) => countOneByOne(live, ordering, seed, draws)));
};

describe('a block of draws', () => {
  it('puts every table where its ordering puts it, near ties included: sums over cells', () => {
    fc.assert(
      fc.property(smallTable, fc.constantFrom(...statistics), fc.string(), (counts, statistic, seed) => {
        const live = liveFrom(counts);
        fc.pre(live.rows > 1 && live.columns > 1);
        expectSameCounts(live, [orderingOf(live, statistic, 'upper'), orderingOf(live, statistic, 'lower')], seed, 200);
      }),
      { numRuns: 150, seed: 5 },
    );
  });

  it('puts every table where its ordering puts it: 2x2 statistics in every ordering', () => {
    fc.assert(
      fc.property(twoByTwoTable, fc.constantFrom('wald', 'score'), fc.string(), (counts, statistic, seed) => {
        const live = liveFrom(counts);
        const names = ['upper', 'lower', 'distance', 'probability'] as const;
        expectSameCounts(
          live,
          names.map((name) => orderingOf(live, statistic, name)),
          seed,
          200,
        );
      }),
      { numRuns: 100, seed: 6 },
    );
  });

  it('puts every table where its ordering puts it: sums folded about a centre, and largest values over cells', () => {
    fc.assert(
      fc.property(smallTable, fc.string(), (counts, seed) => {
        const live = liveFrom(counts);
        fc.pre(live.rows > 1 && live.columns > 1 && live.rows * live.columns > 4);
        const trend = (['upper', 'lower', 'distance', 'probability'] as const).map((name) =>
          orderingOf(live, 'trend', name),
        );
        expect(trend[2]!.fold).toBeDefined();
        expectSameCounts(live, trend, seed, 100);
        const largest = (['upper', 'lower'] as const).map((name) => orderingOf(live, 'max-residual', name));
        expect(largest[0]!.limits).toBeDefined();
        expectSameCounts(live, largest, seed, 100);
      }),
      { numRuns: 100, seed: 7 },
    );
  });

  it('does so where values have to be worked out beyond the look-up table, for wide totals', () => {
    for (const counts of [
      [
        [9200, 4300, 2500],
        [6100, 5200, 2700],
        [7000, 4900, 3100],
      ],
      [
        [12, 7e8, 3e8],
        [9, 6e8, 5e8],
      ],
      [
        [4e14, 3e14, 5e14],
        [3e14, 2e14, 4e14],
      ],
    ]) {
      const live = liveFrom(counts);
      for (const statistic of statistics) expectSameCounts(live, [orderingOf(live, statistic, 'upper')], 'wide', 500);
    }
  });

  it('asks for an exact decision once for a table that keeps coming up, and never for the observed one', () => {
    const live = liveFrom([
      [3, 1],
      [1, 3],
      [2, 2],
    ]);
    const bound = orderingOf(live, 'likelihood-ratio', 'upper').sum!;
    const asked = new Map<string, number>();
    const cells = {
      ...bound.cells,
      // So wide that every table is a near tie.
      slack: 100,
      decide: (table: ArrayLike<number>) => {
        const key = Array.from(table).join();
        asked.set(key, (asked.get(key) ?? 0) + 1);
        return bound.cells.decide(table);
      },
    };
    const ordering: Ordering = { name: 'upper', sum: { cells, direction: 1 }, place: (table) => cells.decide(table) };
    const [tally] = prepareSampler(live, [ordering]).countBlock(blockStream('near ties', '', 0), 5000);
    expect(tally).toEqual(countOneByOne(live, orderingOf(live, 'likelihood-ratio', 'upper'), 'near ties', 5000));
    expect(asked.size).toBeGreaterThan(5);
    expect(Math.max(...asked.values())).toBe(1);
    expect(asked.has(live.counts.join())).toBe(false);
  });

  it('takes an exact sum at its word', () => {
    const live = liveFrom([
      [3, 1, 4],
      [1, 3, 2],
      [2, 2, 5],
    ]);
    const { sum } = orderingOf(live, 'pearson', 'upper');
    expect(sum!.cells.slack).toBe(0);
    const never = (): never => {
      throw new Error('asked for a decision');
    };
    const ordering: Ordering = {
      name: 'upper',
      sum: { cells: { ...sum!.cells, decide: never }, direction: 1 },
      place: never,
    };
    const [below, tied, above] = prepareSampler(live, [ordering]).countBlock(blockStream('exact', '', 0), 2000)[0]!;
    expect(below + tied + above).toBe(2000);
    expect(tied).toBeGreaterThan(0);
  });
});

describe('cuts from draws', () => {
  const live = liveFrom([
    [8, 2, 5],
    [1, 9, 4],
    [3, 3, 7],
  ]);
  const orderings = [orderingOf(live, 'pearson', 'upper'), orderingOf(live, 'pearson', 'lower')];
  const sampling = { seed: 'cuts', tableKey: '', draws: 10_300 };

  it('are the same however the blocks are shared out and in whatever order they are drawn', () => {
    const whole = sampleCuts(live, orderings, sampling);
    const parts = [
      [7, 11],
      [0, 3],
      [3, 4],
      [4, 7],
    ].map(([first, end]) => sampleCuts(live, orderings, sampling, first, end));
    for (const [o, cut] of whole.entries()) {
      for (const side of ['below', 'tied', 'above', 'draws'] as const) {
        expect(parts.reduce((sum, part) => sum + part[o]![side], 0)).toBe(cut[side]);
      }
    }
    expect(whole[0]!.draws).toBe(10_300);
  });

  it('depend on nothing that a sampler has drawn before', () => {
    const sampler = prepareSampler(live, orderings);
    const first = sampler.countBlock(blockStream('once', '', 4), blockSize);
    sampler.countBlock(blockStream('between', '', 5), 3 * blockSize);
    expect(sampler.countBlock(blockStream('once', '', 4), blockSize)).toEqual(first);
    expect(prepareSampler(live, orderings).countBlock(blockStream('once', '', 4), blockSize)).toEqual(first);
  });

  it('mirror each other for the two tails of one sum', () => {
    const [upper, lower] = sampleCuts(live, orderings, sampling);
    expect([lower!.below, lower!.tied, lower!.above]).toEqual([upper!.above, upper!.tied, upper!.below]);
  });

  it('change with the seed, with the key of the table and with the block', () => {
    const counts = [sampling, { ...sampling, seed: 'Cuts' }, { ...sampling, tableKey: '1' }].map(
      (one) => sampleCuts(live, orderings, one)[0]!.above,
    );
    expect(new Set(counts).size).toBe(3);
    const blocks = [0, 1, 2, 3, 4].map((block) => sampleCuts(live, orderings, sampling, block, block + 1)[0]!.above);
    expect(new Set(blocks).size).toBeGreaterThan(2);
  });

  it('come in blocks of the promised size, the last one cut short', () => {
    expect(blockSize).toBe(1000);
    expect([1, 1000, 1001, 10_300].map(blocksFor)).toEqual([1, 1, 2, 11]);
    expect([0, 9, 10, 11].map((block) => drawsInBlock(10_300, block))).toEqual([1000, 1000, 300, 0]);
  });
});

describe('look-up tables', () => {
  it('stay below 4 MB together, whatever the shape and the total', () => {
    for (const counts of [
      [
        [68, 20, 15, 5],
        [119, 84, 54, 29],
        [26, 17, 14, 14],
        [7, 94, 10, 16],
      ],
      [
        [9200, 4300, 2500],
        [6100, 5200, 2700],
        [7000, 4900, 3100],
      ],
      [
        [12, 7e8, 3e8, 1e5, 6e7],
        [9, 6e8, 5e8, 2e5, 9e7],
      ],
      Array.from({ length: 40 }, (_, i) => Array.from({ length: 40 }, (__, j) => (i * j) % 23)),
      [
        [2 ** 51, 2 ** 51],
        [2 ** 51, 2 ** 51 - 1],
      ],
    ]) {
      const live = liveFrom(counts);
      const orderings = [orderingOf(live, 'probability', 'upper'), orderingOf(live, 'pearson', 'lower')];
      const before = process.memoryUsage().arrayBuffers;
      const sampler = prepareSampler(live, orderings);
      sampler.countBlock(blockStream('memory', '', 0), 200);
      expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(4 * 2 ** 20);
    }
  });
});
