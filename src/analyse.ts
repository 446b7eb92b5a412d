// THE SPINE: a table and wishes in, a result out, in the order of the science.
//   1. What was counted, and what of it takes part.       table
//   2. What will be done with it, settled before it starts. plan
//   3. How far the table lies from independence.          statistic
//   4. How much of what chance alone does lies as far.    null -> cut
//   5. What that says, with its error.                    pvalue
//   6. Which cells it comes from.                         cell
//   7. How strong it is, how fragile, what to look out for. effect
//   8. How far the usual approximation could be trusted.  table
// Steps 1 to 5 are `answer`, which is all that a compact line of a batch takes; what stands around the p-values is added by
// `analyse` alone.
import { answer, find, findingsOf, fromProgram, type Answer } from './answer.js';
import { besideThe } from './beside-the-answer.js';
import type { ReadTable } from './input/read-table.js';
import type { StrataParts } from './input/strata.js';
import { keptWishes } from './plan/kept-wishes.js';
import { type Prepared } from './plan/make-plan.js';
import type { DesignLine } from './design/panel.js';
import { fixedSides, isTwoByTwo } from './plan/design.js';
import type { PlanOptions } from './plan/plan.js';
import { questionsOf } from './pvalue/p-values.js';
import { buildResult } from './result/build-result.js';
import type { Note, Result } from './result/result.js';
import { lineComparisons } from './line-comparisons.js';
import { orderedAnswers } from './ordered-answers.js';
import { type Surroundings } from './sampled-answer.js';
import { type TableParts } from './table/table.js';

export { answer, findingsOf, statisticOf, type Answer } from './answer.js';

/**
 * Decides whether the rows and columns of a table of counts are associated.
 * @param data counts with optional labels, counts by stratum, or a table that an input function has read.
 * @param options wishes; every one has a default.
 * @param surroundings what the run may use of the machine; changes no digit.
 * @returns everything found, in the published shape `keepsum/result/1`.
 * @throws Problem, of kind `data`, `usage` or `effort`, with code, place and hint.
 */
export async function analyse(
  data: TableParts | StrataParts | ReadTable,
  options: PlanOptions = {},
  surroundings: Surroundings = {},
): Promise<Result> {
  let part: Result['part'];
  const onTallies: Surroundings['onTallies'] = (tallies, draws) => {
    part = { draws, tallies: tallies.map(([below, tied, above]) => [below, tied, above]) };
  };
  const watched = options.shard === undefined ? surroundings : { ...surroundings, onTallies };
  const result = await analyseWhole(data, options, watched);
  const { plan } = result;
  const seed = options.seed ?? plan.seed ?? plan.cells?.seed ?? null;
  const asked = keptWishes(options, plan, seed) as NonNullable<typeof plan.asked>;
  return {
    ...result,
    plan: { ...plan, asked },
    ...(part === undefined || plan.shard === undefined ? {} : { part, notes: [...result.notes, partNote(plan.shard)] }),
  };
}

const partNote = ({ index, of }: NonNullable<PlanOptions['shard']>): Note => ({
  code: 'part-of-a-run',
  text: `These are the draws of part ${index} of ${of}; keepsum merge pools all parts into the result of the whole run.`,
});

async function analyseWhole(
  data: TableParts | StrataParts | ReadTable,
  options: PlanOptions,
  surroundings: Surroundings,
): Promise<Result> {
  const read = 'table' in data ? data : 'strata' in data ? await strataFromProgram(data) : fromProgram(data);
  if (read.strata !== undefined || read.clusters !== undefined) return ofGroups(read, options, surroundings, true);
  const found = await find(read, options, surroundings, true);
  const { cells, prepared } = found;
  const byOrder =
    prepared.plan.paired || found.quasi
      ? undefined
      : await orderedAnswers(found, options, (wishes) => answer(found.read, wishes, surroundings));
  // What stands beside a p of pairs is part of their answer.
  const beside = isWhole(prepared) && !prepared.plan.paired ? await besideThe(found, prepared, options) : {};
  const comparisons = prepared.plan.paired
    ? undefined
    : await lineComparisons(found, options, (lines, wishes) => answer(lines, wishes, surroundings));
  const nullSummary =
    options.nullSummary && isWhole(prepared)
      ? (await import('./null-summary.js')).summariseNull(found, prepared, options)
      : undefined;
  const findings = {
    ...findingsOf(found),
    ...beside,
    byOrder,
    comparisons,
    designs: await otherDesigns(found),
    nullSummary,
  };
  if (cells === undefined) return buildResult(findings);
  const plan = Object.freeze({ ...prepared.plan, cells: cells.echo });
  return buildResult({ ...findings, plan, cells: await cells.entries() });
}

const isWhole = (prepared: Answer['prepared']): prepared is Prepared => prepared.statistic !== undefined;
/** For a 2x2 table, what p would be had the study fixed something else. */
async function otherDesigns({
  read: { table },
  prepared: { plan },
  pValues,
}: Answer): Promise<DesignLine[] | undefined> {
  if (!isTwoByTwo(table) || plan.nullValue || !fixedSides.some((side) => side === plan.fixed)) return undefined;
  return (await import('./design/panel.js')).designPanel(table, plan, questionsOf(plan)[0]!, pValues);
}

/** A table with strata or clusters without its effects: all that a compact line takes. Arguments and problems as for `analyse`. */
export async function analyseGroups(
  data: TableParts | StrataParts | ReadTable,
  options: PlanOptions,
  surroundings: Surroundings,
): Promise<{ read: ReadTable; result: Result }> {
  const read = 'table' in data ? data : await strataFromProgram(data as StrataParts);
  return { read, result: await ofGroups(read, options, surroundings, false) };
}

async function ofGroups(
  read: ReadTable,
  options: PlanOptions,
  surroundings: Surroundings,
  withEffects: boolean,
): Promise<Result> {
  return read.strata !== undefined
    ? (await import('./analyse-strata.js')).analyseStrata(read, options, surroundings, withEffects)
    : (await import('./analyse-clusters.js')).analyseClusters(read, options, surroundings);
}

async function strataFromProgram(parts: StrataParts): Promise<ReadTable> {
  const { strataFromParts } = await import('./input/strata.js');
  return { ...strataFromParts(parts), source: { form: 'library' }, sha256: null, missing: null, notes: [] };
}
