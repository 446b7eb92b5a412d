// Tables with impossible cells, over many small masks: the moves connect all tables, a walk rests in the conditional law, exact p-values are
// those of every table in whole numbers, and with nothing impossible all is as usual.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factorial, oracleCut, tablesWith, toNumber } from '../../../fixtures/reference/generator/oracle.js';
import { exactByListing, visitTables } from '../../../src/null/chain/every-table.js';
import { chordlessCycles, type Move } from '../../../src/null/chain/moves.js';
import { serialCut } from '../../../src/null/chain/serial-test.js';
import { Walk } from '../../../src/null/chain/walk.js';
import { chiSquareUpperTail } from '../../../src/numeric/chi-square-tail.js';
import { blockStream } from '../../../src/random/stream.js';
import { bindQuasi } from '../../../src/statistic/quasi.js';
import { freeCells } from '../../../src/table/free-cells.js';
import { quasiExpected } from '../../../src/table/quasi-expected.js';
import { makeTable, type Table } from '../../../src/table/table.js';
import { relativeDifference, smallTable } from '../../helpers/tables.js';

const masked: fc.Arbitrary<Table> = fc
  .tuple(fc.integer({ min: 2, max: 4 }), fc.integer({ min: 2, max: 4 }))
  .chain(([rows, columns]) =>
    fc
      .array(fc.tuple(fc.integer({ min: 0, max: 2 }), fc.integer({ min: 0, max: 2 })), {
        minLength: rows * columns,
        maxLength: rows * columns,
      })
      .map((cells) => {
        const at = (i: number, j: number): readonly [number, number] => cells[i * columns + j]!;
        const lines = Array.from({ length: rows }, (_, i) => Array.from({ length: columns }, (__, j) => at(i, j)));
        // A third of the cells is impossible.
        return {
          counts: lines.map((line) => line.map(([count, kind]) => (kind === 0 ? 0 : count))),
          impossible: lines.map((line) => line.map(([, kind]) => kind === 0)),
        };
      }),
  )
  .filter(({ counts }) => counts.flat().some((n) => n > 0))
  .map((parts) => makeTable(parts));

/** Every table with these margins that keeps 0 in the impossible cells, by the oracle. */
const allTables = (table: Table): number[][] =>
  [...tablesWith(table.rowTotals, table.columnTotals)].filter((counts) =>
    counts.every((n, cell) => n === 0 || !table.impossible?.flat()[cell]),
  );

const movesOf = (table: Table): Move[] => chordlessCycles(freeCells(table).blocks, table.columnLabels.length, 50_000)!;

describe('tables with impossible cells', () => {
  it('are listed, each once; cells that vary are those found free; degrees of freedom are 0 when there is one only', () => {
    fc.assert(
      fc.property(masked, (table) => {
        const free = freeCells(table);
        const listed: string[] = [];
        visitTables(table, free, 1e6, (counts) => listed.push(counts.join()));
        const all = allTables(table);
        expect([...listed].sort()).toEqual(all.map((counts) => counts.join()).sort());
        expect(free.degreesOfFreedom === 0).toBe(all.length === 1);
        for (const cell of free.heldAtZero) expect(all.every((counts) => counts[cell] === 0)).toBe(true);
        for (const { cells } of free.blocks) {
          for (const cell of cells) expect(all.some((counts) => counts[cell]! > 0)).toBe(true);
        }
      }),
      { numRuns: 400, seed: 41 },
    );
  });

  it('are connected by chordless cycles', () => {
    fc.assert(
      fc.property(masked, (table) => {
        const waiting = [table.counts.flat()];
        const seen = new Set([waiting[0]!.join()]);
        const moves = movesOf(table);
        while (waiting.length > 0) {
          const counts = waiting.pop()!;
          for (const move of moves) {
            for (const sign of [1, -1]) {
              const next = [...counts];
              move.forEach((cell, k) => (next[cell]! += k % 2 === 0 ? sign : -sign));
              if (next.some((n) => n < 0) || seen.has(next.join())) continue;
              seen.add(next.join());
              waiting.push(next);
            }
          }
        }
        expect(seen.size).toBe(allTables(table).length);
      }),
      { numRuns: 400, seed: 42 },
    );
  });

  it('need longer cycles than swaps: a 3 x 3 table without its diagonal has one move of six cells', () => {
    const impossible = [0, 1, 2].map((i) => [0, 1, 2].map((j) => i === j));
    const table = makeTable({
      counts: [
        [0, 2, 1],
        [1, 0, 2],
        [2, 1, 0],
      ],
      impossible,
    });
    expect(movesOf(table).map((move) => move.length)).toEqual([6]);
  });

  it('have expected counts with the margins and the cross-ratios of quasi-independence', () => {
    fc.assert(
      fc.property(masked, (table) => {
        const free = freeCells(table);
        const expected = quasiExpected(table, free);
        const width = table.columnLabels.length;
        table.rowTotals.forEach((total, i) => {
          const sum = expected.slice(i * width, (i + 1) * width).reduce((a, b) => a + b, 0);
          expect(sum).toBeCloseTo(total, 9);
        });
        for (const move of movesOf(table)) {
          const ratio = move.reduce((log, cell, k) => log + (k % 2 === 0 ? 1 : -1) * Math.log(expected[cell]!), 0);
          expect(Math.abs(ratio)).toBeLessThan(1e-8);
        }
      }),
      { numRuns: 200, seed: 43 },
    );
  });

  it('have the exact p of every table, by the likelihood ratio, in whole numbers', () => {
    fc.assert(
      fc.property(masked, (table) => {
        const free = freeCells(table);
        const observed = Float64Array.from(table.counts.flat());
        const cells = free.blocks.flatMap((block) => block.cells);
        const bound = bindQuasi('likelihood-ratio', observed, quasiExpected(table, free), cells);
        const answer = exactByListing(table, free, 1e6, bound.place)!;
        const ways = (counts: readonly number[]): bigint => counts.reduce((all, n) => all * factorial(n), 1n);
        const powers = (counts: readonly number[]): bigint =>
          counts.reduce((all, n) => all * BigInt(n) ** BigInt(n), 1n);
        const common = factorial(table.total) ** 2n;
        let [inside, whole] = [0n, 0n];
        for (const counts of allTables(table)) {
          const weight = common / ways(counts);
          whole += weight;
          if (powers(counts) >= powers(table.counts.flat())) inside += weight;
        }
        expect(relativeDifference(answer.cuts[0]!.atLeast.value, toNumber(inside, whole))).toBeLessThan(1e-12);
      }),
      { numRuns: 300, seed: 44 },
    );
  });

  it('with nothing impossible give the ordinary answer', () => {
    fc.assert(
      fc.property(smallTable, fc.constantFrom('pearson' as const, 'likelihood-ratio' as const), (counts, name) => {
        const table = makeTable({ counts });
        const free = freeCells(table);
        const observed = Float64Array.from(counts.flat());
        const cells = free.blocks.flatMap((block) => block.cells);
        const bound = bindQuasi(name, observed, quasiExpected(table, free), cells);
        const { above, tied, whole } = oracleCut(counts, name);
        const answer = exactByListing(table, free, 1e6, bound.place)!;
        expect(relativeDifference(answer.cuts[0]!.atLeast.value, toNumber(above + tied, whole))).toBeLessThan(1e-12);
        expect(free.degreesOfFreedom).toBe((counts.length - 1) * (counts[0]!.length - 1));
      }),
      { numRuns: 200, seed: 45 },
    );
  });
});

