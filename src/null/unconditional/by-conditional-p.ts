// Outcomes ordered by their conditional p (Boschloo 1970): the exact p given the number of events, one-tailed, or
// two-tailed by probability (Irwin 1935). Near ties are settled in whole numbers.
import { groupLaw, type GroupLaw } from './group-law.js';
import type { OutcomeSet, TwoGroupsSeen } from './outcomes.js';
import { WholeTails } from './whole-tails.js';

export type ConditionalDirection = 'upper' | 'lower' | 'probability';

/** Nearness in relative terms within which whole numbers decide; the sums are right to (5 n + 20) 2^-52. */
const near = 1e-10;

/** Outcomes whose conditional p is at most that of the one seen. O(firstSize x secondSize). */
export function setByConditionalP(seen: TwoGroupsSeen, direction: ConditionalDirection): OutcomeSet {
  const { firstSize, secondSize, firstEvents, secondEvents } = seen;
  const wholes = new WholeTails(firstSize, secondSize);
  const inside = new Uint8Array((firstSize + 1) * (secondSize + 1));
  const events = firstEvents + secondEvents;
  const width = secondSize + 1;
  const observed = tailsOf(groupLaw(firstSize, secondSize, events), events, direction, wholes);
  const target = observed.p[firstEvents - Math.max(0, events - secondSize)]!;
  const range = observed.ranges(firstEvents);
  for (let t = 0; t <= firstSize + secondSize; t++) {
    const law = groupLaw(firstSize, secondSize, t);
    const tails = tailsOf(law, t, direction, wholes);
    for (let x = law.lowest; x <= law.highest; x++) {
      const apart = tails.p[x - law.lowest]! - target;
      const belongs =
        Math.abs(apart) > near * target
          ? apart < 0
          : wholes.compare({ events: t, ...tails.ranges(x) }, { events, ...range }) <= 0;
      if (belongs) inside[x * width + t - x] = 1;
    }
  }
  return { firstSize, secondSize, inside };
}

/** The part of a law that a p adds up: all up to `low`, and all from `high` on. */
interface Ranges {
  readonly low: number;
  readonly high: number;
}

interface Tails {
  /** p[x1 - lowest]. */
  readonly p: Float64Array;
  ranges(x: number): Ranges;
}

function tailsOf(law: GroupLaw, events: number, direction: ConditionalDirection, wholes: WholeTails): Tails {
  if (direction === 'probability') return tailsByProbability(law, events, wholes);
  const { lowest, highest, weights, whole } = law;
  const p = new Float64Array(weights.length);
  let sum = 0;
  if (direction === 'lower') {
    for (let k = 0; k < weights.length; k++) p[k] = (sum += weights[k]!) / whole;
    return { p, ranges: (x) => ({ low: x, high: highest + 1 }) };
  }
  for (let k = weights.length - 1; k >= 0; k--) p[k] = (sum += weights[k]!) / whole;
  return { p, ranges: (x) => ({ low: lowest - 1, high: x }) };
}

/** The law rises to its mode and falls: from both ends inward, the less probable first; equal ones together. */
function tailsByProbability({ lowest, highest, weights, whole }: GroupLaw, events: number, wholes: WholeTails): Tails {
  const p = new Float64Array(weights.length);
  const low = new Int32Array(weights.length);
  const high = new Int32Array(weights.length);
  let sum = 0;
  let left = 0;
  let right = weights.length - 1;
  while (left <= right) {
    const [a, b] = [weights[left]!, weights[right]!];
    let order = left === right ? -1 : Math.sign(a - b);
    if (left < right && Math.abs(a - b) <= near * a)
      order = wholes.compareWeights(lowest + left, lowest + right, events);
    const [from, to] = [left, right];
    if (order <= 0) sum += weights[left++]!;
    if (order >= 0) sum += weights[right--]!;
    for (const k of order < 0 ? [from] : order > 0 ? [to] : [from, to]) {
      p[k] = sum / whole;
      low[k] = lowest + left - 1;
      high[k] = lowest + right + 1;
    }
  }
  // Everything is in: the whole law, as one tail.
  const ranges = (x: number): Ranges => {
    const k = x - lowest;
    return low[k]! + 1 >= high[k]! ? { low: highest, high: highest + 1 } : { low: low[k]!, high: high[k]! };
  };
  return { p, ranges };
}
