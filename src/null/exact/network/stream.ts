// The first half's entries at one node, each finding by its own value how much of the second half's list ends on the summed
// side. The innermost loop of the engine: a few nanoseconds an entry.
import { perLookup } from './costs.js';
import type { Half } from './half.js';
import type { MeetingList } from './meeting-list.js';
import type { NearTies } from './near-ties.js';
import type { Network } from './network.js';
import type { Tally } from './tally.js';
import type { Transitions } from './transitions.js';

/** Entries added plainly before the sum is carried over to a compensated one. */
const blockLength = 64;

/** Runs the first half's entries at one node past the second half's list. */
export class Stream {
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
    this.network.meter.spend(work * perLookup);
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
        column: transitions.countsAt(t, level, this.network.columns[this.first.columns.at(-1)!]!, sums),
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
