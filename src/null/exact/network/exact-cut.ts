// The exact null of an r x c table for statistics that are sums over cells: the cut, to twelve digits at any magnitude of
// p, every tie decided. Whichever side of the observed value holds less is added up from positive terms; the other is the
// rest of the whole.
import { logFactorial } from '../../../numeric/log-factorial.js';
import { WideSum } from '../../../numeric/wide-number.js';
import type { LiveTable } from '../../../table/live-table.js';
import type { ExactCut, Ordering } from '../../contract.js';
import { cutFrom } from '../exact-answer.js';
import { encode } from './encoding.js';
import { buildHalf } from './half.js';
import type { SummedSide } from './level.js';
import { meetAlike } from './meet-alike.js';
import { meet } from './meet.js';
import { NearTies } from './near-ties.js';
import type { Network } from './network.js';
import { NodeSpace } from './node-space.js';
import { orient, type OrientedTable } from './oriented-table.js';
import { RestBounds } from './rest-bounds.js';
import { sharesLists } from './shared-lists.js';
import { SortedList } from './sorted-list.js';
import { splitColumns } from './split-columns.js';
import { Tally } from './tally.js';
import { Transitions } from './transitions.js';
import { nullWeights } from './weights.js';

export interface NetworkOptions {
  /** Most list entries held at once; an entry takes 24 to 32 bytes. Default 2^24. */
  readonly entryLimit?: number;
  /** Force or forbid lists shared by all arrangements of the rows. */
  readonly allAlike?: boolean;
  /** Add up both sides and take neither from the whole: a check of the weights, at twice the work. */
  readonly sumBothSides?: boolean;
}

/** Share below which a side is added up itself instead of being taken from the whole (which would cost its digits). */
const smallestDifference = 0.02;
/** Nodes whose chance is below this part of the observed table's own are left out. */
const negligible = 1e-18;
/** ln of a probability beyond which weights are scaled to the observed table. */
const farOut = -400;

/**
 * Masses below, level with and above the observed table. The ordering must be that of a sum over cells; `statistic` names
 * the statistic it came from (exact keys for products of n! or n^n).
 * @throws OutOfReach when more than `entryLimit` partial sums would have to be held.
 */
export function exactCut(
  live: LiveTable,
  ordering: Ordering,
  statistic: string,
  options: NetworkOptions = {},
): ExactCut {
  if (ordering.sum === undefined) throw new Error('the ordering is not that of a sum over cells');
  const { cells, direction } = ordering.sum;
  const table = orient(live);
  const encoding = encode(table, cells, statistic);
  const allAlike = encoding.symmetric && (options.allAlike ?? sharesLists(table));
  const logObserved = logProbability(table);
  const weights = nullWeights(table, allAlike, logObserved < farOut ? table.observed : expectedTable(table, allAlike));
  const bounds = new RestBounds(table, encoding.values);
  const space = new NodeSpace(table, allAlike);
  const columns = table.columnTotals.map((total, j) => ({
    total,
    values: encoding.values[j]!,
    keys: encoding.keys?.[j] ?? null,
    weights: weights.cells[j]!,
  }));
  const run = (side: SummedSide): Tally => {
    const network: Network = {
      table,
      encoding,
      weights,
      bounds,
      space,
      list: new SortedList(encoding.form === 'keyed'),
      transitions: new Transitions(space),
      columns,
      allAlike,
      side,
      farUp: isFarUp(table, bounds, encoding.observedValue),
      logFloor: logObserved + Math.log(negligible),
      margin: encoding.slack + 4 * table.rows * table.columns,
      entryLimit: options.entryLimit ?? 2 ** 24,
    };
    return walk(network, new NearTies(network, cells, statistic));
  };

  const whole = new WideSum();
  whole.add(weights.whole.mantissa, weights.whole.exponent);
  const side = upperTailGuess(table) < smallestDifference ? 'high' : 'low';
  const { summed, tied, leftOut } = run(side);
  const rest = 1 - summed.over(whole).value - tied.over(whole).value;
  let other = new WideSum();
  let error = errorBound(table, leftOut, logObserved);
  if (rest >= smallestDifference && options.sumBothSides !== true) {
    other.add(weights.whole.mantissa * rest, weights.whole.exponent);
    error /= rest;
  } else other = run(side === 'low' ? 'high' : 'low').summed;
  const [below, above] = (side === 'low') === direction > 0 ? [summed, other] : [other, summed];
  return cutFrom(ordering.name, { below, tied, above, whole }, error);
}

function isFarUp(table: OrientedTable, bounds: RestBounds, observed: number): boolean {
  const all = table.columnTotals.map((_, j) => j);
  return observed > (bounds.least(all, table.total, table.rowTotals) + bounds.most(all, table.rowTotals)) / 2;
}

function walk(network: Network, ties: NearTies): Tally {
  const { table, allAlike } = network;
  const { first, second } = splitColumns(table);
  const tally = new Tally();
  const open = allAlike ? 0 : 1;
  const halves = [first, second].map((columns) => buildHalf(network, columns, columns.length - open));
  if (allAlike) meetAlike(network, halves[0]!, halves[1]!, ties, tally);
  else meet(network, halves[0]!, halves[1]!, ties, tally);
  for (const half of halves) tally.leftOut += half.leftOut;
  return tally;
}

/** ln of the observed table's probability, to a few digits. */
function logProbability(table: OrientedTable): number {
  let log = -logFactorial(table.total);
  for (const total of table.rowTotals) log += logFactorial(total);
  for (const total of table.columnTotals) log += logFactorial(total);
  for (const count of table.observed.flat()) log -= logFactorial(count);
  return log;
}

function expectedTable(table: OrientedTable, flat: boolean): number[][] {
  return table.columnTotals.map((columnTotal) =>
    table.rowTotals.map((rowTotal) =>
      Math.min(rowTotal, Math.floor(columnTotal * (flat ? 1 / table.rows : rowTotal / table.total))),
    ),
  );
}

/** P(chi-square >= observed) by the cube-root normal law (Wilson & Hilferty 1931): only settles which side is summed. */
function upperTailGuess(table: OrientedTable): number {
  let chiSquare = 0;
  table.observed.forEach((column, j) =>
    column.forEach((count, i) => {
      const expected = (table.rowTotals[i]! * table.columnTotals[j]!) / table.total;
      chiSquare += (count - expected) ** 2 / expected;
    }),
  );
  const degrees = (table.rows - 1) * (table.columns - 1);
  const spread = 2 / (9 * degrees);
  const z = (Math.cbrt(chiSquare / degrees) - 1 + spread) / Math.sqrt(spread);
  return 1 / (1 + Math.exp(1.702 * z));
}

/**
 * A weight is a product of one rounded factor per cell (two roundings each); lists, running sums and tallies add with
 * compensation, blocks of 64 without: (3 cells + 150) units. To that the chance left out is added, against the smallest
 * mass that is stated, the observed table's own.
 */
const errorBound = (table: OrientedTable, leftOut: number, logObserved: number): number =>
  2 ** -53 * (3 * table.rows * table.columns + 150) + leftOut * Math.exp(-logObserved);
