// Turns a bound statistic into orderings of tables: what "at least as extreme as observed" means, decided exactly.
import type { BoundStatistic, CellSum, LinearForm, Place } from '../statistic/contract.js';
import { sumOverCells } from '../statistic/expected.js';
import { probability } from '../statistic/probability.js';
import type { LiveTable } from '../table/live-table.js';
import type { Ordering, OrderingName } from './contract.js';
import { placesByProbability, wholeLaw } from './exact/linear/linear-law.js';
import { placesBySmallerTail } from './exact/linear/smaller-tail.js';
import { placesBySmallerTail as placesByCornerTail } from './exact/smaller-tail.js';

/** @throws Error when the statistic has no such ordering; plans exclude that. */
export function orderingFor(live: LiveTable, bound: BoundStatistic, name: OrderingName): Ordering {
  const { sum, corner, linear, distance } = bound;
  const byLine = linear === undefined ? {} : { linear };
  switch (name) {
    case 'upper':
    case 'lower': {
      const direction = name === 'upper' ? 1 : -1;
      if (sum !== undefined) return { ...bySum(live, sum, direction, name), ...byLine };
      if (corner !== undefined) return byCorner(live, corner, direction, name);
      if (name === 'lower' && bound.placeLower !== undefined) {
        return { name, place: (counts) => bound.placeLower!(counts), arbitrary: true };
      }
      if (bound.place !== undefined) return byPlace(bound, direction, name);
      break;
    }
    case 'distance': {
      if (distance === undefined) break;
      if (isArbitrary(bound)) return { name, place: distance, arbitrary: true };
      if (sum === undefined || linear === undefined) return { name, place: distance };
      return byFold(live, sum, linear, name);
    }
    case 'probability':
      // In a 2x2 table a signed statistic takes each value at one table only, so P(T = t) is that table's probability.
      if (corner !== undefined) return bySum(live, probability.bind(live, anyRoles).sum!, 1, name);
      if (sum !== undefined && linear !== undefined) return byLaw(live, sum, linear, name, placesByProbability);
      break;
    case 'blaker':
      if (corner !== undefined) return { name, place: placesByCornerTail(live, corner) };
      if (sum !== undefined && linear !== undefined) return byLaw(live, sum, linear, name, placesBySmallerTail);
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

const isArbitrary = ({ place, limits }: BoundStatistic): boolean => place !== undefined && limits === undefined;

function byPlace(bound: BoundStatistic, direction: 1 | -1, name: OrderingName): Ordering {
  return {
    name,
    place: (counts) => signed(direction, bound.place!(counts)),
    ...(isArbitrary(bound) ? { arbitrary: true } : {}),
    ...(bound.limits === undefined ? {} : { limits: bound.limits }),
  };
}

/** The sum is exact: further out means outside the two values level with the observed one. */
function byFold(live: LiveTable, cells: CellSum, linear: LinearForm, name: OrderingName): Ordering {
  const { low, high } = linear;
  return {
    name,
    fold: { cells, low, high },
    linear,
    place: (counts) => {
      const sum = sumOverCells(live, counts, cells.cell);
      return sum > high || sum < low ? 1 : sum < high && sum > low ? -1 : 0;
    },
  };
}

/** Values of a linear sum by their law: every place needs all of it, which is worked out once, when first asked for. */
function byLaw(
  live: LiveTable,
  cells: CellSum,
  linear: LinearForm,
  name: OrderingName,
  placesIn: typeof placesByProbability,
): Ordering {
  let places: Map<number, Place> | undefined;
  return {
    name,
    linear,
    place: (counts) => {
      places ??= placesIn(live, linear, wholeLaw(live, linear));
      return places.get(sumOverCells(live, counts, cells.cell))!;
    },
  };
}

const signed = (direction: 1 | -1, place: Place): Place => (place === 0 ? 0 : ((place * direction) as Place));
