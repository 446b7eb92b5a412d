// What the law of a linear statistic would take, from its margins and how far out the observed value lies, by the normal
// law of every partial sum: in the counted units of forecast.ts.
import type { LinearForm } from '../../../statistic/contract.js';
import type { LiveTable } from '../../../table/live-table.js';
import { linearStart, perDenseValue, perMove, perSparseValue } from './costs.js';
import { codesOf, mostCodes } from './deal.js';
import { moments, side } from './moments.js';
import { scoredSides, type ScoredLine, type ScoredSides } from './scored-sides.js';

export interface LinearForecast {
  /** Infinity where the engine does not apply. */
  readonly workUnits: number;
  readonly sparse: boolean;
}

/** Values of two stages are held at once: 2^24 of them a stage take 256 MB. */
const mostValues = 2 ** 24;
const mostUnits = 2 ** 20;

export function forecastLinear(live: LiveTable, form: LinearForm): LinearForecast {
  const sides = scoredSides(live, form);
  const { mean, deviation } = moments(live, form);
  if (sides.rows.length === 1) return { workUnits: linearStart, sparse: false };
  const z = Math.abs(form.observed - mean) / deviation;
  // Two scores a side: a hypergeometric law is walked, some ten deviations to each side and as far as the observed value.
  if (sides.columns.length === 2)
    return { workUnits: Math.round(linearStart + deviation * (Math.min(39, z + 10) + 12)), sparse: false };
  if (sides.total > mostUnits || codesOf(sides.rows) > mostCodes) return { workUnits: Infinity, sparse: false };
  // Values are kept down to e^-50 of the foreseen p, whose logarithm is about -z^2 / 2.
  const reach = Math.sqrt(z ** 2 + 2 * 53);
  const dense = { values: 0, peak: 0 };
  const sparse = { values: 0, peak: 0 };
  let moves = 0;
  for (const stage of stagesOf(sides, reach)) {
    moves += stage.moves;
    for (const [kind, size] of [
      [dense, stage.range],
      [sparse, Math.min(stage.range, stage.distinct)],
    ] as const) {
      // Each move adds its node's values; each new node's are set to nothing, trimmed and added up.
      kind.values += stage.moves * size + 3 * stage.nodes * (kind === dense ? stage.nextRange : 1);
      kind.peak = Math.max(kind.peak, stage.nodes * size);
    }
  }
  const work = (values: { values: number; peak: number }, each: number): number =>
    values.peak > mostValues
      ? Infinity
      : Math.round(moves * perMove + values.values * each + sides.total + linearStart);
  const [denseWork, sparseWork] = [work(dense, perDenseValue), work(sparse, perSparseValue)];
  return { workUnits: Math.min(denseWork, sparseWork), sparse: sparseWork < denseWork };
}

export const usesHashMaps = (live: LiveTable, form: LinearForm): boolean => forecastLinear(live, form).sparse;

interface Stage {
  readonly moves: number;
  /** Nodes it leads to. */
  readonly nodes: number;
  /** Values between the ends of a node's law before the stage, and how many partial tables it may hold. */
  readonly range: number;
  /** The same after the stage. */
  readonly nextRange: number;
  readonly distinct: number;
}

function* stagesOf({ rows, columns, total }: ScoredSides, reach: number): Generator<Stage> {
  let nodes = 1;
  let tables = 1;
  let before = 0;
  for (let j = 0; j < columns.length; j++) {
    const column = columns[j]!;
    const after = before + column.total;
    const range = rangeOfSum(rows, columns.slice(0, j), before, total, reach);
    const nextRange = rangeOfSum(rows, columns.slice(0, j + 1), after, total, reach);
    for (let i = 0; i < rows.length - 1; i++) {
      // The last column is forced, else a cell varies as a hypergeometric count.
      const ways = j === columns.length - 1 ? 1 : spread(rows[i]!.total, column.total, total, reach);
      const moves = nodes * ways;
      tables *= ways;
      // Rows up to this one have had their cell of the column; the last row follows from the others at a column's end.
      let places = 1;
      rows.forEach((row, h) => {
        if (h === rows.length - 1) return;
        places *= spread(row.total, h <= i ? after : before, total, reach);
      });
      if (i < rows.length - 2) places *= Math.min(ways, spread(rows[i + 1]!.total, column.total, total, reach));
      const next = Math.min(moves, places, tables);
      yield { moves, nodes: next, range, nextRange, distinct: Math.max(1, tables / ways / nodes) };
      nodes = next;
    }
    before = after;
  }
}

/** Counts within reach of a hypergeometric mean: at most the possible ones. */
function spread(marked: number, drawn: number, total: number, reach: number): number {
  const most = Math.min(marked, drawn, total - marked, total - drawn) + 1;
  const share = marked / total;
  const variance = drawn * share * (1 - share) * ((total - drawn) / Math.max(1, total - 1));
  return Math.min(most, 2 * reach * Math.sqrt(variance) + 1);
}

/** Values that the sum over some columns takes at a node, whose row totals stand at their means. */
function rangeOfSum(
  rows: readonly ScoredLine[],
  columns: readonly ScoredLine[],
  units: number,
  total: number,
  reach: number,
): number {
  if (units === 0) return 1;
  const scores = (lines: readonly ScoredLine[]): number[] => lines.map(({ score }) => score);
  const share = rows.map((row) => (row.total * units) / total);
  const u = side(scores(rows), share, units);
  const v = side(
    scores(columns),
    columns.map((column) => column.total),
    units,
  );
  const deviation = Math.sqrt((u.squares * v.squares) / Math.max(1, units - 1));
  const [first, last] = [Math.min(...scores(columns)), Math.max(...scores(columns))];
  const widest = ((last - first) * rows.at(-1)!.score * units) / 4;
  return Math.min(widest, 2 * reach * deviation) + 1;
}
