// Thresholds as ranks for the sampler: a count's rank is the first threshold that its p does not exceed.
import type { CellRanks, RankTable } from '../null/sampled/ranked-sampler.js';
import type { CellLaw } from './cell-law.js';
import { keptWithin, type Thresholds } from './thresholds.js';

/** Row-major over the live table. */
export function rankTable({ places, cells, laws }: Thresholds): RankTable {
  const ofLaw = new Map<CellLaw, Uint16Array>();
  const mirrored = new Map<CellLaw, Uint16Array>();
  return {
    ranks: places.length,
    cells: cells.map(({ sign, shift }, cell): CellRanks => {
      const law = laws[cell]!;
      const ranks = ofLaw.get(law) ?? ranksOf(law, places);
      ofLaw.set(law, ranks);
      if (sign === 1) return { lowest: law.lowest - shift, ranks };
      const turned = mirrored.get(law) ?? ranks.slice().reverse();
      mirrored.set(law, turned);
      return { lowest: shift - (law.lowest + ranks.length - 1), ranks: turned };
    }),
  };
}

/** A count lies within the limits of exactly those thresholds that its p exceeds, and they come first. */
function ranksOf(law: CellLaw, places: Thresholds['places']): Uint16Array {
  const ranks = new Uint16Array(law.log2P.length);
  for (const place of places) {
    const { lowest, highest } = keptWithin(law, place);
    for (let k = lowest; k <= highest; k++) ranks[k - law.lowest]!++;
  }
  return ranks;
}
