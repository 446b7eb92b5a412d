// Where partial sums are too many to keep apart, neighbours are merged: what each column adds is rounded to a grid, once
// down and once up. Rounded down, whatever is counted at or above the observed value is there in truth; rounded up,
// whatever is not counted is not. Between the two counts lies p, for certain. The grid is made finer while effort lasts.
import type { LiveTable } from '../../../table/live-table.js';
import type { BracketCut, Mass, Ordering } from '../../contract.js';
import { cutFrom } from '../exact-answer.js';
import type { Meter } from '../meter.js';
import { pointMass } from '../point-mass.js';
import { OutOfReach } from '../out-of-reach.js';
import { drawsWorth, narrowestDrawn } from './drawn-width.js';
import { encode } from './encoding.js';
import { sumMasses, type NetworkOptions } from './masses.js';
import { orient } from './oriented-table.js';
import { RestBounds } from './rest-bounds.js';
import type { Rounding } from './grid-list.js';

export interface BracketOptions extends NetworkOptions {
  readonly meter: Meter;
}

/** What the probability of one table may be off by, relative. */
const pointError = 1e-10;
/** Steps of the first grid between the least possible and the observed value. */
const firstSteps = 64;
/** Width over upper limit at which a finer grid would tell nobody more. */
const fineEnough = 1e-6;
/** Share of the effort left that the next grid may be expected to take. */
const mostOfRest = 0.8;

/**
 * Limits for the masses of the ordering, which must be that of a sum over cells. Spends at most what the meter allows.
 * @throws OutOfReach when no grid fits the effort or the memory, or (`width`) draws worth the effort would tell more.
 */
export function bracketCut(
  live: LiveTable,
  ordering: Ordering,
  statistic: string,
  options: BracketOptions,
): BracketCut {
  const { meter, entryLimit = 2 ** 24 } = options;
  const range = rangeOf(live, ordering, statistic);
  let step = stepBelow(range / firstSteps);
  let best: BracketCut | undefined;
  for (;;) {
    const before = meter.spent;
    let entries: number;
    try {
      const found = onGrid(live, ordering, statistic, options, step, range / step);
      best = best === undefined ? found.cut : intersection(best, found.cut);
      entries = found.entries;
    } catch (thrown) {
      if (best === undefined || !(thrown instanceof OutOfReach)) throw thrown;
      break;
    }
    if (step === 1 || widthOf(best) <= fineEnough * best.atLeast.upper.value) break;
    // Work and memory grow with the number of steps at the most.
    const room = Math.min(((meter.most - meter.spent) * mostOfRest) / (meter.spent - before), entryLimit / entries);
    if (!(room >= 2)) break;
    step = Math.max(1, stepBelow(step / room));
  }
  const { lower, upper } = best.atLeast;
  const drawn = narrowestDrawn(lower.value, upper.value, drawsWorth(live, meter.spent));
  if (!(widthOf(best) < drawn)) throw new OutOfReach('width', meter.spent);
  return best;
}

const widthOf = ({ atLeast: { lower, upper } }: BracketCut): number => upper.value - lower.value;

/** From the least possible value to the observed one, in units of the encoding. */
function rangeOf(live: LiveTable, ordering: Ordering, statistic: string): number {
  const table = orient(live);
  const { values, observedValue } = encode(table, ordering.sum!.cells, statistic);
  const all = table.columnTotals.map((_, j) => j);
  const least = new RestBounds(table, values).least(all, table.total, table.rowTotals);
  return Math.max(1, observedValue - least);
}

const stepBelow = (step: number): number => 2 ** Math.max(0, Math.ceil(Math.log2(step)));

interface Found {
  readonly cut: BracketCut;
  readonly entries: number;
}

/**
 * @param step of the grid, in units of the encoding; a power of two.
 * @param keptApart lists of at most so many entries are not rounded
 */
export function onGrid(
  live: LiveTable,
  ordering: Ordering,
  statistic: string,
  options: NetworkOptions,
  step: number,
  keptApart: number,
): Found {
  const { cells, direction } = ordering.sum!;
  let entries = 0;
  const limit = (toward: Rounding['toward']): { atLeast: Mass; above: Mass } => {
    const masses = sumMasses(live, cells, statistic, options, { step, toward, keptApart });
    entries = Math.max(entries, masses.entries);
    const { tied, whole, error } = masses;
    const [below, above] = direction > 0 ? [masses.below, masses.above] : [masses.above, masses.below];
    const cut = cutFrom(ordering.name, { below, tied, above, whole }, error);
    const isLower = (toward === 'down') === direction > 0;
    const certain = (mass: Mass): Mass => scaled(mass, isLower ? 1 - error : 1 + error);
    return { atLeast: certain(cut.atLeast), above: certain(isLower ? cut.above : cut.atLeast) };
  };
  const [down, up] = [limit('down'), limit('up')];
  const [lower, upper] = direction > 0 ? [down, up] : [up, down];
  // The observed table is level with itself, and so not among those certainly above.
  const withObserved = sum(lower.above, scaled(pointMass(live), 1 - pointError));
  return {
    cut: {
      kind: 'bracket',
      ordering: ordering.name,
      atLeast: { lower: larger(lower.atLeast, withObserved), upper: upper.atLeast },
      above: { lower: lower.above, upper: upper.above },
    },
    entries,
  };
}

/** A mass times a factor near 1, at most 1; a unit in the last place is given away on top. */
function scaled({ value, log10 }: Mass, factor: number): Mass {
  const moved = factor < 1 ? factor - 2 ** -52 : factor + 2 ** -52;
  return { value: Math.min(1, value * moved), log10: Math.min(0, log10 + Math.log10(moved)) };
}

const larger = (x: Mass, y: Mass): Mass => (x.log10 >= y.log10 ? x : y);

function sum(x: Mass, y: Mass): Mass {
  const value = x.value + y.value;
  const [least, most] = [Math.min(x.log10, y.log10), Math.max(x.log10, y.log10)];
  const log10 = least === -Infinity ? most : most + Math.log1p(10 ** (least - most)) / Math.LN10;
  return scaled({ value, log10 }, 1 - 2 ** -50);
}

/** Both hold for certain, so what both allow does. */
function intersection(a: BracketCut, b: BracketCut): BracketCut {
  const smaller = (x: Mass, y: Mass): Mass => (x.log10 <= y.log10 ? x : y);
  return {
    ...a,
    atLeast: { lower: larger(a.atLeast.lower, b.atLeast.lower), upper: smaller(a.atLeast.upper, b.atLeast.upper) },
    above: { lower: larger(a.above.lower, b.above.lower), upper: smaller(a.above.upper, b.above.upper) },
  };
}
