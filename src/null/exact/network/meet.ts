// Where the halves meet. At every node the second half's list is completed, sorted and laid out for look-ups, and the first
// half's entries are made one after the other and looked up. Neither whole half is ever held: memory is that of the lists
// one column short of the meeting.
import { perTransition } from './costs.js';
import { gather, skipsHighValues, type Half } from './half.js';
import { MeetingList } from './meeting-list.js';
import type { NearTies } from './near-ties.js';
import type { Network } from './network.js';
import { Stream } from './stream.js';
import type { Tally } from './tally.js';
import { visitNodes } from './visit-nodes.js';

export function meet(network: Network, first: Half, second: Half, ties: NearTies, tally: Tally): void {
  const { encoding, bounds, space, side, margin, weights, farUp, list, transitions, meter } = network;
  const observed = encoding.observedValue;
  const lastFirst = network.columns[first.columns.at(-1)!]!;
  const lastSecond = network.columns[second.columns.at(-1)!]!;
  const firstLevel = first.levels.at(-1)!;
  const secondLevel = second.levels.at(-1)!;
  const allFirst = weights.completions(first.columns);
  const allSecond = weights.completions(second.columns);
  const undecidedOnly = skipsHighValues(network);
  const meeting = new MeetingList();
  const stream = new Stream(network, first, second, ties, tally, meeting);

  const addNode = (sums: Float64Array, left: Float64Array): void => {
    const mantissa = space.arrangementsOf(sums) * allFirst.mantissa(sums) * allSecond.mantissa(left);
    tally.summed.add(mantissa, allFirst.exponent(sums) + allSecond.exponent(left));
  };
  tally.leftOut += visitNodes(network, first.columns, second.columns, {
    above: addNode,
    open(sums, left, leastFirst, leastSecond) {
      const mostFirst = farUp ? bounds.most(first.columns, sums) : Infinity;
      const mostSecond = farUp ? bounds.most(second.columns, left) : Infinity;
      if (mostFirst + mostSecond < observed - margin) {
        if (side === 'low') addNode(sums, left);
        return;
      }
      const ways = space.arrangementsOf(sums);
      transitions.collect(secondLevel, lastSecond, left, undecidedOnly ? observed + margin - leastFirst : Infinity);
      const low = observed - margin;
      const high = observed + margin;
      const settled = gather(secondLevel, transitions, side, low - mostFirst, high - leastFirst, list);
      meter.spend(transitions.length * perTransition + list.gathered * list.unitsPerEntry);
      list.sortAndMerge();
      meeting.take(list, side, settled);
      transitions.collect(firstLevel, lastFirst, sums, undecidedOnly ? observed + margin - leastSecond : Infinity);
      meter.spend(transitions.length * perTransition);
      const whole = stream.run(transitions, sums, left, ways, low - mostSecond, high - leastSecond);
      tally.summed.add(whole * ways * allSecond.mantissa(left), allSecond.exponent(left));
    },
  });
}
