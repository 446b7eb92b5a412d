// From a table and wishes to its p-values, with the digits that every report of them has: the first five steps of the spine, all
// that a compact line of a batch takes.
import { inquireCells, type CellInquiry } from './cell/which-cells.js';
import type { ReadTable } from './input/read-table.js';
import type { BracketCut, ExactCut } from './null/contract.js';
import type { ExactAnswer } from './null/exact/exact-answer.js';
import { exactCuts, onlyTable } from './null/exact/exact-cuts.js';
import { Meter } from './null/exact/meter.js';
import { OutOfReach } from './null/exact/out-of-reach.js';
import { mostOverrun, type Forecast } from './null/forecast.js';
import { orderingFor } from './null/ordering.js';
import { makePlan, type Prepared } from './plan/make-plan.js';
import type { PlanOptions } from './plan/plan.js';
import { noRoles } from './plan/roles.js';
import { planWithoutExact } from './plan/without-exact.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { approximationsOf, asymptoticAlone, asymptoticBeside, degreesOfFreedomOf } from './pvalue/approximations.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import { statisticEcho, type Findings } from './result/build-result.js';
import {
  asymptoticNotes,
  designNotes,
  emptyLineNotes,
  onlyOneTable,
  statisticNotes,
  unsettledNotes,
} from './result/notes.js';
import type { Note, Result } from './result/result.js';
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

/** What a result takes over from the answer as it is. */
export const findingsOf = ({ read, live, prepared, expectations, ...found }: Answer): Findings => ({
  ...found,
  cells: undefined,
  read,
  plan: prepared.plan,
  named: namedBy(prepared),
  expectations: expectations ?? checkExpectations(live),
});

/** Effects of any 2x2 table know two groups; statistics that know none do not name them. */
const namedBy = ({ statistic, named }: Answer['prepared']): Prepared['named'] =>
  statistic?.shape === 'any' ? null : named;

/** The statistic as a compact line shows it. */
export const statisticOf = ({
  read,
  prepared,
  value,
  degreesOfFreedom,
  undefinedBecause,
}: Answer): Result['statistic'] =>
  statisticEcho({ read, plan: prepared.plan, named: namedBy(prepared), value, degreesOfFreedom, undefinedBecause });

/** The p-values alone, by the same steps and with the same digits. Arguments and problems as for `analyse`. */
export const answer = (
  data: TableParts | ReadTable,
  options: PlanOptions = {},
  surroundings: Surroundings = {},
): Promise<Answer> => find(data, options, surroundings, false);

/** @param withCells whether the cells are asked about by the same draws. */
export async function find(
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
      return fromAnswer(asked, await exactCuts(live, orderings, forecast.engine, plan.statistic, meter));
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

export const fromProgram = (parts: TableParts): ReadTable => ({
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
