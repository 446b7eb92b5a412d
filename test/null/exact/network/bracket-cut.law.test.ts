// Brackets hold the true p, whatever the grid: against plain enumeration over thousands of small tables, and against the
// network without a grid on larger ones. The observed value, ties with it and both tails are where a slip would show.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactByEnumeration } from '../../../../src/null/exact/enumerate.js';
import { Meter } from '../../../../src/null/exact/meter.js';
import { bracketCut, onGrid } from '../../../../src/null/exact/network/bracket-cut.js';
import { encode } from '../../../../src/null/exact/network/encoding.js';
import { exactCut } from '../../../../src/null/exact/network/exact-cut.js';
import { orient } from '../../../../src/null/exact/network/oriented-table.js';
import { OutOfReach } from '../../../../src/null/exact/out-of-reach.js';
import type { BracketCut, ExactCut, Ordering } from '../../../../src/null/contract.js';
import { drawTables } from '../../../../src/draw-tables.js';
import { makeTable } from '../../../../src/table/table.js';
import { liveFrom, orderingOf, smallTable, tableOf } from '../../../helpers/tables.js';
import type { LiveTable } from '../../../../src/table/live-table.js';

const statistics = ['pearson', 'likelihood-ratio', 'probability', 'power-divergence', 'freeman-tukey'];
const tables = fc.oneof(
  smallTable,
  tableOf({ rows: [2, 2], columns: [5, 7], largest: 3 }),
  tableOf({ rows: [3, 3], columns: [4, 5], largest: 2 }),
);
/** What enumeration itself may be off by. */
const rounding = 2e-13;

function expectHolds(what: string, bracket: BracketCut, truth: ExactCut): void {
  for (const part of ['atLeast', 'above'] as const) {
    const { lower, upper } = bracket[part];
    expect(lower.value, `${part} of ${what}, lower`).toBeLessThanOrEqual(truth[part].value * (1 + rounding));
    expect(upper.value, `${part} of ${what}, upper`).toBeGreaterThanOrEqual(truth[part].value * (1 - rounding));
  }
}

const widthOf = ({ atLeast: { lower, upper } }: BracketCut): number => upper.value - lower.value;

/** A grid with so many steps up to the observed value. */
function stepFor(live: LiveTable, ordering: Ordering, statistic: string, steps: number): number {
  const { observedValue } = encode(orient(live), ordering.sum!.cells, statistic);
  return 2 ** Math.max(0, Math.round(Math.log2(Math.max(1, Math.abs(observedValue)) / steps)));
}

describe('a bracket holds the mass it is of', () => {
  for (const statistic of statistics) {
    it(`${statistic}: on coarse and fine grids, in both tails`, () => {
      const widths = [0, 0];
      fc.assert(
        fc.property(tables, fc.constantFrom('upper', 'lower'), (counts, tail) => {
          const live = liveFrom(counts);
          const ordering = orderingOf(live, statistic, tail);
          const truth = exactByEnumeration(live, [ordering]).cuts[0]!;
          [8, 512].forEach((steps, k) => {
            const step = stepFor(live, ordering, statistic, steps);
            const { cut } = onGrid(live, ordering, statistic, {}, step, 1);
            expectHolds(`${statistic} ${tail} ${JSON.stringify(counts)} in ${steps} steps`, cut, truth);
            widths[k]! += widthOf(cut);
          });
        }),
        { numRuns: 250, seed: 71 },
      );
      // What ties with the observed table stays in doubt on every grid.
      expect(widths[0]).toBeGreaterThan(1);
      expect(widths[1]).toBeLessThan(widths[0]! * 0.8);
    });
  }

  it('where lists are shared by all arrangements of rows', () => {
    fc.assert(
      fc.property(tableOf({ rows: [3, 4], columns: [4, 4], largest: 2 }), (counts) => {
        const live = liveFrom(counts);
        const ordering = orderingOf(live, 'probability', 'upper');
        const truth = exactByEnumeration(live, [ordering]).cuts[0]!;
        const step = stepFor(live, ordering, 'probability', 16);
        expectHolds(
          JSON.stringify(counts),
          onGrid(live, ordering, 'probability', { allAlike: true }, step, 1).cut,
          truth,
        );
      }),
      { numRuns: 100, seed: 72 },
    );
  });
});

describe('where the whole lists are too many', () => {
  const margins = {
    counts: [
      [30, 24, 18, 33, 21, 27, 20, 26, 31, 28, 23],
      [22, 29, 26, 19, 30, 24, 28, 23, 17, 21, 29],
    ],
  };
  const drawn = [...drawTables(makeTable(margins), { number: 2, seed: 'bracket' })];
  const entryLimit = 20_000;
  for (const statistic of ['pearson', 'likelihood-ratio', 'freeman-tukey']) {
    it(`${statistic}: a grid fits a memory that they outgrow, and more effort makes the bracket narrower`, () => {
      for (const counts of drawn) {
        const live = liveFrom(counts.map((row) => [...row]));
        const ordering = orderingOf(live, statistic, 'upper');
        const truth = exactCut(live, ordering, statistic);
        expect(() => exactCut(live, ordering, statistic, { entryLimit })).toThrow(OutOfReach);
        const step = stepFor(live, ordering, statistic, 4096);
        expectHolds('small memory', onGrid(live, ordering, statistic, { entryLimit }, 64 * step, 64).cut, truth);
        const bracket = (effort: number): BracketCut =>
          bracketCut(live, ordering, statistic, { meter: new Meter(effort) });
        const [little, much] = [bracket(1.6e6), bracket(2.6e6)];
        expectHolds('little effort', little, truth);
        expectHolds('much effort', much, truth);
        expect(widthOf(much)).toBeLessThan(widthOf(little) * 0.7);
      }
    });
  }
});
