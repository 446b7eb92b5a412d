// Builds the lists of one half, column after column: each node's list is pulled together from the lists it can come from,
// cut to the values that are still undecided, sorted and merged.
import { Level, type SummedSide } from './level.js';
import { OutOfReach, type Network } from './network.js';
import { SortedList } from './sorted-list.js';
import { Transitions } from './transitions.js';

export interface Half {
  /** In the order in which they are set. */
  readonly columns: readonly number[];
  /** levels[d] holds the lists after d columns. */
  readonly levels: readonly Level[];
  /** Chance of the nodes left out as too improbable. */
  readonly leftOut: number;
}

/** @param depth how many of the columns to set; the others are set where the halves meet. */
export function buildHalf(network: Network, columns: readonly number[], depth: number): Half {
  const { side, encoding } = network;
  const levels = [Level.root(network.space.newIndex(), side, encoding.form === 'keyed')];
  let leftOut = 0;
  for (let d = 1; d <= depth; d++) {
    const { level, lost } = extend(network, levels[d - 1]!, columns.slice(0, d));
    levels.push(level);
    leftOut += lost;
    if (level.length > network.entryLimit) throw new OutOfReach(network.entryLimit);
  }
  return { columns, levels, leftOut };
}

function extend(network: Network, from: Level, done: readonly number[]): { level: Level; lost: number } {
  const { table, encoding, bounds, space, side, margin, allAlike } = network;
  const keyed = encoding.form === 'keyed';
  const column = network.columns[done.at(-1)!]!;
  const size = from.size + column.total;
  const rest = table.columnTotals.map((_, j) => j).filter((j) => !done.includes(j));
  const level = new Level(space.newIndex(), size, side, keyed);
  const list = new SortedList(keyed);
  const transitions = new Transitions(space);
  const allDone = network.weights.completions(done);
  const observed = encoding.observedValue;
  // What may follow at most, whatever the node: if even that leaves no value certainly below, no node needs its own bound.
  const mostAfter = bounds.most(rest, table.rowTotals);
  const left = new Float64Array(table.rows);

  const lost = space.visit(size, network.logFloor, (sums) => {
    for (let i = 0; i < table.rows; i++) left[i] = table.rowTotals[i]! - sums[i]!;
    const high = observed + margin - bounds.least(rest, table.total - size, left);
    if (bounds.least(done, size, sums) > high) {
      list.length = 0;
      if (side === 'high') level.append(space.numberOf(sums), list, allDone.value(sums));
      return;
    }
    const low =
      observed - margin - (mostAfter < observed ? (allAlike ? mostAfter : bounds.most(rest, left)) : Infinity);
    transitions.collect(from.index, column, sums);
    const settled = gather(from, transitions, side, low, high, list);
    list.sortAndMerge();
    if (list.length > 0 || settled > 0) level.append(space.numberOf(sums), list, settled);
  });
  return { level, lost };
}

/** Fills the list with the undecided entries; returns the weight that is settled on the summed side. */
export function gather(
  from: Level,
  transitions: Transitions,
  side: SummedSide,
  low: number,
  high: number,
  list: SortedList,
): number {
  const { starts, values, weights, keys, sums } = from;
  const keyed = keys.length > 0;
  list.length = 0;
  let settled = 0;
  for (let t = 0; t < transitions.length; t++) {
    const node = transitions.sources[t]!;
    const value = transitions.values[t]!;
    const weight = transitions.weights[t]!;
    const key = transitions.keys[t]!;
    const end = starts[node + 1]!;
    let i = starts[node]!;
    list.makeRoom(end - i);
    const { values: toValues, weights: toWeights, keys: toKeys } = list;
    let at = list.length;
    const least = low - value;
    const most = high - value;
    if (i < end && values[i]! < least) {
      do i++;
      while (i < end && values[i]! < least);
      if (side === 'low') settled += weight * (i < end ? sums[i]! : sums[end - 1]! + weights[end - 1]!);
    }
    for (; i < end; i++) {
      const v = values[i]!;
      if (v > most) break;
      toValues[at] = v + value;
      toWeights[at] = weights[i]! * weight;
      if (keyed) toKeys[at] = keys[i]! + key;
      at++;
    }
    list.length = at;
    if (side === 'high' && i < end) settled += weight * sums[i]!;
    settled += weight * from.settled[node]!;
  }
  return settled;
}
