// The distinct p-values of the observed cells, smallest first, and for each of them what every cell may hold so that its own
// p stays above: the smallest p of a table is at most q exactly if some cell leaves those limits.
import type { CellLimits } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import { cellLaw, foldedCell, stepsOf, type CellLaw, type FoldedCell } from './cell-law.js';
import { compareP, type PlacedCount } from './compare-p.js';

export interface Thresholds {
  /** One observed count for each distinct p, in ascending order of p. */
  readonly places: readonly PlacedCount[];
  /** For each cell of the live table, which of them is its own. */
  readonly ofCell: readonly number[];
  readonly cells: readonly FoldedCell[];
  readonly laws: readonly CellLaw[];
}

const keyOf = ({ row, column }: FoldedCell): string => `${row},${column}`;

/** Counts walked in all; the work of `thresholdsOf`. */
export function thresholdSteps(live: LiveTable): number {
  const laws = new Map(allCells(live).map((folded) => [keyOf(folded), folded]));
  return [...laws.values()].reduce((sum, folded) => sum + stepsOf(folded), 0);
}

const allCells = (live: LiveTable): FoldedCell[] => Array.from(live.counts, (_, cell) => foldedCell(live, cell));

export function thresholdsOf(live: LiveTable): Thresholds {
  const cells = allCells(live);
  const byKey = new Map<string, CellLaw>();
  const laws = cells.map((folded) => {
    const known = byKey.get(keyOf(folded)) ?? cellLaw(folded);
    byKey.set(keyOf(folded), known);
    return known;
  });
  const own = cells.map(({ sign, shift }, cell): PlacedCount => {
    return { law: laws[cell]!, k: sign * live.counts[cell]! + shift };
  });
  const order = own.map((_, cell) => cell).sort((a, b) => compareP(own[a]!, own[b]!));
  const places: PlacedCount[] = [];
  const ofCell = new Array<number>(own.length);
  for (const cell of order) {
    const last = places.at(-1);
    if (last === undefined || compareP(own[cell]!, last) > 0) places.push(own[cell]!);
    ofCell[cell] = places.length - 1;
  }
  return { places, ofCell, cells, laws };
}

/** Counts of a folded law whose p is above that of the place: lowest > highest where there are none. */
export function keptWithin(law: CellLaw, place: PlacedCount): { lowest: number; highest: number } {
  const above = (k: number): boolean => compareP({ law, k }, place) > 0;
  const end = law.lowest + law.log2P.length - 1;
  // On either side of the mean p falls outward: bisect for the last count that is kept.
  let [inside, outside] = [law.middle, end + 1];
  while (outside - inside > 1) {
    const half = Math.floor((inside + outside) / 2);
    if (above(half)) inside = half;
    else outside = half;
  }
  const highest = inside > law.middle || above(law.middle) ? inside : law.middle - 1;
  let [kept, left] = [law.middle + 1, law.lowest - 1];
  while (kept - left > 1) {
    const half = Math.ceil((kept + left) / 2);
    if (above(half)) kept = half;
    else left = half;
  }
  return { lowest: kept, highest };
}

/** The limits of every cell of the live table for one threshold, in its own counts; none of them ties. */
export function limitsFor({ cells, laws }: Thresholds, place: PlacedCount): CellLimits {
  const found = new Map<CellLaw, { lowest: number; highest: number }>();
  const lowest = new Float64Array(cells.length);
  const highest = new Float64Array(cells.length);
  cells.forEach(({ sign, shift }, cell) => {
    const law = laws[cell]!;
    const kept = found.get(law) ?? keptWithin(law, place);
    found.set(law, kept);
    const [low, high] = sign === 1 ? [kept.lowest, kept.highest] : [kept.highest, kept.lowest];
    lowest[cell] = sign * (low - shift);
    highest[cell] = sign * (high - shift);
  });
  const none = new Uint8Array(cells.length);
  return { lowest, highest, lowestTies: none, highestTies: none };
}
