// Picks the exact engine for a table and hands on its answer.
import { hasOneTableOnly, type LiveTable } from '../../table/live-table.js';
import type { BracketCut, ExactCut, Ordering, OrderingName } from '../contract.js';
import { exactByEnumeration } from './enumerate.js';
import type { ExactAnswer } from './exact-answer.js';
import { linearStart } from './linear/costs.js';
import type { ExactEngine } from '../forecast.js';
import { Meter } from './meter.js';
import { networkStart } from './network/costs.js';
import { pointMass } from './point-mass.js';
import { exactWithinLimits } from './within-limits.js';
import { exactTwoByTwo } from './two-by-two.js';

/**
 * The larger engines are loaded when they are asked for: a 2x2 table waits for none of them.
 * At least two live rows and columns. `statistic` is the name of the one that the orderings came from.
 * @throws OutOfReach where the work outgrows memory or the meter's bound, or a bracket would tell less than draws.
 */
export async function exactCuts(
  live: LiveTable,
  orderings: readonly Ordering[],
  engine: ExactEngine,
  statistic: string,
  meter: Meter = new Meter(),
): Promise<ExactAnswer<ExactCut | BracketCut>> {
  switch (engine) {
    case 'two-by-two':
      return exactTwoByTwo(live, orderings);
    case 'linear': {
      const { exactLinear } = await import('./linear/exact-linear.js');
      meter.spend(linearStart);
      return { cuts: exactLinear(live, orderings, meter), point: pointMass(live) };
    }
    case 'network': {
      const { exactCut } = await import('./network/exact-cut.js');
      meter.spend(networkStart);
      return {
        cuts: orderings.map((ordering) => exactCut(live, ordering, statistic, { meter })),
        point: pointMass(live),
      };
    }
    case 'bracket': {
      const { bracketCut } = await import('./network/bracket-cut.js');
      return {
        cuts: orderings.map((ordering) => bracketCut(live, ordering, statistic, { meter })),
        point: pointMass(live),
      };
    }
    case 'within-limits':
      return { cuts: exactWithinLimits(live, orderings, meter), point: pointMass(live) };
    case 'enumeration':
      return exactByEnumeration(live, orderings, meter);
  }
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
