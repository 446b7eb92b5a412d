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

/** @param prefer for tests: use this sampler wherever it can be used at all. */
export function planDraws(live: LiveTable, prefer?: Sampler): DrawPlan {
  const upright = planOneWay(live, false, prefer);
  const turned = planOneWay(live, true, prefer);
  return turned.work < upright.work ? turned : upright;
}

function planOneWay(live: LiveTable, turned: boolean, prefer: Sampler | undefined): DrawPlan {
  const [rowsOf, columnsOf] = turned ? [live.columnTotals, live.rowTotals] : [live.rowTotals, live.columnTotals];
  const rowOrder = ascending(rowsOf);
  const columnOrder = ascending(columnsOf);
  const rowTotals = rowOrder.map((i) => rowsOf[i]!);
  const columnTotals = columnOrder.map((j) => columnsOf[j]!);
  const positions = rowOrder.flatMap((i) =>
    columnOrder.map((j) => (turned ? j * live.columns + i : i * live.columns + j)),
  );
  return { rowTotals, columnTotals, total: live.total, positions, ...planRows(rowTotals, columnTotals, prefer) };
}

/** Indexes by rising total; equal totals keep their order. */
const ascending = (totals: Float64Array): number[] =>
  Array.from(totals.keys()).sort((a, b) => totals[a]! - totals[b]! || a - b);

/** Label rows come first, where rows are smallest; how many is settled by the forecast. */
function planRows(
  rowTotals: readonly number[],
  columnTotals: readonly number[],
  prefer: Sampler | undefined,
): Pick<DrawPlan, 'labelRows' | 'cells' | 'work'> {
  const most = rowTotals.length - 1;
  if (prefer === 'labels') return { labelRows: most, cells: [], work: labelWork(rowTotals, most) };
  let best: ReturnType<typeof planRows> | undefined;
  for (let labelRows = 0; labelRows <= (prefer === undefined ? most : 0); labelRows++) {
    const labels = labelWork(rowTotals, labelRows);
    if (best !== undefined && labels >= best.work) break;
    const cells = new CellPlanner(rowTotals, columnTotals, prefer).planRows(labelRows);
    const work = labels + cells.flat().reduce((sum, cell) => sum + cell.work, 0);
    if (best === undefined || work < best.work) best = { labelRows, cells, work };
  }
  return best!;
}

function labelWork(rowTotals: readonly number[], labelRows: number): number {
  if (labelRows === 0) return 0;
  const total = rowTotals.reduce((sum, row) => sum + row, 0);
  const units = rowTotals.slice(0, labelRows).reduce((sum, row) => sum + row, 0);
  return total <= bagUnits ? total / 4 + 5 * units : 20 * units;
}