describe('the chain', () => {
  const impossible = [0, 1, 2, 3].map((i) => [0, 1, 2, 3].map((j) => i === j));
  const table = makeTable({
    counts: [
      [0, 2, 1, 0],
      [1, 0, 2, 1],
      [0, 1, 0, 2],
      [2, 0, 1, 0],
    ],
    impossible,
  });
  const free = freeCells(table);
  const expected = quasiExpected(table, free);
  const observed = Float64Array.from(table.counts.flat());

  it('rests in the conditional law: frequencies 40 steps apart match it (p above 1e-6)', () => {
    const weights = new Map<string, number>();
    let whole = 0;
    visitTables(table, free, 1e6, (counts) => {
      const weight = counts.reduce((all, n) => all / Number(factorial(n)), 1);
      weights.set(counts.join(), weight);
      whole += weight;
    });
    const walk = new Walk(observed, movesOf(table), expected);
    const stream = blockStream('rest', '', 1);
    const seen = new Map<string, number>();
    const draws = 30_000;
    for (let k = 0; k < draws; k++) {
      for (let step = 0; step < 40; step++) walk.step(stream);
      const key = walk.counts.join();
      seen.set(key, (seen.get(key) ?? 0) + 1);
    }
    let statistic = 0;
    let rare = { expected: 0, seen: 0 };
    let cells = -1;
    const add = (e: number, n: number): void => {
      statistic += (n - e) ** 2 / e;
      cells++;
    };
    for (const [key, weight] of weights) {
      const e = (draws * weight) / whole;
      if (e >= 10) add(e, seen.get(key) ?? 0);
      else rare = { expected: rare.expected + e, seen: rare.seen + (seen.get(key) ?? 0) };
    }
    if (rare.expected > 0) add(rare.expected, rare.seen);
    expect(weights.size).toBeGreaterThan(20);
    expect(chiSquareUpperTail(statistic, cells).p).toBeGreaterThan(1e-6);
  });

  it('finds the exact p, and the same counts for the same seed', () => {
    const bound = bindQuasi(
      'likelihood-ratio',
      observed,
      expected,
      free.blocks.flatMap((block) => block.cells),
    );
    const truth = exactByListing(table, free, 1e6, bound.place)!.cuts[0]!.atLeast.value;
    const plan = { seed: 'q', tableKey: '', tables: 20_000, stepsBetween: 12 };
    const cut = serialCut(observed, movesOf(table), expected, plan, bound.place);
    expect(Math.abs((cut.tied + cut.above) / cut.draws - truth)).toBeLessThan(0.03);
    expect(serialCut(observed, movesOf(table), expected, plan, bound.place)).toEqual(cut);
  });
});
