// Exact cuts of a statistic that is a largest over cells, by counting the tables whose cells all keep within limits: dealt
// column by column, cell by cell, with partial tables merged that leave the same row totals. Once a cell is beyond its limit
// the rest does not matter, so that its whole chance is added to "above" at once; all terms are positive.
import { WideSum } from '../../numeric/wide-number.js';
import { effortProblem } from '../../problem/problem.js';
import type { CellLimits } from '../../statistic/contract.js';
import type { LiveTable } from '../../table/live-table.js';
import type { ExactCut, Ordering } from '../contract.js';
import { cutFrom, type Masses } from './exact-answer.js';
import { Meter } from './meter.js';
import { codesOf, mostCodes } from './linear/deal.js';
import { factorialsUpTo, HypergeometricWeights, type Scaled } from './linear/factorials.js';
import { powerOfTwo, upscale, upscaleBits } from './linear/node.js';

/** Partial tables that leave the same row totals: chance, times `upscale`, with no cell at its limit and with one. */
interface Node {
  readonly left: readonly number[];
  within: number;
  tied: number;
  ways: number;
}

interface Shape {
  readonly rows: number[];
  readonly columns: number[];
  readonly cell: (row: number, column: number) => number;
}

/** Fewer lines as rows. */
function shapeOf(live: LiveTable): Shape {
  const [rows, columns] = [[...live.rowTotals], [...live.columnTotals]];
  return rows.length <= columns.length
    ? { rows, columns, cell: (row, column) => row * live.columns + column }
    : { rows: columns, columns: rows, cell: (row, column) => column * live.columns + row };
}

const mostUnits = 2 ** 20;
/** In units of 30 ns: a partial table taken up, a count weighed, a count that leads to another partial table. */
const perNode = 3;
const perCount = 2;
const perMove = 6;
/** What the first steps of a program cost before it is warm: some 10 ms. */
const start = 3e5;

/** Work in the units of forecast.ts, from how many partial tables the limits leave room for; Infinity where it does not apply. */
export function forecastWithinLimits(live: LiveTable, limits: CellLimits): number {
  const { rows, columns, cell } = shapeOf(live);
  if (live.total > mostUnits || codesOf(rows.map((total) => ({ score: 0, total }))) > mostCodes) return Infinity;
  let work = start + live.total;
  let nodes = 1;
  const room = rows.map(() => 1);
  columns.forEach((column, j) => {
    rows.forEach((row, i) => {
      const width = limits.highest[cell(i, j)]! - limits.lowest[cell(i, j)]! + 1;
      const possible = Math.min(row, column) + 1;
      const free = i < rows.length - 1 && j < columns.length - 1;
      work += nodes * (free ? 2 * possible + 6 * width : 8);
      room[i] = Math.min(row + 1, room[i]! + width - 1);
      // At a column's end the last row follows from the others.
      const places = room.reduce((all, x, h) => (h === rows.length - 1 ? all : all * x), 1);
      if (free) nodes = Math.min(nodes * width, places * (i < rows.length - 2 ? width : 1));
    });
  });
  return Math.round(work);
}

/**
 * Cuts for orderings by these limits. Relative error of every mass as stated, below 1e-12 up to totals of thousands.
 * @throws Problem (effort) `beyond-doubles` for masses below 1e-550.
 */
export function exactWithinLimits(
  live: LiveTable,
  orderings: readonly Ordering[],
  meter: Meter = new Meter(),
): ExactCut[] {
  const { within, tied, above, roundings } = deal(live, orderings[0]!.limits!, meter);
  const whole = new WideSum();
  whole.add(1, upscaleBits);
  const relativeError = (roundings + 4) * 2 ** -53;
  return orderings.map(({ name }) => {
    const [low, level, high] = name === 'lower' ? [above, tied, within] : [within, tied, above];
    const masses: Masses = { below: low, tied: level, above: high, whole };
    for (const mass of [low, level, high]) if (!mass.isZero && mass.log2 < upscaleBits - 1850) throw tooDeep();
    return cutFrom(name, masses, relativeError);
  });
}

const tooDeep = (): Error =>
  effortProblem({
    code: 'beyond-doubles',
    message: 'the exact p is below 1e-550, deeper than this statistic is worked out',
    place: '--method exact',
    hint: 'use --method sample for a guaranteed bound',
  });

interface Dealt {
  readonly within: WideSum;
  readonly tied: WideSum;
  readonly above: WideSum;
  readonly roundings: number;
}

function deal(live: LiveTable, limits: CellLimits, meter: Meter): Dealt {
  const { rows, columns, cell } = shapeOf(live);
  const weights = new HypergeometricWeights(factorialsUpTo(live.total));
  const codeOf = (left: readonly number[]): number => left.reduce((code, x, row) => code * (rows[row]! + 1) + x, 0);
  const above = new WideSum();
  const weight: Scaled = { mantissa: 0, exponent: 0 };
  let roundings = 0;
  let nodes: Node[] = [{ left: rows, within: upscale, tied: 0, ways: 1 }];
  let rest = live.total;
  columns.forEach((column, j) => {
    rest -= column;
    rows.forEach((_, i) => {
      const place = cell(i, j);
      const [lowest, highest] = [limits.lowest[place]!, limits.highest[place]!];
      const next = new Map<number, Node>();
      let mostWays = 0;
      let longest = 0;
      for (const node of nodes) {
        const marked = node.left[i]!;
        const pool = node.left.slice(i).reduce((sum, x) => sum + x, 0);
        const drawn = node.left.reduce((sum, x) => sum + x, 0) - rest;
        weights.set(marked, drawn, pool);
        let beyond = 0;
        let kept = 0;
        const [from, to] = [Math.max(0, drawn - (pool - marked)), Math.min(marked, drawn)];
        longest = Math.max(longest, to - from);
        for (let k = from; k <= to; k++) {
          weights.weigh(k, weight);
          const within = scale(node.within, weight);
          const tied = scale(node.tied, weight);
          if (k < lowest || k > highest) {
            beyond += within + tied;
            continue;
          }
          const ties =
            (k === lowest && limits.lowestTies[place] === 1) || (k === highest && limits.highestTies[place] === 1);
          const left = node.left.with(i, marked - k);
          const code = codeOf(left);
          let into = next.get(code);
          if (into === undefined) next.set(code, (into = { left, within: 0, tied: 0, ways: 0 }));
          into.within += ties ? 0 : within;
          into.tied += ties ? within + tied : tied;
          mostWays = Math.max(mostWays, ++into.ways);
          kept++;
        }
        addTo(above, beyond);
        meter.spend(perNode + perCount * (to - from + 1) + perMove * kept);
      }
      roundings += HypergeometricWeights.error(column) + 2 + Math.max(mostWays, longest);
      nodes = [...next.values()];
    });
  });
  const [within, tied] = [new WideSum(), new WideSum()];
  for (const node of nodes) {
    addTo(within, node.within);
    addTo(tied, node.tied);
  }
  return { within, tied, above, roundings };
}

/** The power of two in two steps, so that a deep weight of a large mass keeps its digits. */
const scale = (mass: number, { mantissa, exponent }: Scaled): number =>
  exponent >= -1000
    ? mass * mantissa * powerOfTwo(exponent)
    : mass * 2 ** -1000 * mantissa * powerOfTwo(exponent + 1000);

/** WideSum takes numbers of moderate size. */
function addTo(sum: WideSum, value: number): void {
  if (value > 2 ** 400) sum.add(value * 2 ** -500, 500);
  else sum.add(value, 0);
}
