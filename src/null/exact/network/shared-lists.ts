// Whether one list for all arrangements of a node pays, where the statistic allows it: from four rows on, if the
// arrangements where the halves meet are few enough to be visited one by one.
import type { OrientedTable } from './oriented-table.js';

/** Most nodes to visit where the halves meet. */
const mostArrangements = 4e5;
/** Longer totals are not worth counting: they have more arrangements. */
const largestTotal = 400;

export function sharesLists(table: OrientedTable): boolean {
  if (table.rows < 4 || table.total > largestTotal) return false;
  let ways = new Float64Array([1]);
  for (const total of table.rowTotals) {
    const next = new Float64Array(ways.length + total);
    ways.forEach((number, sum) => {
      for (let n = 0; n <= total; n++) next[sum + n]! += number;
    });
    ways = next;
  }
  return ways[table.total >> 1]! <= mostArrangements;
}
