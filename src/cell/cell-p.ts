// The exact p of one cell: P(|adjusted residual| at least the observed), its count being hypergeometric given the margins
// (Fisher 1935). Within a cell that is the distance |n N - R C|, compared in whole numbers.
import type { Mass } from '../null/contract.js';
import { exactTwoByTwo } from '../null/exact/two-by-two.js';
import type { LiveTable } from '../table/live-table.js';
import { foldedCell, stepsOf } from './cell-law.js';

/** Stated bound on the relative error. */
export const cellPError = 1e-14;

/** Work of `cellPs` in the units of null/forecast.ts. */
export const forecastCellPs = (live: LiveTable): number =>
  [...distinctPlaces(live).values()].reduce((work, cell) => work + stepsOf(foldedCell(live, cell)) + 100, 0);

/** One for each cell, row-major over the live table; cells of one law at one distance share theirs to the last bit. */
export function cellPs(live: LiveTable): Mass[] {
  const found = new Map<string, Mass>();
  for (const [key, cell] of distinctPlaces(live)) found.set(key, cellP(live, cell));
  return Array.from(live.counts, (_, cell) => found.get(keyOf(live, cell))!);
}

function distinctPlaces(live: LiveTable): Map<string, number> {
  const places = new Map<string, number>();
  live.counts.forEach((_, cell) => places.set(keyOf(live, cell), cell));
  return places;
}

/** Law and distance. */
function keyOf(live: LiveTable, cell: number): string {
  const { row, column, total, sign, shift } = foldedCell(live, cell);
  const k = sign * live.counts[cell]! + shift;
  const apart = BigInt(k) * BigInt(total) - BigInt(row) * BigInt(column);
  return `${row},${column},${apart < 0n ? -apart : apart}`;
}

function cellP(live: LiveTable, cell: number): Mass {
  const { row, column, total, sign, shift } = foldedCell(live, cell);
  const k = sign * live.counts[cell]! + shift;
  const apart = (count: number): bigint => {
    const difference = BigInt(count) * BigInt(total) - BigInt(row) * BigInt(column);
    return difference < 0n ? -difference : difference;
  };
  const observed = apart(k);
  const answer = exactTwoByTwo(
    {
      rows: 2,
      columns: 2,
      counts: Float64Array.of(k, row - k, column - k, total - row - column + k),
      rowTotals: Float64Array.of(row, total - row),
      columnTotals: Float64Array.of(column, total - column),
      total,
      rowIndex: [0, 1],
      columnIndex: [0, 1],
    },
    [
      {
        name: 'distance',
        place: (counts) => {
          const other = apart(counts[0]!);
          return other > observed ? 1 : other < observed ? -1 : 0;
        },
      },
    ],
  );
  return answer.cuts[0]!.atLeast;
}
