import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { planDraws, samplers, type Forced } from '../../../src/null/sampled/draw-plan.js';
import { prepareSampler } from '../../../src/null/sampled/sample-cuts.js';
import { blockStream } from '../../../src/random/stream.js';
import type { LiveTable } from '../../../src/table/live-table.js';
import { liveFrom } from '../../helpers/tables.js';

const anyForced: fc.Arbitrary<Forced> = fc.record(
  { prefer: fc.constantFrom(...samplers), reach: fc.constantFrom(0, 0.5, 2) },
  { requiredKeys: [] },
);

/** Tables whose cells spread over many powers of ten, up to a total near `largest`. */
const tableUpTo = (largest: number): fc.Arbitrary<number[][]> =>
  fc.tuple(fc.integer({ min: 2, max: 5 }), fc.integer({ min: 2, max: 5 })).chain(([rows, columns]) =>
    fc.array(
      fc.array(
        fc
          .double({ min: 0, max: 1, noNaN: true })
          .map((size) => Math.floor((largest / 25) ** size) - (size < 0.2 ? 1 : 0)),
        { minLength: columns, maxLength: columns },
      ),
      { minLength: rows, maxLength: rows },
    ),
  );

const withCounts = (counts: number[][]): boolean => counts.some((row) => row.some((count) => count > 0));

function expectMarginsHeld(live: LiveTable, forced: Forced, seed: string, draws: number): void {
  const sampler = prepareSampler(live, [], forced);
  const stream = blockStream(seed, '', 0);
  const table = new Float64Array(live.counts.length);
  for (let draw = 0; draw < draws; draw++) {
    sampler.drawTable(stream, table);
    const rows = new Float64Array(live.rows);
    const columns = new Float64Array(live.columns);
    table.forEach((count, cell) => {
      if (!(Number.isInteger(count) && count >= 0)) expect.fail(`${count} is not a count, in ${table.join()}`);
      rows[Math.floor(cell / live.columns)]! += count;
      columns[cell % live.columns]! += count;
    });
    expect([rows, columns], table.join()).toEqual([live.rowTotals, live.columnTotals]);
  }
}

/** Unit by unit and outcome by outcome are only for counts that can be counted that way. */
const bearable = (largest: number, { prefer }: Forced): boolean =>
  largest < 1e4 || (prefer !== 'labels' && prefer !== 'inversion');

describe('every drawn table has the margins of its table', () => {
  it.each([
    ['a few units', 30, 200],
    ['hundreds', 600, 200],
    ['up to 2^16', 2 ** 16, 100],
    ['past 2^16', 2 ** 18, 100],
    ['near 2^31', 2 ** 31, 60],
    ['near 2^40', 2 ** 40, 60],
    ['near 2^53', 2 ** 53 - 1, 60],
  ])('%s', (_, largest, numRuns) => {
    fc.assert(
      fc.property(tableUpTo(largest).filter(withCounts), anyForced, fc.string(), (counts, forced, seed) => {
        fc.pre(bearable(largest, forced));
        expectMarginsHeld(liveFrom(counts), forced, seed, 30);
      }),
      { numRuns, seed: 3 },
    );
  });

  it('in lopsided tables of a total of almost 2^53, with and without rare rows', () => {
    expectMarginsHeld(
      liveFrom([
        [3, 0, 2 ** 52],
        [1, 2, 2 ** 51],
      ]),
      {},
      'lopsided',
      2000,
    );
    expectMarginsHeld(
      liveFrom([
        [2 ** 51, 2 ** 51],
        [2 ** 51, 2 ** 51 - 1],
      ]),
      {},
      'even',
      2000,
    );
    expectMarginsHeld(
      liveFrom([
        [1, 1, 1],
        [1, 2 ** 53 - 20, 1],
        [1, 1, 1],
      ]),
      {},
      'one cell',
      2000,
    );
  });

  it('when the margins allow one table only, or nearly so', () => {
    expectMarginsHeld(liveFrom([[3, 4, 5]]), {}, 'one row', 10);
    expectMarginsHeld(liveFrom([[3], [4]]), {}, 'one column', 10);
    expectMarginsHeld(
      liveFrom([
        [1, 0],
        [0, 1],
      ]),
      {},
      'two tables',
      100,
    );
  });
});

describe('a plan of draws', () => {
  it('uses every sampler somewhere without being forced', () => {
    const used = (counts: number[][]): string[] => {
      const { labelRows, cells } = planDraws(liveFrom(counts));
      return [...(labelRows > 0 ? ['labels'] : []), ...cells.flat().map(({ sampler }) => sampler)];
    };
    expect(
      used([
        [3, 1, 2, 0, 2],
        [1, 4, 0, 2, 1],
        [0, 1, 3, 1, 2],
      ]),
    ).toEqual(['labels']);
    expect(
      used([
        [68, 20, 15, 5],
        [119, 84, 54, 29],
        [26, 17, 14, 14],
        [7, 94, 10, 16],
      ]),
    ).toEqual([...['guide', 'guide', 'guide'], ...['guide', 'trial', 'trial'], ...['guide', 'trial', 'trial']]);
    expect(
      used([
        [9200, 4300, 2500],
        [6100, 5200, 2700],
        [7000, 4900, 3100],
      ]),
    ).toContain('rejection');
    expect(
      used([
        [1, 40, 2],
        [3, 45, 1],
        [100, 70_000, 200],
      ]),
    ).toContain('inversion');
  });

  it('is drawn the way round that promises less work, and gives the same law', () => {
    const tall = planDraws(
      liveFrom([
        [1, 2],
        [20, 30],
        [25, 28],
        [30, 40],
        [50, 55],
      ]),
    );
    const flat = planDraws(
      liveFrom([
        [1, 20, 25, 30, 50],
        [2, 30, 28, 40, 55],
      ]),
    );
    expect(tall.work).toBe(flat.work);
  });

  it('needs no time of its own even for large shapes', () => {
    const counts = Array.from({ length: 150 }, (_, i) => Array.from({ length: 120 }, (__, j) => (i * 7 + j * 11) % 4));
    const { cells, labelRows } = planDraws(liveFrom(counts));
    expect(labelRows + cells.length).toBe(119);
  });
});
