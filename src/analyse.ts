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
import { besideThe } from './beside-the-answer.js';
import { inquireCells, type CellInquiry } from './cell/which-cells.js';
import type { ReadTable } from './input/read-table.js';
import type { StrataParts } from './input/strata.js';
import type { BracketCut, ExactCut } from './null/contract.js';
import type { ExactAnswer } from './null/exact/exact-answer.js';
import { exactCuts, onlyTable } from './null/exact/exact-cuts.js';
import { Meter } from './null/exact/meter.js';
import { OutOfReach } from './null/exact/out-of-reach.js';
import { mostOverrun, type Forecast } from './null/forecast.js';
import { orderingFor } from './null/ordering.js';
import { keptWishes } from './plan/kept-wishes.js';
import { makePlan, type Prepared } from './plan/make-plan.js';
import type { DesignLine } from './design/panel.js';
import { fixedSides, isTwoByTwo } from './plan/design.js';
import type { PlanOptions } from './plan/plan.js';
import { noRoles } from './plan/roles.js';
import { planWithoutExact } from './plan/without-exact.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { approximationsOf, asymptoticAlone, asymptoticBeside, degreesOfFreedomOf } from './pvalue/approximations.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import { buildResult, type Findings } from './result/build-result.js';
import {
  asymptoticNotes,
  designNotes,
  emptyLineNotes,
  onlyOneTable,
  statisticNotes,
  unsettledNotes,
} from './result/notes.js';
import type { Note, Result } from './result/result.js';
import { lineComparisons } from './line-comparisons.js';
import { orderedAnswers } from './ordered-answers.js';
import { sampledPValues, type Surroundings } from './sampled-answer.js';
import { checkExpectations } from './table/expectation-check.js';
import { liveTable, type LiveTable } from './table/live-table.js';
import { makeTable, type TableParts } from './table/table.js';

/** What the p-values are and what they rest on, before anything is put into words. */
export interface Answer {
  readonly read: ReadTable;
  readonly live: LiveTable;
  /** Whole but for pairs, whose plan knows no statistic of two margins. */
  readonly prepared: Pick<Prepared, 'plan' | 'named'> & Partial<Prepared>;
  /** null where the margins leave the statistic undefined. */
  readonly value: number | null;
  readonly undefinedBecause?: Findings['undefinedBecause'];
  readonly degreesOfFreedom: number | undefined;
  readonly pValues: readonly PValueEntry[];
  /** Tables with these margins, when every one was counted. */
  readonly tables: number | undefined;
  /** Pairs have theirs off the diagonal; default: those of independence. */
  readonly expectations?: Findings['expectations'];
  readonly effects?: Findings['effects'];
  readonly quasi?: Findings['quasi'];
  readonly notes: readonly Note[];
  /** What was settled about the cells, its draws made; left out where they are not wanted. */
  readonly cells?: CellInquiry | undefined;
}

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
  if (read.strata !== undefined)
    return (await import('./analyse-strata.js')).analyseStrata(read, options, surroundings);
  if (read.clusters !== undefined) {
    return (await import('./analyse-clusters.js')).analyseClusters(read, options, surroundings);
  }
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

/** What a result takes over from the answer as it is. */
export const findingsOf = ({ read, live, prepared, expectations, ...found }: Answer): Findings => ({
  ...found,
  cells: undefined,
  read,
  plan: prepared.plan,
  // Effects of any 2x2 table know two groups; statistics that know none do not name them.
  named: prepared.statistic?.shape === 'any' ? null : prepared.named,
  expectations: expectations ?? checkExpectations(live),
});

/** The p-values alone, by the same steps and with the same digits. Arguments and problems as for `analyse`. */
export const answer = (
  data: TableParts | ReadTable,
  options: PlanOptions = {},
  surroundings: Surroundings = {},
): Promise<Answer> => find(data, options, surroundings, false);

async function find(
  data: TableParts | ReadTable,
  options: PlanOptions,
  surroundings: Surroundings,
  withCells: boolean,
): Promise<Answer> {
  const given = 'table' in data ? data : fromProgram(data);
  if (given.table.impossible !== undefined) return (await import('./analyse-quasi.js')).answerQuasi(given, options);
  const pairs = options.paired ? await import('./analyse-pairs.js') : null;
  pairs?.refuseUnreadByPairs(options);
  const read = pairs === null ? given : pairs.squareTable(given);
  if (pairs !== null && !pairs.isAgreement(options.statistic)) return pairs.answerPairs(read, options, surroundings);
  const live = liveTable(read.table);
  const prepared = makePlan(read.table, live, options);
  try {
    return await carryOut(read, live, prepared, options, surroundings, withCells);
  } catch (thrown) {
    if (!(thrown instanceof OutOfReach)) throw thrown;
    const second = planWithoutExact(read.table, live, options, prepared.plan, thrown);
    return carryOut(read, live, second, options, surroundings, withCells);
  }
}

