// How fragile is p? The least p that the margins can attain, and p with one count moved from one cell to a neighbour in
// its row or column (Dupont 1986): the same question asked of tables next to the one at hand.
import { exactByEnumeration } from './null/exact/enumerate.js';
import { exactCuts, onlyTable } from './null/exact/exact-cuts.js';
import type { ExactEngine } from './null/forecast.js';
import { orderingFor } from './null/ordering.js';
import type { OrderingName } from './null/contract.js';
import { makePlan, type Prepared } from './plan/make-plan.js';
import { orderingFor as orderingsOf, type PlanOptions } from './plan/plan.js';
import { Problem } from './problem/problem.js';
import type { PValueEntry } from './pvalue/contract.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import type { BoundStatistic } from './statistic/contract.js';
import { liveTable, type LiveTable } from './table/live-table.js';
import { makeTable, type Table } from './table/table.js';

export interface Cell {
  readonly row: string;
  readonly column: string;
}

export interface MovedP {
  readonly p: number | null;
  readonly log10P: number | null;
  readonly from: Cell;
  readonly to: Cell;
}

export interface Fragility {
  /** Tables one count away that were looked at. */
  readonly moves: number;
  readonly smallest: MovedP;
  readonly largest: MovedP;
}

export interface Fragile {
  readonly leastAttainable?: number;
  readonly fragility?: Fragility;
}

/** Exact work, in counted units, that all tables beside the one at hand may take together; of 2x2 tables up to half a second. */
const cheapWork = 2e6;
const cheapTwoByTwoWork = 2e7;
/** A 2x2 law is walked 10 to 39 standard deviations to one side and 12 to the other, the furthest for the outermost tables. */
const furthestToNearest = 51 / 22;
/** Most tables that are listed to find the most extreme one. */
const fewTables = 2000;

/** Nothing where there is no exact p to be had cheaply. @param options as given for the table itself. */
export async function fragilityOf(
  table: Table,
  live: LiveTable,
  prepared: Prepared,
  options: PlanOptions,
): Promise<Fragile> {
  const { plan, statistic, bound, conditional } = prepared;
  if (bound === null || statistic.own || plan.method === 'asymptotic') return {};
  const ask = askerFor(table, options);
  const moves = neighbours(table, live);
  const { workUnits } = conditional.forecast;
  const cheap = Math.min(plan.effort, isTwoByTwo(live) ? cheapTwoByTwoWork : cheapWork);
  // Only tables that are listed anyway, and the two ends of a 2x2 law, are looked at for the least p.
  const isNear = !isTwoByTwo(live) || workUnits * 2 * furthestToNearest <= cheap;
  const least = isNear ? await leastAttainable(table, live, prepared, ask) : {};
  if (workUnits > plan.effort || workUnits * moves.length > cheap) return least;
  const found: MovedP[] = [];
  for (const { from, to } of moves) {
    const counts = table.counts.map((row) => [...row]);
    counts[from[0]]![from[1]]!--;
    counts[to[0]]![to[1]]!++;
    const entry = await ask(counts);
    if (entry === null) continue;
    const cell = ([row, column]: Place): Cell => ({ row: table.rowLabels[row]!, column: table.columnLabels[column]! });
    found.push({ p: entry.p, log10P: entry.log10P, from: cell(from), to: cell(to) });
  }
  if (found.length === 0) return least;
  const size = ({ log10P }: MovedP): number => log10P ?? -Infinity;
  const smallest = found.reduce((best, one) => (size(one) < size(best) ? one : best));
  const largest = found.reduce((best, one) => (size(one) > size(best) ? one : best));
  return { ...least, fragility: { moves: found.length, smallest, largest } };
}

/** The least p that the margins allow, alone; undefined where it is not to be had cheaply. Arguments as above. */
export async function leastAttainableOf(
  table: Table,
  live: LiveTable,
  prepared: Prepared,
  options: PlanOptions,
): Promise<number | undefined> {
  const { plan, statistic, bound } = prepared;
  if (statistic.own || plan.method === 'asymptotic') return undefined;
  if (bound === null) return 1;
  return (await leastAttainable(table, live, prepared, askerFor(table, options))).leastAttainable;
}

type Ask = (counts: readonly (readonly number[])[]) => Promise<PValueEntry | null>;

/** Asks the question of a neighbouring table. */
function askerFor(table: Table, options: PlanOptions): Ask {
  const asked = withoutDraws(options);
  return (counts) => exactHeadline(makeTable({ ...table, counts }), { ...asked, method: 'exact' });
}

