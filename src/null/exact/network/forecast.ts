// What an exact computation will cost, before it starts: list entries to make, counted from the margins and from how far out
// the observed table lies. Tables not above the observed one fill an ellipsoid around the expected table; the number of
// whole-number points in it is its volume by the normal law of the margins (as Gail & Mantel 1977 count tables), widened for
// the grid, and never more than there are tables. Deterministic; seconds are for display.
import type { LiveTable } from '../../../table/live-table.js';
import { perBoundedCell, perEntry, perLookup, perTransition } from './costs.js';
import { orient, type OrientedTable } from './oriented-table.js';
import { sharesLists } from './shared-lists.js';
import { nodesToAList } from './shared-nodes.js';
import { splitColumns } from './split-columns.js';

export interface NetworkForecast {
  /** In the units of forecast.ts, without the start. */
  readonly workUnits: number;
  readonly memoryBytes: number;
}

const bytesPerEntry = 32;
/** Nodes bounded for one that is opened: the rims of the lines of nodes. */
const boundedPerOpen = 1.7;

export function forecastNetwork(live: LiveTable, statistic: string): NetworkForecast {
  const table = orient(live);
  const shared = isProduct(statistic) && sharesLists(table);
  const count = new EntryCount(table, statistic, shared);
  const { first, second } = splitColumns(table);
  const a = count.half(first);
  const b = count.half(second);
  // Shared lists are completed in both halves and passed along for every arrangement; else the first half is looked up as it is made.
  const entries = a.before + b.before + b.last + (shared ? a.last : 0);
  const lookups = shared ? (a.merged + b.merged) / 4 : a.last;
  const cells = table.rows * table.columns;
  const workUnits = Math.ceil(
    (a.nodes + b.nodes) * cells * boundedPerOpen * perBoundedCell +
      (a.pairs + b.pairs) * perTransition +
      entries * perEntry +
      lookups * perLookup,
  );
  return { workUnits, memoryBytes: Math.ceil(bytesPerEntry * 2 * (a.held + b.held)) };
}

const isProduct = (statistic: string): boolean => statistic === 'probability' || statistic === 'likelihood-ratio';

interface HalfCount {
  /** Nodes with a list, and ways from a node to a node. */
  readonly nodes: number;
  readonly pairs: number;
  /** Entries made for the levels before the last, and for the last. */
  readonly before: number;
  readonly last: number;
  /** Entries of the last level after merging, for every arrangement of a node; most entries held at once before it. */
  readonly merged: number;
  readonly held: number;
}

export class EntryCount {
  private readonly radiusSquared: number;
  private readonly products: boolean;

  /** @param shared whether every arrangement of a node's row sums shares one list. */
  constructor(
    private readonly table: OrientedTable,
    statistic: string,
    private readonly shared: boolean,
  ) {
    this.products = isProduct(statistic);
    const degrees = (table.rows - 1) * (table.columns - 1);
    // A table at the very centre still has the neighbours that rounding leaves undecided.
    this.radiusSquared = Math.max(chiSquare(table), degrees / 8);
  }

  half(columns: readonly number[]): HalfCount {
    let [nodes, pairs, before, last, held] = [0, 0, 0, 0, 0];
    let merged = 1;
    let stored = 1;
    let here = 1;
    let sharing = 1;
    let previous = 0;
    columns.forEach((_, at) => {
      const done = columns.slice(0, at + 1);
      const log = this.logEntries(done);
      const size = this.sizeOf(done);
      sharing = this.shared ? nodesToAList(this.table, size, this.radiusSquared) : 1;
      before += last;
      pairs += (here * Math.exp(log - previous)) / sharing;
      last = Math.min((merged * Math.exp(log - previous)) / sharing, Number.MAX_VALUE);
      held = Math.max(held, stored);
      here = Math.exp(this.logNodes(done));
      nodes += here / sharing;
      stored = this.products ? Math.min(last, (here / sharing) * this.differentValues(done)) : last;
      // The next level's ways start from every arrangement of a node.
      merged = stored * sharing;
      previous = log;
    });
    return { nodes, pairs, before, last, merged, held };
  }

