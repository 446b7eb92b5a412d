// The network engine against the slow oracle in whole numbers and against plain enumeration: thousands of small tables,
// both ways of keeping lists, every form of encoding, ties in plenty, tails far out.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  oracleCut,
  toNumber,
  type Ordering as OracleOrdering,
} from '../../../../fixtures/reference/generator/oracle.js';
import type { ExactCut, Ordering } from '../../../../src/null/contract.js';
import { exactByEnumeration } from '../../../../src/null/exact/enumerate.js';
import { exactCut } from '../../../../src/null/exact/network/exact-cut.js';
import type { NetworkOptions } from '../../../../src/null/exact/network/masses.js';
import { liveFrom, orderingOf, relativeDifference, smallTable, tableOf, transpose } from '../../../helpers/tables.js';

const statistics = ['pearson', 'likelihood-ratio', 'probability'] as const;

/** What the engine promises, and far less than the 1e-12 of the program. */
const promised = 1e-13;

function expectClose(what: string, ours: number, theirs: number): void {
  expect(relativeDifference(ours, theirs), `${what}: ${ours} not ${theirs}`).toBeLessThanOrEqual(promised);
}

function compareWithOracle(table: number[][], statistic: OracleOrdering, name: string, options: NetworkOptions): void {
  const live = liveFrom(table);
  const cut = exactCut(live, orderingOf(live, statistic, 'upper'), name, options);
  const truth = oracleCut(table, statistic);
  const what = `${name} ${JSON.stringify(options)} of ${JSON.stringify(table)}`;
  expectClose(`${what}, at least`, cut.atLeast.value, toNumber(truth.tied + truth.above, truth.whole));
  expectClose(`${what}, above`, cut.above.value, toNumber(truth.above, truth.whole));
  expectClose(`${what}, tied`, cut.tied.value, toNumber(truth.tied, truth.whole));
  expectClose(`${what}, below`, cut.below.value, toNumber(truth.below, truth.whole));
}

/** Columns are rearrangements of a few patterns, so that rows and columns with equal totals and ties abound. */
const evenTable = fc
  .tuple(fc.integer({ min: 2, max: 4 }), fc.array(fc.integer({ min: 0, max: 3 }), { minLength: 3, maxLength: 3 }))
  .filter(([, pattern]) => pattern.some((n) => n > 0))
  .map(([rows, pattern]) => Array.from({ length: rows }, (_, i) => pattern.map((_, j) => pattern[(i + j) % 3]!)))
  .filter((table) => transpose(table).every((column) => column.some((n) => n > 0)));

const steepTable = tableOf({ rows: [2, 3], columns: [2, 3], largest: 1 }).map((table) =>
  table.map((row, i) => row.map((n, j) => (i === j ? n + 7 : n))),
);

const kinds = { small: smallTable, even: evenTable, steep: steepTable };

describe('the network gives the masses of the oracle', () => {
  for (const statistic of statistics) {
    for (const [kind, arbitrary] of Object.entries(kinds)) {
      it(`${statistic}, ${kind} tables, a list for every node`, () => {
        fc.assert(
          fc.property(arbitrary, (table) => compareWithOracle(table, statistic, statistic, { allAlike: false })),
          { numRuns: 250, seed: 1 },
        );
      });
      if (statistic === 'pearson') continue;
      it(`${statistic}, ${kind} tables, lists shared by all arrangements of rows`, () => {
        fc.assert(
          fc.property(arbitrary, (table) => compareWithOracle(table, statistic, statistic, { allAlike: true })),
          { numRuns: 250, seed: 2 },
        );
      });
      it(`${statistic}, ${kind} tables, without keys: near ties are traced back and decided one by one`, () => {
        fc.assert(
          fc.property(arbitrary, (table) => compareWithOracle(table, statistic, 'unnamed', {})),
          { numRuns: 200, seed: 3 },
        );
      });
    }
  }
});

function compareWithEnumeration(table: number[][], statistic: string, name: 'upper' | 'lower'): void {
  const live = liveFrom(table);
  const ordering: Ordering = orderingOf(live, statistic, name);
  const plain = exactByEnumeration(live, [ordering]).cuts[0]!;
  for (const allAlike of [false, true]) {
    const cut = exactCut(live, ordering, statistic, { allAlike });
    for (const part of ['below', 'tied', 'above', 'atLeast'] as const satisfies readonly (keyof ExactCut)[]) {
      expectClose(`${statistic} ${name} ${part} of ${JSON.stringify(table)}`, cut[part].value, plain[part].value);
    }
  }
}

describe('the network gives the masses of plain enumeration', () => {
  const larger = fc.oneof(
    tableOf({ rows: [2, 2], columns: [3, 4], largest: 30 }),
    tableOf({ rows: [3, 3], columns: [3, 3], largest: 9 }),
    tableOf({ rows: [3, 4], columns: [3, 3], largest: 4 }),
  );
  for (const statistic of statistics) {
    for (const name of ['upper', 'lower'] as const) {
      it(`${statistic}, ${name} tail, tables of dozens to hundreds`, () => {
        fc.assert(
          fc.property(larger, (table) => compareWithEnumeration(table, statistic, name)),
          { numRuns: 60, seed: 4 },
        );
      });
    }
  }

  it('far beyond the smallest double, on a steep table of hundreds', () => {
    const table = [
      [400, 3, 1],
      [0, 350, 500],
    ];
    for (const statistic of statistics) {
      const live = liveFrom(table);
      const ordering = orderingOf(live, statistic, 'upper');
      const plain = exactByEnumeration(live, [ordering]).cuts[0]!;
      const cut = exactCut(live, ordering, statistic);
      expect(cut.atLeast.log10).toBeLessThan(-200);
      expect(relativeDifference(cut.atLeast.log10, plain.atLeast.log10)).toBeLessThan(1e-14);
      expect(relativeDifference(cut.tied.log10, plain.tied.log10)).toBeLessThan(1e-14);
    }
  });
});

describe('both sides and the ties, each added up by itself, make 1', () => {
  const wide = fc.oneof(
    tableOf({ rows: [2, 2], columns: [3, 5], largest: 400 }),
    tableOf({ rows: [3, 3], columns: [3, 3], largest: 90 }),
    tableOf({ rows: [4, 5], columns: [4, 5], largest: 3 }),
  );
  for (const statistic of statistics) {
    it(`${statistic}, totals up to thousands`, () => {
      fc.assert(
        fc.property(wide, (table) => {
          const live = liveFrom(table);
          const options = { sumBothSides: true };
          const cut = exactCut(live, orderingOf(live, statistic, 'upper'), statistic, options);
          expectClose(JSON.stringify(table), cut.below.value + cut.tied.value + cut.above.value, 1);
        }),
        { numRuns: 12, seed: 6 },
      );
    });
  }
});

describe('what must not change the answer does not', () => {
  const table = tableOf({ rows: [3, 4], columns: [3, 5], largest: 5 });
  for (const statistic of statistics) {
    it(`${statistic}: turning the table, and shuffling its rows`, () => {
      fc.assert(
        fc.property(table, (counts) => {
          const p = (rows: number[][]): number => {
            const live = liveFrom(rows);
            return exactCut(live, orderingOf(live, statistic, 'upper'), statistic).atLeast.value;
          };
          expectClose('turned', p(transpose(counts)), p(counts));
          expectClose('reversed', p([...counts].reverse()), p(counts));
        }),
        { numRuns: 100, seed: 5 },
      );
    });
  }
});