/** The same question, without what only drawing reads. */
const withoutDraws = (options: PlanOptions): PlanOptions =>
  Object.fromEntries(Object.entries(options).filter(([name]) => !drawOptions.includes(name)));

const drawOptions = ['draws', 'mostDraws', 'samplingRisk', 'relativeError', 'bootstrap'];

const isTwoByTwo = (live: LiveTable): boolean => live.rows === 2 && live.columns === 2;

type Place = readonly [row: number, column: number];

/** Every way to move one count to another live cell of its row or column. */
function neighbours(table: Table, { rowIndex, columnIndex }: LiveTable): { from: Place; to: Place }[] {
  return rowIndex.flatMap((i) =>
    columnIndex.flatMap((j) => {
      if (table.counts[i]![j] === 0) return [];
      const inRow = columnIndex.filter((k) => k !== j).map((k): Place => [i, k]);
      const inColumn = rowIndex.filter((k) => k !== i).map((k): Place => [k, j]);
      return [...inRow, ...inColumn].map((to) => ({ from: [i, j] as Place, to }));
    }),
  );
}

/** The p that was asked for, of another table; null where that table does not allow the question. */
async function exactHeadline(table: Table, options: PlanOptions): Promise<PValueEntry | null> {
  const live = liveTable(table);
  try {
    const { plan, bound } = makePlan(table, live, options);
    const questions = questionsOf(plan).slice(0, 1);
    const names = orderingsNeeded(questions);
    const { cuts, point } =
      bound === null
        ? onlyTable(live, names)
        : await exactCuts(
            live,
            names.map((name) => orderingFor(live, bound, name)),
            plan.forecast.engine as ExactEngine,
            plan.statistic,
          );
    return (await conditionalPValues(questions, cuts, point, plan.samplingConfidence))[0]!;
  } catch (thrown) {
    if (thrown instanceof Problem) return null;
    throw thrown;
  }
}

async function leastAttainable(
  table: Table,
  live: LiveTable,
  prepared: Prepared,
  ask: Ask,
): Promise<Pick<Fragile, 'leastAttainable'>> {
  const { plan } = prepared;
  const extremes = isTwoByTwo(live)
    ? cornerTables(live)
    : mostExtreme(live, prepared, orderingsOf(plan.tail, plan.twoSidedRule));
  const found = await Promise.all(extremes.map((counts) => ask(inWholeTable(table, live, counts))));
  const all = found.flatMap((entry) => (entry?.p === null || entry === null ? [] : [entry.p]));
  return all.length < extremes.length || all.length === 0 ? {} : { leastAttainable: Math.min(...all) };
}

/** Every ordering of a 2x2 table is most extreme at one end of what the margins allow. */
function cornerTables({ rowTotals, columnTotals, total }: LiveTable): number[][] {
  const [row, column] = [rowTotals[0]!, columnTotals[0]!];
  return [Math.max(0, row + column - total), Math.min(row, column)].map((k) => [
    k,
    row - k,
    column - k,
    total - row - column + k,
  ]);
}

/** For each ordering a table than which none is further out; none where there are too many to list. */
function mostExtreme(
  live: LiveTable,
  { plan, statistic, named, choices }: Prepared,
  names: readonly OrderingName[],
): ArrayLike<number>[] {
  const { tables, tablesAreCounted } = plan.forecast;
  if (!tablesAreCounted || tables > fewTables || names.some((name) => name === 'probability' || name === 'blaker'))
    return [];
  const roles = named ?? { groups: 'rows' as const, event: 0, first: 0 };
  return names.map((name) => {
    let best = live;
    const placeFrom = (counts: Float64Array): ((other: ArrayLike<number>) => number) => {
      best = { ...live, counts };
      const bound: BoundStatistic = statistic.bind(best, roles, choices);
      return orderingFor(best, bound, name).place;
    };
    let place = placeFrom(live.counts);
    const visit = (counts: ArrayLike<number>): 0 => {
      if (place(counts) === 1) place = placeFrom(Float64Array.from(counts));
      return 0;
    };
    exactByEnumeration(live, [{ name, place: visit }]);
    return best.counts;
  });
}

/** Counts of the live table put back among the empty lines. */
function inWholeTable({ counts }: Table, { rowIndex, columnIndex }: LiveTable, lively: ArrayLike<number>): number[][] {
  const whole = counts.map((row) => row.map(() => 0));
  rowIndex.forEach((row, i) => {
    columnIndex.forEach((column, j) => {
      whole[row]![column] = lively[i * columnIndex.length + j]!;
    });
  });
  return whole;
}
