// From a grid of texts with labels to the Table: the part of reading that rows typed in and cross-table files share, so that
// both give the same table, the same refusals and the same notes. Places come from whoever read the text.
import { Problem } from '../problem/problem.js';
import type { Table, TableParts } from '../table/table.js';
import { makeTable } from '../table/table.js';
import type { BadCell } from './count-faults.js';
import { badCell, countProblem, mostListed } from './count-faults.js';
import type { CountOrigin } from './count-text.js';
import { isImpossibleText, parseCount } from './count-text.js';
import { checkLabels, labelsOf } from './grid-labels.js';
import type { LabelledCounts, OrderOptions, Side } from './level-order.js';
import { orderLevels } from './level-order.js';
import type { InputNote } from './read-table.js';
import type { TotalLines, TotalsRule, TotalsView } from './total-lines.js';
import {
  findTotals,
  keptTotalsNote,
  leaveOutTotals,
  noTotalsNote,
  onlyTotals,
  totalLineProblem,
} from './total-lines.js';

export interface GridOptions extends OrderOptions {
  /** One CSV record of labels, for data that brings none of its own. */
  readonly rowLabels?: string | undefined;
  readonly columnLabels?: string | undefined;
  /** What to do with rows and columns of totals; default `refuse`. */
  readonly totals?: TotalsRule | undefined;
}

export interface Grid {
  /** Texts of the counts; every row as long as the first. */
  readonly texts: readonly (readonly string[])[];
  /** Labels the data brings; undefined where a line has none, null when no line of the side has one. */
  readonly rowLabels: readonly (string | undefined)[] | null;
  readonly columnLabels: readonly (string | undefined)[] | null;
  readonly origin: CountOrigin;
  cellPlace(row: number, column: number): string;
  labelPlace(side: Side, index: number): string;
  /** Of the input as a whole; undefined for rows typed in. */
  readonly place: string | undefined;
}

export interface GridCounts {
  readonly counts: LabelledCounts;
  /** The same lines, in whatever order, with the cells that were written `-` marked as impossible. */
  marked(parts: LabelledCounts): TableParts;
  readonly totalsLeftOut: readonly Side[];
  readonly notes: readonly InputNote[];
}

export type GridTable = Omit<GridCounts, 'counts' | 'marked'> & { readonly table: Table };

export function tableFromGrid(grid: Grid, options: GridOptions): GridTable {
  const { counts, marked, ...facts } = countsFromGrid(grid, options);
  return { ...facts, table: placed(marked(orderLevels(counts, options)), grid.place) };
}

/** The same before the lines are put in order and the counts are checked as a whole. */
export function countsFromGrid(grid: Grid, options: GridOptions): GridCounts {
  const rule = options.totals ?? 'refuse';
  const view: TotalsView = {
    values: grid.texts.map((row) => row.map((text) => valueOf(text, grid.origin))),
    texts: grid.texts,
    rowLabels: labelsOf('row', grid.rowLabels, options.rowLabels, grid.texts.length),
    columnLabels: labelsOf('column', grid.columnLabels, options.columnLabels, grid.texts[0]?.length ?? 0),
  };
  const found = findTotals(view);
  const anyFound = found.rows.length + found.columns.length > 0;
  if (rule === 'refuse' && anyFound) throw totalLineProblem(found, view, firstTotalPlace(grid, found));
  const left: TotalLines = rule === 'drop' ? found : { rows: [], columns: [], by: 'label' };
  checkLabels('column', view.columnLabels, left.columns, (index) => grid.labelPlace('column', index));
  checkLabels('row', view.rowLabels, left.rows, (index) => grid.labelPlace('row', index));
  checkCounts(grid, view, left);
  const { counts, notes } = withoutTotals(view, left, grid.place);
  if (rule === 'keep' && anyFound) notes.push(keptTotalsNote(found, view));
  if (rule === 'drop' && !anyFound) notes.push(noTotalsNote);
  return {
    counts,
    marked: (parts) => withImpossible(parts, grid, view),
    totalsLeftOut: [
      ...(left.rows.length > 0 ? ['row' as const] : []),
      ...(left.columns.length > 0 ? ['column' as const] : []),
    ],
    notes,
  };
}

/** Cells written `-`, found again by their labels after lines were left out or put in order. */
function withImpossible(parts: LabelledCounts, grid: Grid, view: TotalsView): TableParts {
  if (!grid.texts.some((row) => row.some(isImpossibleText))) return parts;
  const impossible = parts.rowLabels.map((row) => {
    const texts = grid.texts[view.rowLabels.indexOf(row)];
    return parts.columnLabels.map((column) => isImpossibleText(texts?.[view.columnLabels.indexOf(column)] ?? ''));
  });
  return impossible.flat().includes(true) ? { ...parts, impossible } : parts;
}

const valueOf = (text: string, origin: CountOrigin): number | null => {
  if (isImpossibleText(text)) return 0;
  const count = parseCount(text, origin);
  return typeof count === 'number' ? count : null;
};

function withoutTotals(view: TotalsView, left: TotalLines, place: string | undefined) {
  if (left.rows.length + left.columns.length === 0) {
    const counts: LabelledCounts = { ...view, counts: view.values as readonly (readonly number[])[] };
    return { counts, notes: [] as InputNote[] };
  }
  if (left.rows.length === view.rowLabels.length || left.columns.length === view.columnLabels.length) {
    throw onlyTotals(view, place);
  }
  const { kept, notes } = leaveOutTotals(view, left);
  return { counts: kept, notes };
}

/** The table, with the input named as the place of a problem that has none of its own (no counts at all, overflow). */
export function placed(parts: TableParts, place: string | undefined): Table {
  try {
    return makeTable(parts);
  } catch (error) {
    if (!(error instanceof Problem) || error.place !== undefined || place === undefined) throw error;
    throw new Problem(error.kind, { code: error.code, message: error.message, place, hint: error.hint });
  }
}

const firstTotalPlace = (grid: Grid, found: TotalLines): string =>
  found.rows.length > 0 ? grid.labelPlace('row', found.rows[0]!) : grid.labelPlace('column', found.columns[0]!);

function checkCounts(grid: Grid, view: TotalsView, left: TotalLines): void {
  const bad: BadCell[] = [];
  let all = 0;
  grid.texts.forEach((row, i) => {
    if (left.rows.includes(i)) return;
    row.forEach((text, j) => {
      if (view.values[i]![j] !== null || left.columns.includes(j)) return;
      all++;
      // Finding a place walks the text, so it is done only for the cells that are listed.
      const cell = all > mostListed ? undefined : badCell(text, grid.origin, () => grid.cellPlace(i, j));
      if (cell !== undefined) bad.push(cell);
    });
  });
  if (all > 0) throw countProblem(bad, all, grid.place);
}
