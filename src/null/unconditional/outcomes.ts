// Two independent groups of fixed size, each unit with or without the event (two binomials): the outcomes that can arise,
// and the set of those at least as extreme as the observed one.
import type { TwoByTwoCounts } from './two-by-two-counts.js';

/** Events in the first and second group, of so many units each. */
export interface TwoGroupsSeen {
  readonly firstSize: number;
  readonly secondSize: number;
  readonly firstEvents: number;
  readonly secondEvents: number;
}

/** inside[x1 * (secondSize + 1) + x2] is 1 where the outcome (x1, x2) is at least as extreme as the observed one. */
export interface OutcomeSet {
  readonly firstSize: number;
  readonly secondSize: number;
  readonly inside: Uint8Array;
}

export function groupsSeen({ cells, groups, event, first }: TwoByTwoCounts): TwoGroupsSeen {
  const count = (group: number, level: number): number =>
    groups === 'rows' ? cells[group]![level]! : cells[level]![group]!;
  const second = 1 - first;
  return {
    firstSize: count(first, 0) + count(first, 1),
    secondSize: count(second, 0) + count(second, 1),
    firstEvents: count(first, event),
    secondEvents: count(second, event),
  };
}

/** The set of outcomes for which `holds` is true; the observed one always belongs to it. */
export function outcomesWhere(seen: TwoGroupsSeen, holds: (x1: number, x2: number) => boolean): OutcomeSet {
  const { firstSize, secondSize } = seen;
  const inside = new Uint8Array((firstSize + 1) * (secondSize + 1));
  let at = 0;
  for (let x1 = 0; x1 <= firstSize; x1++) {
    for (let x2 = 0; x2 <= secondSize; x2++) inside[at++] = holds(x1, x2) ? 1 : 0;
  }
  inside[seen.firstEvents * (secondSize + 1) + seen.secondEvents] = 1;
  return { firstSize, secondSize, inside };
}