async function carryOut(
  read: ReadTable,
  live: LiveTable,
  prepared: Prepared,
  options: PlanOptions,
  surroundings: Surroundings,
  withCells: boolean,
): Promise<Answer> {
  const { plan, statistic, bound, named, valueOfOnlyTable, design, conditional, choices } = prepared;
  if (design === 'null-value') return (await import('./stated-answer.js')).statedAnswer(read, live, prepared);
  const questions = questionsOf(plan);
  const value = bound === null ? valueOfOnlyTable : bound.value(live.counts);

  const approximations = bound === null ? [] : approximationsOf(statistic, live, bound, value);
  const asymptotic = asymptoticBeside(questions[0]!, approximations);
  // Cells are judged given both margins, as the p beside that of another design is.
  const givenMargins = { ...plan, method: conditional.method };
  const cells =
    withCells && !plan.paired ? (inquireCells(read.table, live, givenMargins, options) ?? undefined) : undefined;
  const declared = await askDesign();
  const { found: given, tables } = await askNull(design === 'conditional' ? questions : questions.slice(0, 1));
  const found = [...declared, ...given, ...(plan.method === 'asymptotic' ? [] : asymptotic)];

  return {
    read,
    live,
    prepared,
    value,
    degreesOfFreedom: degreesOfFreedomOf(statistic, live, bound),
    pValues: found,
    tables,
    ...(plan.paired ? await (await import('./analyse-pairs.js')).agreementFindings(read.table, plan) : {}),
    cells,
    notes: [
      ...read.notes,
      ...(plan.paired || design === 'two-groups' || design === 'multinomial' ? [] : emptyLineNotes(read.table)),
      ...designNotes(plan, read.table, design),
      ...(bound === null && design !== 'conditional'
        ? []
        : bound === null
          ? [onlyOneTable]
          : asymptoticNotes(found[0]!, asymptotic[0], statistic)),
      ...statisticNotes(statistic, bound),
      ...(await unsettledNotes(found[0]!, plan)),
    ],
  };

  async function askDesign(): Promise<PValueEntry[]> {
    if (design === 'conditional' || design === 'null-value') return [];
    const { designAnswer } = await import('./design/answer.js');
    const { table } = read;
    const { onProgress } = surroundings;
    const parts = { kind: design, table, live, statistic, roles: named ?? noRoles, choices, plan };
    return designAnswer(questions, onProgress === undefined ? parts : { ...parts, onProgress });
  }

  async function askNull(asked: readonly Question[]): Promise<{ found: PValueEntry[]; tables?: number }> {
    if (plan.method === 'asymptotic') {
      const known = bound === null ? approximationsOf(statistic, live, null, value ?? 0) : approximations;
      return { found: asymptoticAlone(asked, known) };
    }
    const names = orderingsNeeded(asked);
    if (bound === null) return fromAnswer(asked, onlyTable(live, names));
    const orderings = names.map((name) => orderingFor(live, bound, name));
    if (conditional.method === 'exact') {
      await surroundings.beforeExact?.(conditional.forecast);
      const { forecast } = conditional;
      const meter = meterFor(plan.effort, forecast, surroundings);
      return fromAnswer(asked, exactCuts(live, orderings, forecast.engine, plan.statistic, meter));
    }
    const recipe = statistic.own ? null : { parts: partsOf(read), options };
    return { found: await sampledPValues(asked, live, orderings, plan, recipe, surroundings, cells?.listener) };
  }

  async function fromAnswer(
    asked: readonly Question[],
    { cuts, point, tables }: ExactAnswer<ExactCut | BracketCut>,
  ): Promise<{ found: PValueEntry[]; tables?: number }> {
    const found = await conditionalPValues(asked, cuts, point, plan.samplingConfidence);
    return tables === undefined ? { found } : { found, tables };
  }
}

/** A bracket is refined while the effort lasts; other exact work may go past it, since forecasts err. */
function meterFor(effort: number, forecast: Forecast, { onWork }: Surroundings): Meter {
  const most = forecast.engine === 'bracket' ? effort : mostOverrun * effort;
  const foreseen = forecast.engine === 'bracket' ? effort : forecast.workUnits;
  return new Meter(most, onWork === undefined ? undefined : (units) => onWork(units, foreseen));
}

async function strataFromProgram(parts: StrataParts): Promise<ReadTable> {
  const { strataFromParts } = await import('./input/strata.js');
  return { ...strataFromParts(parts), source: { form: 'library' }, sha256: null, missing: null, notes: [] };
}

const fromProgram = (parts: TableParts): ReadTable => ({
  table: makeTable(parts),
  source: { form: 'library' },
  sha256: null,
  missing: null,
  notes: [],
});

/** What a worker thread needs to make the same table. */
const partsOf = ({ table: { counts, rowLabels, columnLabels } }: ReadTable): TableParts => ({
  counts,
  rowLabels,
  columnLabels,
});
