// Where the halves meet when lists do not depend on the order of rows: both halves are complete, one list for every
// arrangement of a node, and each arrangement is one pass along two sorted lists.
import { perLookup } from './costs.js';
import type { Half } from './half.js';
import type { NearTies } from './near-ties.js';
import { NodeSpace } from './node-space.js';
import { visitAll } from './visit-nodes.js';
import type { Network } from './network.js';
import type { Tally } from './tally.js';

export function meetAlike(network: Network, first: Half, second: Half, ties: NearTies, tally: Tally): void {
  const { table, space, weights } = network;
  const firstLevel = first.levels.at(-1)!;
  const secondLevel = second.levels.at(-1)!;
  const allSecond = weights.completions(second.columns);
  // Every arrangement of the halves' nodes is visited, but for rows of equal total; bounds were used when lists were made.
  visitAll(new NodeSpace(table, false), firstLevel.size, (sums, left, ways) => {
    const a = firstLevel.index.get(space.numberOf(sums));
    if (a < 0) return;
    const b = secondLevel.index.get(space.numberOf(left));
    const settled = firstLevel.settled[a]!;
    if (settled > 0) tally.summed.add(settled * ways * allSecond.mantissa(left), allSecond.exponent(left));
    if (b < 0) return;
    join(network, [first, second], [a, b], sums, left, ways, ties, tally);
  });
}

/** One node: as the first list rises, the place of the threshold in the second falls. */
function join(
  network: Network,
  halves: readonly [first: Half, second: Half],
  nodes: readonly [first: number, second: number],
  sums: Float64Array,
  left: Float64Array,
  ways: number,
  ties: NearTies,
  tally: Tally,
): void {
  const { encoding, side, meter } = network;
  const { slack, observedValue, observedKey } = encoding;
  const [a, b] = [halves[0].levels.at(-1)!, halves[1].levels.at(-1)!];
  const end = a.starts[nodes[0] + 1]!;
  const otherStart = b.starts[nodes[1]]!;
  const otherEnd = b.starts[nodes[1] + 1]!;
  const settled = b.settled[nodes[1]]!;
  const whole = side === 'low' && otherEnd > otherStart ? b.sums[otherEnd - 1]! + b.weights[otherEnd - 1]! : 0;
  let at = otherEnd;
  let summed = 0;
  let tied = 0;
  let lost = 0;
  const first = a.starts[nodes[0]]!;
  for (let i = first; i < end; i++) {
    const threshold = observedValue - a.values[i]! - slack;
    while (at > otherStart && b.values[at - 1]! >= threshold) at--;
    let after = at;
    for (; after < otherEnd && b.values[after]! <= threshold + 2 * slack; after++) {
      if (encoding.form === 'exact' || a.keys[i]! + b.keys[after]! === observedKey) {
        tied += a.weights[i]! * b.weights[after]!;
        continue;
      }
      const masses = ties.decide(halves[0], halves[1], {
        value: a.values[i]!,
        key: a.keys[i]!,
        column: null,
        sums,
        otherValue: b.values[after]!,
        otherKey: b.keys[after]!,
        otherSums: left,
      });
      tied += masses.tied;
      summed += side === 'low' ? masses.low : masses.high;
    }
    const place = side === 'low' ? at : after;
    const weight = settled + (place < otherEnd ? b.sums[place]! : whole);
    const next = a.weights[i]! * weight - lost;
    const carried = summed + next;
    lost = carried - summed - next;
    summed = carried;
  }
  meter.spend((end - first + otherEnd - otherStart) * perLookup);
  tally.summed.add(summed * ways, 0);
  tally.tied.add(tied * ways, 0);
}
