// The least p that the margins of a table allow, for results that do not say it: the p of its most extreme tables.
import { leastAttainableOf } from './one-count-moved.js';
import { makePlan } from './plan/make-plan.js';
import type { PlanOptions } from './plan/plan.js';
import { Problem } from './problem/problem.js';
import { liveTable } from './table/live-table.js';
import { makeTable, type TableParts } from './table/table.js';

/**
 * @param wishes those of the result, as its line or record holds them.
 * @returns null where it is not known: a p that is not exact given both margins, or too many tables to list.
 */
export async function reachOf(parts: TableParts, wishes: PlanOptions): Promise<number | null> {
  if (wishes.paired) return null;
  try {
    const table = makeTable(parts);
    const live = liveTable(table);
    const prepared = makePlan(table, live, wishes);
    if (prepared.design !== 'conditional') return null;
    return (await leastAttainableOf(table, live, prepared, wishes)) ?? null;
  } catch (thrown) {
    if (thrown instanceof Problem) return null;
    throw thrown;
  }
}
