// Builds the lists of one half, column after column: each node's list is pulled together from the lists it can come from,
// cut to the values that are still undecided, sorted and merged.
import { OutOfReach } from '../out-of-reach.js';
import { perTransition } from './costs.js';
import { GridList } from './grid-list.js';
import { Level, type SummedSide } from './level.js';
import type { Network } from './network.js';
import type { SortedList } from './sorted-list.js';
import { SourceRanges } from './source-ranges.js';
import type { Transitions } from './transitions.js';
import { visitNodes } from './visit-nodes.js';

export interface Half {
  /** In the order in which they are set. */
  readonly columns: readonly number[];
  /** levels[d] holds the lists after d columns. */
  readonly levels: readonly Level[];
  /** Chance of the nodes left out as too improbable. */
  readonly leftOut: number;
  /** List entries held. */
  readonly entries: number;
}

/**
 * @param depth how many of the columns to set; the others are set where the halves meet.
 * @param held list entries held already
 */
export function buildHalf(network: Network, columns: readonly number[], depth: number, held: number): Half {
  const { side, encoding, space } = network;
  const levels = [Level.root(space, side, encoding.form === 'keyed')];
  let leftOut = 0;
  let entries = 0;
  for (let d = 1; d <= depth; d++) {
    const level = new Level(
      space.newIndex(),
      new SourceRanges(space),
      levels[d - 1]!.size,
      side,
      encoding.form === 'keyed',
    );
    leftOut += extend(network, levels[d - 1]!, level, columns.slice(0, d), held + entries);
    levels.push(level);
    entries += level.length;
  }
  return { columns, levels, leftOut, entries };
}

/** Fills the level after one more column; returns the chance left out. */
function extend(network: Network, from: Level, to: Level, done: readonly number[], held: number): number {
  const { table, encoding, bounds, space, side, margin, allAlike, farUp, list, transitions, entryLimit, meter } =
    network;
  const column = network.columns[done.at(-1)!]!;
  to.size += column.total;
  const rest = table.columnTotals.map((_, j) => j).filter((j) => !done.includes(j));
  const allDone = network.weights.completions(done);
  const observed = encoding.observedValue;
  const undecidedOnly = skipsHighValues(network);
  // Lists shared by all arrangements need a bound that holds for each.
  const mostAfter = allAlike && farUp ? bounds.most(rest, table.rowTotals) : Infinity;
  return visitNodes(network, done, rest, {
    above(sums) {
      list.length = 0;
      to.append(sums, space.numberOf(sums), list, allDone.value(sums));
    },
    open(sums, left, _, leastAfter) {
      const low = observed - margin - (farUp && !allAlike ? bounds.most(rest, left) : mostAfter);
      const high = observed + margin - leastAfter;
      transitions.collect(from, column, sums, undecidedOnly ? high : Infinity);
      const settled = gather(from, transitions, side, low, high, list);
      meter.spend(transitions.length * perTransition + list.gathered * list.unitsPerEntry);
      list.sortAndMerge();
      if (list.length > 0 || settled > 0) to.append(sums, space.numberOf(sums), list, settled);
      if (held + to.length > entryLimit) throw new OutOfReach('memory', entryLimit);
    },
  });
}

/**
 * Whether values that are certainly above the observed one may be passed over: they may not where the high side is added
 * up, nor where a node can hold weight that is settled on the low side.
 */
export const skipsHighValues = ({ side, farUp }: Network): boolean => side === 'low' && !farUp;

/** Fills the list with the undecided entries; returns the weight that is settled on the summed side. */
export function gather(
  from: Level,
  transitions: Transitions,
  side: SummedSide,
  low: number,
  high: number,
  list: SortedList,
): number {
  const { starts, values, weights, sums } = from;
  if (list instanceof GridList) list.foresee(from, transitions);
  list.clear(high);
  let settled = 0;
  let gathered = 0;
  for (let t = 0; t < transitions.length; t++) {
    const node = transitions.sources[t]!;
    const end = starts[node + 1]!;
    let i = starts[node]!;
    const least = low - transitions.values[t]!;
    if (i < end && values[i]! < least) {
      do i++;
      while (i < end && values[i]! < least);
      if (side === 'low') {
        settled += transitions.weights[t]! * (i < end ? sums[i]! : sums[end - 1]! + weights[end - 1]!);
      }
    }
    gathered -= i;
    i = list.addShifted(from, i, end, transitions, t);
    gathered += i;
    if (side === 'high' && i < end) settled += transitions.weights[t]! * sums[i]!;
    settled += transitions.weights[t]! * from.settled[node]!;
  }
  list.gathered = gathered;
  return settled;
}
