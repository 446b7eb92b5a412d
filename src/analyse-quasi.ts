// The spine for tables with impossible cells: are rows and columns independent where they can be (quasi-independence)?
//   1. Which cells can vary, and what is expected in them.   table
//   2. What will be done, settled by what listing all takes. plan
//   3. How much of what chance alone does lies as far.       null: every table, or a chain from the observed one
//   4. What that says, with its error.                       pvalue
import type { Answer } from './analyse.js';
import type { ReadTable } from './input/read-table.js';
import { chordlessCycles, type Move } from './null/chain/moves.js';
import { exactByListing } from './null/chain/every-table.js';
import { serialCut } from './null/chain/serial-test.js';
import type { PlanOptions } from './plan/plan.js';
import { planQuasi, quasiWishes } from './plan/quasi-plan.js';
import { usageProblem } from './problem/problem.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { chiSquarePValue } from './pvalue/from-asymptotic.js';
import { chainPValue } from './pvalue/from-chain.js';
import { conditionalPValues } from './pvalue/p-values.js';
import { quasiNotes } from './result/quasi-notes.js';
import { bindQuasi } from './statistic/quasi.js';
import { adviceFor } from './table/expectation-check.js';
import { freeCells } from './table/free-cells.js';
import { liveTable } from './table/live-table.js';
import { quasiExpected } from './table/quasi-expected.js';

const mostMoves = 50_000;

/** @param read a table with at least one impossible cell. @throws Problem, of kind `usage`, `data` or `effort`. */
export async function answerQuasi(read: ReadTable, options: PlanOptions): Promise<Answer> {
  const { table } = read;
  const width = table.columnLabels.length;
  const wishes = quasiWishes(options);
  const free = freeCells(table);
  const expected = quasiExpected(table, free);
  const observed = Float64Array.from(table.counts.flat());
  const cells = free.blocks.flatMap((block) => block.cells);
  const bound = bindQuasi(wishes.statistic, observed, expected, cells);
  const question: Question = { tail: 'upper', rule: null, statistic: wishes.statistic };

  const asked = wishes.asked;
  const listed =
    asked === 'sample' || asked === 'asymptotic' ? undefined : exactByListing(table, free, wishes.steps, bound.place);
  const moves = listed === undefined ? chordlessCycles(free.blocks, width, mostMoves) : undefined;
  const plan = planQuasi(options, wishes, listed?.tables, moves?.length);
  const limit = free.degreesOfFreedom === 0 ? [] : [chiSquarePValue(question, bound.value, free.degreesOfFreedom)];
  if (plan.method === 'asymptotic' && limit.length === 0) {
    throw usageProblem({
      code: 'no-asymptotic-value',
      message: 'these margins and impossible cells allow one table only, which has no asymptotic p',
      place: '--method asymptotic',
      hint: 'use --method exact',
    });
  }
  const pValues = [...(await found()), ...limit];
  return {
    read,
    live: liveTable(table),
    prepared: { plan, named: null },
    value: bound.value,
    degreesOfFreedom: free.degreesOfFreedom,
    pValues,
    tables: listed?.tables,
    expectations: adviceFor(
      cells.map((cell) => expected[cell]!),
      false,
    ),
    quasi: {
      expected: table.counts.map((row, i) =>
        row.map((_, j) => (table.impossible![i]![j] ? null : expected[i * width + j]!)),
      ),
      blocks: free.blocks.length,
      heldAtZero: free.heldAtZero.map((cell) => [Math.floor(cell / width), cell % width] as [number, number]),
    },
    notes: [...read.notes, ...quasiNotes(table, plan, free)],
  };

  async function found(): Promise<PValueEntry[]> {
    if (plan.method === 'asymptotic') return [];
    if (listed !== undefined) return conditionalPValues([question], listed.cuts, listed.point, plan.samplingConfidence);
    return [chain(moves!, plan.seed!, plan.draws as number)];
  }

  /** A chain without moves stays where it is: every table ties. */
  function chain(usable: readonly Move[], seed: string, tables: number): PValueEntry {
    const stepsBetween = Math.max(10, cells.length);
    const cut =
      usable.length === 0
        ? { kind: 'sampled' as const, ordering: 'upper' as const, below: 0, tied: tables, above: 0, draws: tables }
        : serialCut(observed, usable, expected, { seed, tableKey: plan.tableKey, tables, stepsBetween }, bound.place);
    return chainPValue(question, cut, stepsBetween, usable.length);
  }
}
