// Tables for tests: arbitrary small ones, and shorthand for binding statistics to them.
import fc from 'fast-check';
import type { Ordering, OrderingName } from '../../src/null/contract.js';
import { orderingFor } from '../../src/null/ordering.js';
import { statisticNamed } from '../../src/statistic/registry.js';
import type { BoundStatistic, Roles } from '../../src/statistic/contract.js';
import { liveTable, type LiveTable } from '../../src/table/live-table.js';
import { makeTable } from '../../src/table/table.js';

export const rowsFirst: Roles = { groups: 'rows', event: 0, first: 0 };

export const liveFrom = (counts: number[][]): LiveTable => liveTable(makeTable({ counts }));

/** The statistic bound to a table, rows as groups. */
export const boundTo = (live: LiveTable, statistic: string): BoundStatistic =>
  statisticNamed(statistic).bind(live, rowsFirst);

export function orderingOf(live: LiveTable, statistic: string, name: OrderingName, roles = rowsFirst): Ordering {
  return orderingFor(live, statisticNamed(statistic).bind(live, roles), name);
}

export interface Shape {
  readonly rows: [number, number];
  readonly columns: [number, number];
  /** Largest count of a cell. */
  readonly largest: number;
}

/** Tables of a range of shapes without empty lines; small counts make ties and zeros frequent. */
export const tableOf = ({ rows, columns, largest }: Shape): fc.Arbitrary<number[][]> =>
  fc
    .tuple(fc.integer({ min: rows[0], max: rows[1] }), fc.integer({ min: columns[0], max: columns[1] }))
    .chain(([r, c]) =>
      fc.array(fc.array(fc.integer({ min: 0, max: largest }), { minLength: c, maxLength: c }), {
        minLength: r,
        maxLength: r,
      }),
    )
    .filter(
      (table) =>
        table.every((row) => row.some((n) => n > 0)) && transpose(table).every((column) => column.some((n) => n > 0)),
    );

export const twoByTwoTable = tableOf({ rows: [2, 2], columns: [2, 2], largest: 14 });
export const smallTable = fc.oneof(
  tableOf({ rows: [2, 4], columns: [2, 3], largest: 3 }),
  tableOf({ rows: [2, 2], columns: [2, 5], largest: 5 }),
  tableOf({ rows: [3, 3], columns: [3, 3], largest: 2 }),
);

export const transpose = (table: readonly (readonly number[])[]): number[][] =>
  table[0]!.map((_, j) => table.map((row) => row[j]!));

/** |a - b| relative to b; 0 when both are 0. */
export const relativeDifference = (a: number, b: number): number =>
  a === b ? 0 : b === 0 ? Infinity : Math.abs(a - b) / Math.abs(b);
