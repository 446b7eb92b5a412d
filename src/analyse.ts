// THE SPINE: a table and wishes in, a result out, in the order of the science.
//   1. What was counted, and what of it takes part.       table
//   2. What will be done with it, settled before it starts. plan
//   3. How far the table lies from independence.          statistic
//   4. How much of what chance alone does lies as far.    null -> cut
//   5. What that says, with its error.                    pvalue
//   6. How far the usual approximation could be trusted.  table
import type { ReadTable } from './input/read-table.js';
import type { Cut, Mass, OrderingName } from './null/contract.js';
import { exactCuts, onlyTable } from './null/exact/exact-cuts.js';
import { orderingFor } from './null/ordering.js';
import { sampleCuts } from './null/sampled/sample-cuts.js';
import { makePlan } from './plan/make-plan.js';
import type { Plan, PlanOptions } from './plan/plan.js';
import type { PValueEntry } from './pvalue/contract.js';
import { approximationsOf, asymptoticAlone, asymptoticBeside, degreesOfFreedomOf } from './pvalue/approximations.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import { buildResult } from './result/build-result.js';
import { asymptoticNotes, emptyLineNotes, onlyOneTable, statisticNotes, unsettledNotes } from './result/notes.js';
import type { Result } from './result/result.js';
import type { BoundStatistic } from './statistic/contract.js';
import { checkExpectations } from './table/expectation-check.js';
import { liveTable, type LiveTable } from './table/live-table.js';
import { makeTable, type TableParts } from './table/table.js';

/**
 * Decides whether the rows and columns of a table of counts are associated.
 * @param data counts with optional labels, or a table that an input function has read.
 * @param options wishes; every one has a default.
 * @returns everything found, in the published shape `keepsum/result/1`.
 * @throws Problem, of kind `data`, `usage` or `effort`, with code, place and hint.
 */
export async function analyse(data: TableParts | ReadTable, options: PlanOptions = {}): Promise<Result> {
  const read = 'table' in data ? data : fromProgram(data);
  const live = liveTable(read.table);

  const { plan, statistic, bound, named, valueOfOnlyTable } = makePlan(read.table, live, options);

  const questions = questionsOf(plan);
  const value = bound === null ? valueOfOnlyTable : bound.value(live.counts);

  const approximations = bound === null ? [] : approximationsOf(statistic, live, bound, value);
  const asymptotic = asymptoticBeside(questions[0]!, approximations);
  let found: PValueEntry[];
  let tables: number | undefined;
  if (plan.method === 'asymptotic') {
    found = asymptoticAlone(
      questions,
      bound === null ? approximationsOf(statistic, live, null, value ?? 0) : approximations,
    );
  } else {
    const answer = askNull(live, bound, orderingsNeeded(questions), plan);
    tables = answer.tables;
    found = await conditionalPValues(questions, answer.cuts, answer.point, plan.samplingConfidence);
    found.push(...asymptotic);
  }

  return buildResult({
    read,
    plan,
    named,
    value,
    degreesOfFreedom: degreesOfFreedomOf(statistic, live),
    pValues: found,
    expectations: checkExpectations(live),
    tables,
    notes: [
      ...read.notes,
      ...emptyLineNotes(read.table),
      ...(bound === null ? [onlyOneTable] : asymptoticNotes(found[0]!, asymptotic[0], statistic)),
      ...statisticNotes(statistic, bound),
      ...(await unsettledNotes(found[0]!, plan)),
    ],
  });
}

const fromProgram = (parts: TableParts): ReadTable => ({
  table: makeTable(parts),
  source: { form: 'library' },
  sha256: null,
  missing: null,
  notes: [],
});

interface NullAnswer {
  readonly cuts: readonly Cut[];
  readonly point: Mass | null;
  readonly tables?: number;
}

function askNull(live: LiveTable, bound: BoundStatistic | null, names: OrderingName[], plan: Plan): NullAnswer {
  if (bound === null) return onlyTable(live, names);
  const orderings = names.map((name) => orderingFor(live, bound, name));
  if (plan.method === 'exact') return exactCuts(live, orderings);
  return {
    cuts: sampleCuts(live, orderings, { seed: plan.seed!, tableKey: plan.tableKey, draws: plan.draws! }),
    point: null,
  };
}
