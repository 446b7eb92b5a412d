// Carries the laws of one stage over to the next, move by move; where many moves lead to a node, in blocks, so that rounding
// errors grow with the square root of their number.
import type { Records } from './moves.js';
import type { SumLaw } from './node.js';

/** A move as a record: from, to, shift, mantissa, exponent. */
export const moveWidth = 5;

/** Up to so many moves to a node are added one after the other. */
const mostPlain = 100;

interface LawKind {
  many(lowest: ArrayLike<number>, highest: ArrayLike<number>): SumLaw[];
}

/**
 * @param ways moves to each node
 * @returns most additions that a value went through, each of which may round
 */
export function addMoves(
  kind: LawKind,
  sources: readonly SumLaw[],
  laws: readonly SumLaw[],
  moves: Records,
  ways: ArrayLike<number>,
): number {
  const { data, length } = moves;
  let mostWays = 0;
  for (let to = 0; to < laws.length; to++) mostWays = Math.max(mostWays, ways[to]!);
  const add = (into: SumLaw, at: number): void => {
    into.addShifted(sources[data[at]!]!, data[at + 2]!, data[at + 3]!, data[at + 4]!);
  };
  if (mostWays <= mostPlain) {
    for (let at = 0; at < length * moveWidth; at += moveWidth) add(laws[data[at + 1]!]!, at);
    return mostWays;
  }
  const block = Math.ceil(Math.sqrt(mostWays));
  const order = byDestination(moves, ways, laws.length);
  for (let next = 0; next < length;) {
    const to = data[order[next]! + 1]!;
    const law = laws[to]!;
    const end = next + ways[to]!;
    while (next < end) {
      const [part] = kind.many([law.lowest], [law.highest]);
      for (const stop = Math.min(end, next + block); next < stop; next++) add(part!, order[next]!);
      law.addShifted(part!, 0, 1, 0);
    }
  }
  return block + Math.ceil(mostWays / block);
}

/** Where the moves start in `data`, those to one node side by side, in the order in which they were made. */
function byDestination(moves: Records, ways: ArrayLike<number>, nodes: number): Float64Array {
  const next = new Float64Array(nodes);
  for (let to = 1; to < nodes; to++) next[to] = next[to - 1]! + ways[to - 1]!;
  const order = new Float64Array(moves.length);
  for (let at = 0; at < moves.length * moveWidth; at += moveWidth) order[next[moves.data[at + 1]!]!++] = at;
  return order;
}
