// The tables that forecasts of exact work are held against: shapes from 2x5 to 6x8, totals from sparse to dense, margins nearly
// even and lopsided, each table drawn at random from its margins with a fixed seed; work from nothing to about half a second.
import { drawTables } from '../../src/draw-tables.js';
import { makeTable } from '../../src/table/table.js';
import { cornerTable, spreadTotals } from './margins.js';

const shapes: readonly (readonly [rows: number, columns: number, totals: readonly number[]])[] = [
  [2, 5, [40, 1000]],
  [2, 10, [100, 500, 1000]],
  [2, 20, [60, 200]],
  [3, 3, [60, 200, 3000]],
  [3, 5, [25, 100, 600]],
  [3, 8, [30, 60, 120]],
  [4, 4, [20, 60, 200, 400]],
  [4, 6, [25, 50, 100]],
  [5, 5, [25, 50]],
  [6, 6, [25, 50]],
  [6, 8, [30, 50]],
];
/** The largest of the margins over the smallest, less one. */
const tilts = [0.4, 6];

export interface ForecastTable {
  readonly name: string;
  readonly counts: readonly (readonly number[])[];
}

export const forecastTables: readonly ForecastTable[] = shapes.flatMap(([rows, columns, totals]) =>
  totals.flatMap((total) =>
    tilts.map((tilt) => {
      const name = `${rows} x ${columns} of ${total}, ${tilt < 1 ? 'even' : 'lopsided'}`;
      const counts = cornerTable(spreadTotals(total, rows, tilt), spreadTotals(total, columns, tilt));
      const [drawn] = drawTables(makeTable({ counts }), { number: 1, seed: name });
      return { name, counts: drawn! };
    }),
  ),
);
