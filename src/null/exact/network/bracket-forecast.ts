// Whether a bracket is worth trying: from what one pass over the nodes would take, how fine a grid the effort pays for, and
// how much of the law, by its chi-square limit, then lies in doubt.
import { chiSquareUpperTail } from '../../../numeric/chi-square-tail.js';
import type { LiveTable } from '../../../table/live-table.js';
import { drawsWorth, narrowestDrawn } from './drawn-width.js';
import { EntryCount, chiSquare } from './forecast.js';
import { perGridEntry, perTransition } from './costs.js';
import { orient } from './oriented-table.js';
import { splitColumns } from './split-columns.js';

/** Fewer columns have nothing to merge before the halves meet. */
const fewestColumns = 5;
/** More have so many ways that no grid holds them, and the bounds alone would take longer than draws. */
const mostColumns = 40;
/** Rounded down once and up once. */
const passes = 2;
/** Share of the effort that the last and finest grid gets. */
const lastShare = 0.6;
/** The forecast is rough: a bracket is tried where it may be so many times wider than draws would make it. */
const leniency = 3;

export function expectsBracket(live: LiveTable, statistic: string, effort: number): boolean {
  const table = orient(live);
  if (table.columns < fewestColumns || table.columns > mostColumns) return false;
  const { first, second } = splitColumns(table);
  const count = new EntryCount(table, statistic, false);
  const pairs = count.half(first).pairs + count.half(second).pairs;
  const steps = (effort * lastShare) / passes / pairs / perGridEntry;
  if (!(steps >= 32) || pairs * passes * perTransition > effort / 2) return false;
  const observed = chiSquare(table);
  const degrees = (table.rows - 1) * (table.columns - 1);
  // Each level of a half from the third on rounds once, by half a step on average.
  const doubt = (observed / steps) * Math.max(1, table.columns - 4) * 0.5;
  const tail = (x: number): number => chiSquareUpperTail(Math.max(0, x), degrees).p;
  const [lower, upper] = [tail(observed + doubt), tail(observed - doubt)];
  return upper - lower < leniency * narrowestDrawn(lower, upper, drawsWorth(live, effort));
}
