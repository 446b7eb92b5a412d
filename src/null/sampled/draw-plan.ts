// How the tables of one pair of margins are drawn: which way round, in which order, and by which sampler each row and cell.
// Chosen by a forecast of counted work from the margins alone, never by the clock, because the choice decides the digits.
import type { LiveTable } from '../../table/live-table.js';
import { CellPlanner, cellSamplers, type CellPlan } from './cell-plan.js';
import { bagUnits } from './limits.js';

/** The ways to draw: a row unit by unit, or a cell from its conditional law by one of four. */
export const samplers = ['labels', ...cellSamplers] as const;
export type Sampler = (typeof samplers)[number];

export interface DrawPlan {
  /** Rows and columns of the drawing, smallest first; the last ones take what is left. */
  readonly rowTotals: readonly number[];
  readonly columnTotals: readonly number[];
  readonly total: number;
  /** Where cell (i, j) of the drawing lies in the live table: positions[i * columns + j]. */
  readonly positions: readonly number[];
  /** So many first rows are drawn unit by unit. */
  readonly labelRows: number;
  /** For each later row but the last, its cells but the last. */
  readonly cells: readonly (readonly CellPlan[])[];
  /** Forecast for one table, in units of about a nanosecond. */
  readonly work: number;
}

/** For tests: bends the choice, so that every sampler and every switch between samplers can be put to the proof. */
export interface Forced {
  /** The sampler to use wherever it can be used at all. */
  readonly prefer?: Sampler;
  /** How many deviations the look-up tables reach; beyond them other samplers take over. */
  readonly reach?: number;
}

/** What a row takes beside its cells. */
const perRow = 5;

export function planDraws(live: LiveTable, forced: Forced = {}): DrawPlan {
  const upright = planOneWay(live, false, forced);
  const turned = planOneWay(live, true, forced);
  return turned.work + perRow * turned.rowTotals.length < upright.work + perRow * upright.rowTotals.length
    ? turned
    : upright;
}

function planOneWay(live: LiveTable, turned: boolean, forced: Forced): DrawPlan {
  const [rowsOf, columnsOf] = turned ? [live.columnTotals, live.rowTotals] : [live.rowTotals, live.columnTotals];
  const rowOrder = ascending(rowsOf);
  const columnOrder = ascending(columnsOf);
  const rowTotals = rowOrder.map((i) => rowsOf[i]!);
  const columnTotals = columnOrder.map((j) => columnsOf[j]!);
  const positions = rowOrder.flatMap((i) =>
    columnOrder.map((j) => (turned ? j * live.columns + i : i * live.columns + j)),
  );
  return { rowTotals, columnTotals, total: live.total, positions, ...planRows(rowTotals, columnTotals, forced) };
}

/** Indexes by rising total; equal totals keep their order. */
const ascending = (totals: Float64Array): number[] =>
  Array.from(totals.keys()).sort((a, b) => totals[a]! - totals[b]! || a - b);

/** Label rows come first, where rows are smallest; how many is settled by the forecast. */
function planRows(
  rowTotals: readonly number[],
  columnTotals: readonly number[],
  { prefer, reach }: Forced,
): Pick<DrawPlan, 'labelRows' | 'cells' | 'work'> {
  const rows = rowTotals.length - 1;
  const planFrom = (first: number): CellPlan[][] =>
    new CellPlanner(rowTotals, columnTotals, prefer, reach).planRows(first);
  const allCells = prefer === 'labels' ? [] : planFrom(0);
  let labelRows = prefer === 'labels' ? rows : 0;
  if (prefer === undefined) {
    let rest = workOf(allCells);
    let least = rest;
    for (let i = 0; i < rows; i++) {
      rest -= workOf([allCells[i]!]);
      if (labelWork(rowTotals, i + 1) + rest < least) {
        labelRows = i + 1;
        least = labelWork(rowTotals, labelRows) + rest;
      }
    }
  }
  const cells = labelRows === 0 ? allCells : planFrom(labelRows);
  return { labelRows, cells, work: labelWork(rowTotals, labelRows) + workOf(cells) };
}

const workOf = (cells: readonly (readonly CellPlan[])[]): number =>
  cells.flat().reduce((sum, cell) => sum + cell.work, 0);

/** Nanoseconds as in the plans of cells: a unit from the bag, a unit searched for, the copy of the bag. */
function labelWork(rowTotals: readonly number[], labelRows: number): number {
  if (labelRows === 0) return 0;
  const total = rowTotals.reduce((sum, row) => sum + row, 0);
  const units = rowTotals.slice(0, labelRows).reduce((sum, row) => sum + row, 0);
  return total <= bagUnits ? total / 4 + 5 * units : 20 * units;
}
