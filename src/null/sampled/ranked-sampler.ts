// The same draws as any sampler's, judged in one more way: each count of each cell has a rank, and a table counts under the
// smallest rank of its cells. One look-up a cell.
import type { UniformSource } from '../../random/stream.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Ordering } from '../contract.js';
import { planDraws } from './draw-plan.js';
import { panelFor } from './judges.js';
import type { Sampler, Tally } from './sample-cuts.js';
import { TableDrawer } from './table-drawer.js';

/** Ranks of one cell's counts from `lowest`; any other count has rank 0. */
export interface CellRanks {
  readonly lowest: number;
  readonly ranks: Uint16Array;
}

export interface RankTable {
  /** Row-major over the live table. */
  readonly cells: readonly CellRanks[];
  /** Ranks are below this. */
  readonly ranks: number;
}

/** Tallies are those of the orderings, then how many tables fell to each rank, three ranks to a tally (see `rankCounts`). */
export function prepareRankedSampler(live: LiveTable, orderings: readonly Ordering[], table: RankTable): Sampler {
  const plan = planDraws(live);
  const drawer = new TableDrawer(plan);
  const { judges, assigned } = panelFor(live, orderings, plan);
  const drawn = drawer.newTable();
  const cells = plan.positions.length;
  const inOrder = Array.from(plan.positions, (position) => table.cells[position]!);
  const lowest = Float64Array.from(inOrder, (cell) => cell.lowest);
  const sizes = Float64Array.from(inOrder, ({ ranks }) => ranks.length);
  const { starts, all } = joined(inOrder);
  const rankOf = (): number => {
    let least = table.ranks;
    for (let cell = 0; cell < cells; cell++) {
      const k = drawn[cell]! - lowest[cell]!;
      const rank = k >= 0 && k < sizes[cell]! ? all[starts[cell]! + k]! : 0;
      if (rank < least) least = rank;
    }
    return least;
  };
  return {
    countBlock(stream: UniformSource, draws: number): Tally[] {
      const counts = new Float64Array(3 * judges.length);
      const byRank = new Float64Array(3 * Math.ceil((table.ranks + 1) / 3));
      for (let draw = 0; draw < draws; draw++) {
        drawer.draw(stream, drawn);
        for (let k = 0; k < judges.length; k++) counts[3 * k + 1 + judges[k]!.place(drawn)]!++;
        byRank[rankOf()]!++;
      }
      const tallies = assigned.map(({ judge, direction }): Tally => {
        const tied = 3 * judge + 1;
        return [counts[tied - direction]!, counts[tied]!, counts[tied + direction]!];
      });
      for (let k = 0; k < byRank.length; k += 3) tallies.push([byRank[k]!, byRank[k + 1]!, byRank[k + 2]!]);
      return tallies;
    },
    drawTable(stream, into) {
      drawer.draw(stream, drawn);
      drawer.arrange(drawn, into);
    },
  };
}

/** Draws of each rank, the last entry for tables of none, from the tallies that follow those of the orderings. */
export const rankCounts = (tallies: readonly Tally[], orderings: number): number[] => tallies.slice(orderings).flat();

/** All ranks in one array, equal ones stored once. */
function joined(cells: readonly CellRanks[]): { starts: Int32Array; all: Uint16Array } {
  const places = new Map<Uint16Array, number>();
  let length = 0;
  for (const { ranks } of cells) {
    if (places.has(ranks)) continue;
    places.set(ranks, length);
    length += ranks.length;
  }
  const all = new Uint16Array(length);
  places.forEach((start, ranks) => all.set(ranks, start));
  return { starts: Int32Array.from(cells, ({ ranks }) => places.get(ranks)!), all };
}
