// Where the halves meet. At every node the second half's list is completed, sorted and laid out for look-ups; the first
// half's entries are made one after the other and each finds, by its own value, how much of that list ends on the summed
// side. Neither whole half is ever held: memory is that of the lists one column short of the meeting.
import type { Half } from './half.js';
import { gather } from './half.js';
import { MeetingList } from './meeting-list.js';
import type { NearTies } from './near-ties.js';
import type { Network } from './network.js';
import { SortedList } from './sorted-list.js';
import type { Tally } from './tally.js';
import { Transitions } from './transitions.js';

/** Entries added plainly before the sum is carried over to a compensated one. */
const blockLength = 512;

export function meet(network: Network, first: Half, second: Half, ties: NearTies, tally: Tally): void {
  const { table, encoding, bounds, space, side, margin, weights, farUp } = network;
  const { rows, rowTotals, total } = table;
  const observed = encoding.observedValue;
  const lastFirst = network.columns[first.columns.at(-1)!]!;
  const lastSecond = network.columns[second.columns.at(-1)!]!;
  const firstLevel = first.levels.at(-1)!;
  const secondLevel = second.levels.at(-1)!;
  const size = firstLevel.size + lastFirst.total;
  const allFirst = weights.completions(first.columns);
  const allSecond = weights.completions(second.columns);
  // Upper bounds are worth their time only where the rest of a table can stay below the observed value.
  const list = new SortedList(encoding.form === 'keyed');
  const meeting = new MeetingList();
  const transitions = new Transitions(space);
  const left = new Float64Array(rows);
  const stream = new Stream(network, first, second, ties, tally, meeting);

  tally.leftOut += space.visit(size, network.logFloor, (sums) => {
    for (let i = 0; i < rows; i++) left[i] = rowTotals[i]! - sums[i]!;
    const ways = space.arrangementsOf(sums);
    const leastFirst = bounds.least(first.columns, size, sums);
    const leastSecond = bounds.least(second.columns, total - size, left);
    const addWhole = (weight: number): void => {
      tally.summed.add(weight * ways * allSecond.mantissa(left), allSecond.exponent(left));
    };
    const addNode = (): void => {
      tally.summed.add(
        ways * allFirst.mantissa(sums) * allSecond.mantissa(left),
        allFirst.exponent(sums) + allSecond.exponent(left),
      );
    };
    if (leastFirst + leastSecond > observed + margin) {
      if (side === 'high') addNode();
      return;
    }
    const mostFirst = farUp ? bounds.most(first.columns, sums) : Infinity;
    const mostSecond = farUp ? bounds.most(second.columns, left) : Infinity;
    if (mostFirst + mostSecond < observed - margin) {
      if (side === 'low') addNode();
      return;
    }
    transitions.collect(secondLevel.index, lastSecond, left);
    const settled = gather(
      secondLevel,
      transitions,
      side,
      observed - margin - mostFirst,
      observed + margin - leastFirst,
      list,
    );
    tally.work += list.length + transitions.length;
    list.sortAndMerge();
    meeting.take(list, side, settled);
    transitions.collect(firstLevel.index, lastFirst, sums);
    tally.work += transitions.length;
    addWhole(
      stream.run(transitions, sums, left, ways, observed - margin - mostSecond, observed + margin - leastSecond),
    );
  });
}

/** Runs the first half's entries at one node past the second half's list. */
class Stream {
  private nearTied = 0;
  private nearSummed = 0;

  constructor(
    private readonly network: Network,
    private readonly first: Half,
    private readonly second: Half,
    private readonly ties: NearTies,
    private readonly tally: Tally,
    private readonly meeting: MeetingList,
  ) {}

  /** Adds to the tally; returns the weight of first-half entries that are on the summed side whatever follows. */
  run(
    transitions: Transitions,
    sums: Float64Array,
    left: Float64Array,
    ways: number,
    low: number,
    high: number,
  ): number {
    const { encoding, side } = this.network;
    const level = this.first.levels.at(-1)!;
    const { meeting } = this;
    const { values, weights, starts: nodeStarts } = level;
    const { values: meetingValues, sums: meetingSums, starts, least, scale, length } = meeting;
    const { slack } = encoding;
    const greatest = length > 0 ? meetingValues[length - 1]! : 0;
    let settled = 0;
    let tied = 0;
    let summed = 0;
    let lost = 0;
    let work = 0;
    for (let t = 0; t < transitions.length; t++) {
      const node = transitions.sources[t]!;
      const value = transitions.values[t]!;
      const weight = transitions.weights[t]!;
      const target = encoding.observedValue - value;
      const most = high - value;
      const end = nodeStarts[node + 1]!;
      let i = nodeStarts[node]!;
      if (i < end && values[i]! < low - value) {
        do i++;
        while (i < end && values[i]! < low - value);
        if (side === 'low') settled += weight * (i < end ? level.sums[i]! : level.sums[end - 1]! + weights[end - 1]!);
      }
      const begin = i;
      while (i < end) {
        const stop = Math.min(end, i + blockLength);
        let block = 0;
        for (; i < stop; i++) {
          const v = values[i]!;
          if (v > most) break;
          const threshold = target - v - slack;
          let at = threshold <= least ? 0 : threshold > greatest ? length : starts[((threshold - least) * scale) | 0]!;
          while (meetingValues[at]! < threshold) at++;
          if (meetingValues[at]! <= threshold + 2 * slack) {
            const after = this.near(transitions, t, i, at, threshold + 2 * slack, sums, left);
            tied += weight * this.nearTied;
            block += this.nearSummed;
            if (side === 'high') at = after;
          }
          block += weights[i]! * meetingSums[at]!;
        }
        const next = weight * block - lost;
        const carried = summed + next;
        lost = carried - summed - next;
        summed = carried;
        if (i < stop) break;
      }
      work += i - begin;
      if (side === 'high' && i < end) settled += weight * level.sums[i]!;
      settled += weight * level.settled[node]!;
    }
    this.tally.work += work;
    this.tally.summed.add(summed * ways, 0);
    this.tally.tied.add(tied * ways, 0);
    return settled;
  }

  /** Decides the entries from `at` on that are level with the observed value; returns the first that is not. */
  private near(
    transitions: Transitions,
    t: number,
    entry: number,
    from: number,
    most: number,
    sums: Float64Array,
    left: Float64Array,
  ): number {
    const { encoding, side } = this.network;
    const { meeting } = this;
    const level = this.first.levels.at(-1)!;
    let at = from;
    this.nearTied = 0;
    this.nearSummed = 0;
    for (; meeting.values[at]! <= most; at++) {
      if (
        encoding.form === 'exact' ||
        (encoding.form === 'keyed' &&
          level.keys[entry]! + transitions.keys[t]! + meeting.keys[at]! === encoding.observedKey)
      ) {
        this.nearTied += level.weights[entry]! * meeting.weights[at]!;
        continue;
      }
      const masses = this.ties.decide(this.first, this.second, {
        column: transitions.countsAt(t, level.index, this.network.columns[this.first.columns.at(-1)!]!, sums),
        value: level.values[entry]!,
        key: encoding.keys === null ? 0 : level.keys[entry]!,
        sums,
        otherValue: meeting.values[at]!,
        otherKey: encoding.keys === null ? 0 : meeting.keys[at]!,
        otherSums: left,
      });
      this.nearTied += masses.tied;
      this.nearSummed += side === 'low' ? masses.low : masses.high;
    }
    return at;
  }
}
