// Masses below, level with and above the observed value of a sum over cells, by the network. Whichever side of the
// observed value holds less is added up from positive terms; the other is the rest of the whole.
import { logFactorial } from '../../../numeric/log-factorial.js';
import { WideSum } from '../../../numeric/wide-number.js';
import type { CellSum } from '../../../statistic/contract.js';
import type { LiveTable } from '../../../table/live-table.js';
import type { Masses } from '../exact-answer.js';
import { Meter } from '../meter.js';
import { encode, type Encoding } from './encoding.js';
import { chiSquare } from './forecast.js';
import { GridList, type Rounding } from './grid-list.js';
import { buildHalf } from './half.js';
import { leastRest } from './least-rest.js';
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
import { splitColumns, type Split } from './split-columns.js';
import { Tally } from './tally.js';
import { Transitions } from './transitions.js';
import { nullWeights } from './weights.js';

export interface NetworkOptions {
  /** Most list entries held at once; an entry takes 24 to 32 bytes, and as many again while lists grow. Default 2^24. */
  readonly entryLimit?: number;
  /** Force or forbid lists shared by all arrangements of the rows. */
  readonly allAlike?: boolean;
  /** Add up both sides and take neither from the whole: a check of the weights, at twice the work. */
  readonly sumBothSides?: boolean;
  /** Counts the work, and ends it past its bound. */
  readonly meter?: Meter;
}

/** Share below which a side is added up itself instead of being taken from the whole (which would cost its digits). */
const smallestDifference = 0.02;
/** Error that a side taken from the whole may have; beyond it that side is added up too. */
const mostError = 5e-13;
/** Nodes whose chance is below this part of the observed table's own are left out. */
const negligible = 1e-18;
/** ln of a probability beyond which weights are scaled to the observed table. */
const farOut = -400;

/** Masses by the sum itself: below means a smaller sum. */
export interface SumMasses extends Masses {
  /** Bound on the relative error of each. */
  readonly error: number;
  /** Most list entries held at once. */
  readonly entries: number;
}

/**
 * @param statistic name of the one the sum came from (exact keys for products of n! or n^n)
 * @param rounding null: every table on its side, ties decided. Else long lists are rounded: rounded down, what is level or
 *   above is so in truth; rounded up, what is below is.
 * @throws OutOfReach when more than `entryLimit` partial sums would have to be held, or the meter's bound is passed.
 */
export function sumMasses(
  live: LiveTable,
  cells: CellSum,
  statistic: string,
  options: NetworkOptions,
  rounding: Rounding | null = null,
): SumMasses {
  const table = orient(live);
  const encoding = roundedTo(encode(table, cells, statistic), rounding);
  const allAlike = encoding.symmetric && (options.allAlike ?? sharesLists(table));
  const logObserved = logProbability(table);
  const weights = nullWeights(table, allAlike, logObserved < farOut ? table.observed : expectedTable(table, allAlike));
  const bounds = new RestBounds(table, encoding.values);
  const space = new NodeSpace(table, allAlike);
  const split = splitColumns(table);
  const columns = table.columnTotals.map((total, j) => ({
    total,
    values: encoding.values[j]!,
    keys: encoding.keys?.[j] ?? null,
    weights: weights.cells[j]!,
    leastRest: leastRest(encoding.values[j]!, total),
  }));
  const list = rounding === null ? new SortedList(encoding.form === 'keyed') : new GridList(rounding);
  let entries = 0;
  const run = (side: SummedSide): Tally => {
    const network: Network = {
      table,
      encoding,
      weights,
      bounds,
      space,
      list,
      transitions: new Transitions(space),
      columns,
      allAlike,
      side,
      farUp: isFarUp(table, bounds, encoding.observedValue),
      logFloor: logObserved + Math.log(negligible),
      margin: encoding.slack + 4 * table.rows * table.columns,
      entryLimit: options.entryLimit ?? 2 ** 24,
      meter: options.meter ?? new Meter(),
    };
    const walked = walk(network, split, new NearTies(network, cells, statistic));
    entries = Math.max(entries, walked.entries);
    return walked.tally;
  };

  const whole = new WideSum();
  whole.add(weights.whole.mantissa, weights.whole.exponent);
  const side = upperTailGuess(table) < smallestDifference ? 'high' : 'low';
  const { summed, tied, leftOut } = run(side);
  const rest = 1 - summed.over(whole).value - tied.over(whole).value;
  let other = new WideSum();
  let error = errorBound(table, leftOut, logObserved) + list.relativeError * table.columns;
  if (rest >= smallestDifference && error / rest <= mostError && options.sumBothSides !== true) {
    other.add(weights.whole.mantissa * rest, weights.whole.exponent);
    error /= rest;
  } else other = run(side === 'low' ? 'high' : 'low').summed;
  const [below, above] = side === 'low' ? [summed, other] : [other, summed];
  return { below, tied, above, whole, error, entries };
}

/** With rounding, the observed value is moved by what the encoding itself leaves open, to the side that stays certain. */
function roundedTo(encoding: Encoding, rounding: Rounding | null): Encoding {
  if (rounding === null) return encoding;
  const moved = rounding.toward === 'down' ? encoding.slack : -encoding.slack;
  return { ...encoding, form: 'exact', keys: null, slack: 0, observedValue: encoding.observedValue + moved };
}

function isFarUp(table: OrientedTable, bounds: RestBounds, observed: number): boolean {
  const all = table.columnTotals.map((_, j) => j);
  return observed > (bounds.least(all, table.total, table.rowTotals) + bounds.most(all, table.rowTotals)) / 2;
}

function walk(network: Network, { first, second }: Split, ties: NearTies): { tally: Tally; entries: number } {
  const { allAlike } = network;
  const tally = new Tally();
  const open = allAlike ? 0 : 1;
  const one = buildHalf(network, first, first.length - open, 0);
  const other = buildHalf(network, second, second.length - open, one.entries);
  if (allAlike) meetAlike(network, one, other, ties, tally);
  else meet(network, one, other, ties, tally);
  tally.leftOut += one.leftOut + other.leftOut;
  return { tally, entries: one.entries + other.entries };
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
  const degrees = (table.rows - 1) * (table.columns - 1);
  const spread = 2 / (9 * degrees);
  const z = (Math.cbrt(chiSquare(table) / degrees) - 1 + spread) / Math.sqrt(spread);
  return 1 / (1 + Math.exp(1.702 * z));
}

/**
 * A weight is a product of one rounded factor per cell (two roundings each); lists, running sums and tallies add with
 * compensation, blocks of 64 without: (3 cells + 150) units. To that the chance left out is added, against the smallest
 * mass that is stated, the observed table's own.
 */
const errorBound = (table: OrientedTable, leftOut: number, logObserved: number): number =>
  2 ** -53 * (3 * table.rows * table.columns + 150) + leftOut * Math.exp(-logObserved);