  /** Products of n! or n^n over a few cells take few values: about the square of the counts spent, over six. */
  private differentValues(done: readonly number[]): number {
    return Math.max(1, this.sizeOf(done) ** 2 / 6);
  }

  private sizeOf(done: readonly number[]): number {
    return done.reduce((sum, j) => sum + this.table.columnTotals[j]!, 0);
  }

  private logNodes(done: readonly number[]): number {
    const { rows, rowTotals, total } = this.table;
    const size = this.sizeOf(done);
    const spread = (size * (total - size)) / total;
    const log = this.logPoints(
      rows - 1,
      rowTotals.map((r) => (r / total) * spread),
      rows - 1,
      spread,
    );
    return Math.min(log, logWays(rowTotals, size));
  }

  private logEntries(done: readonly number[]): number {
    const { rows, rowTotals, columnTotals, total } = this.table;
    const rest = total - this.sizeOf(done);
    let logDeterminant = (rows - 1) * Math.log(rest / total);
    const expected: number[] = [];
    for (const j of done) {
      logDeterminant += (rows - 1) * Math.log(columnTotals[j]!);
      for (let i = 0; i < rows; i++) {
        logDeterminant += Math.log(rowTotals[i]! / total);
        if (i < rows - 1) expected.push((rowTotals[i]! * columnTotals[j]!) / total);
      }
    }
    const degrees = (rows - 1) * done.length;
    const byVolume = this.logBall(degrees) + logDeterminant / 2 + this.logGrid(degrees, expected);
    const byWays = done.reduce((sum, j) => sum + logWays(rowTotals, columnTotals[j]!), 0);
    return Math.max(0, Math.min(byVolume, byWays));
  }

  private logPoints(degrees: number, expected: readonly number[], dimensions: number, spread: number): number {
    const { rowTotals, total } = this.table;
    let logDeterminant = dimensions * Math.log(spread);
    for (const rowTotal of rowTotals) logDeterminant += Math.log(rowTotal / total);
    return Math.max(0, this.logBall(degrees) + logDeterminant / 2 + this.logGrid(degrees, expected.slice(0, -1)));
  }

  /** ln of the volume of a ball of the observed radius. */
  private logBall(degrees: number): number {
    let log = degrees % 2 === 0 ? 0 : Math.log(2);
    for (let d = degrees; d >= 2; d -= 2) log += Math.log((2 * Math.PI) / d);
    return log + (degrees / 2) * Math.log(this.radiusSquared);
  }

  /** A point of the grid stands for a unit cube: its variance, 1/12, adds to that of a coordinate in the ball. */
  private logGrid(degrees: number, expected: readonly number[]): number {
    let log = 0;
    for (const e of expected) log += 0.5 * Math.log1p((degrees + 2) / (12 * e * this.radiusSquared));
    return log;
  }
}

export function chiSquare(table: OrientedTable): number {
  let sum = 0;
  table.observed.forEach((column, j) =>
    column.forEach((count, i) => {
      const expected = (table.rowTotals[i]! * table.columnTotals[j]!) / table.total;
      sum += (count - expected) ** 2 / expected;
    }),
  );
  return sum;
}

/** Longer lines are counted by volume alone. */
const longestCounted = 400;

/** ln of the ways to divide `amount` between the rows. */
function logWays(rowTotals: readonly number[], amount: number): number {
  if (amount > longestCounted) return Infinity;
  let ways = new Float64Array(amount + 1);
  ways[0] = 1;
  for (const total of rowTotals) {
    const next = new Float64Array(amount + 1);
    let sum = 0;
    for (let n = 0; n <= amount; n++) {
      sum += ways[n]! - (n > total ? ways[n - total - 1]! : 0);
      next[n] = sum;
    }
    ways = next;
  }
  return Math.log(ways[amount]!);
}
