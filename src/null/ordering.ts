// Turns a bound statistic into orderings of tables: what "at least as extreme as observed" means, decided exactly.
import type { BoundStatistic, CellSum, Place } from '../statistic/contract.js';
import { sumOverCells } from '../statistic/expected.js';
import { probability } from '../statistic/probability.js';
import type { LiveTable } from '../table/live-table.js';
import type { Ordering, OrderingName } from './contract.js';

/** @throws Error when the statistic has no such ordering; plans exclude that. */
export function orderingFor(live: LiveTable, bound: BoundStatistic, name: OrderingName): Ordering {
  const { sum, corner } = bound;
  if (sum !== undefined) {
    if (name === 'upper') return bySum(live, sum, 1, name);
    if (name === 'lower') return bySum(live, sum, -1, name);
  } else if (corner !== undefined) {
    if (name === 'upper') return byCorner(live, corner, 1, name);
    if (name === 'lower') return byCorner(live, corner, -1, name);
    // In a 2x2 table a signed statistic takes each value at one table only, so P(T = t) is that table's probability.
    if (name === 'probability') return bySum(live, probability.bind(live, anyRoles).sum!, 1, name);
    if (bound.distance !== undefined) return { name, place: bound.distance };
  }
  throw new Error(`no ordering "${name}" for this statistic`);
}

const anyRoles = { groups: 'rows', event: 0, first: 0 } as const;

function bySum(live: LiveTable, cells: CellSum, direction: 1 | -1, name: OrderingName): Ordering {
  return {
    name,
    sum: { cells, direction },
    place: (counts) => signed(direction, placeBySum(live, cells, counts)),
  };
}

/** Place by the floating sum where the difference is certain, exactly where it is not. */
function placeBySum(live: LiveTable, cells: CellSum, counts: ArrayLike<number>): Place {
  const difference = sumOverCells(live, counts, cells.cell) - cells.observed;
  if (difference > cells.slack) return 1;
  if (difference < -cells.slack) return -1;
  return cells.slack === 0 ? 0 : cells.decide(counts);
}

function byCorner(live: LiveTable, corner: number, direction: 1 | -1, name: OrderingName): Ordering {
  const observed = live.counts[corner]!;
  return { name, place: (counts) => signed(direction, Math.sign(counts[corner]! - observed) as Place) };
}

const signed = (direction: 1 | -1, place: Place): Place => (place === 0 ? 0 : ((place * direction) as Place));
