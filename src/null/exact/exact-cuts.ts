// Picks the exact engine for a table and hands on its answer.
import { hasOneTableOnly, type LiveTable } from '../../table/live-table.js';
import type { Ordering, OrderingName } from '../contract.js';
import { exactByEnumeration } from './enumerate.js';
import type { ExactAnswer } from './exact-answer.js';
import { exactLinear } from './linear/exact-linear.js';
import { linearIsCheaper } from './linear/linear-forecast.js';
import { pointMass } from './point-mass.js';
import { exactTwoByTwo } from './two-by-two.js';

/** At least two live rows and columns. */
export function exactCuts(live: LiveTable, orderings: readonly Ordering[]): ExactAnswer {
  const linear = orderings[0]?.linear;
  if (
    linear !== undefined &&
    orderings.every((ordering) => ordering.linear === linear) &&
    linearIsCheaper(live, linear)
  ) {
    return { cuts: exactLinear(live, orderings), point: pointMass(live) };
  }
  const twoByTwo = live.rows === 2 && live.columns === 2 && orderings.every(({ arbitrary }) => arbitrary !== true);
  return twoByTwo ? exactTwoByTwo(live, orderings) : exactByEnumeration(live, orderings);
}

/** The answer where the margins leave one table only: it ties with itself, and p = 1 on every ordering. */
export function onlyTable(live: LiveTable, names: readonly OrderingName[]): ExactAnswer {
  if (!hasOneTableOnly(live)) throw new Error('these margins allow more than one table');
  const none = { value: 0, log10: -Infinity };
  const all = { value: 1, log10: 0 };
  return {
    cuts: names.map((ordering) => ({
      kind: 'exact',
      ordering,
      below: none,
      tied: all,
      above: none,
      atLeast: all,
      relativeError: 0,
    })),
    point: all,
    tables: 1,
  };
}
