// Adjusted p-values from draws alone, for tests that compare them with exact ones.
import { cellPs } from '../../src/cell/cell-p.js';
import { rankTable } from '../../src/cell/rank-table.js';
import { fixedAdjustment } from '../../src/cell/sampled-adjustment.js';
import { thresholdsOf } from '../../src/cell/thresholds.js';
import { blocksInOrder, localSource } from '../../src/null/sampled/block-source.js';
import { rankCounts } from '../../src/null/sampled/ranked-sampler.js';
import { liveFrom } from '../helpers/tables.js';

export interface DrawnCell {
  readonly p: number;
  readonly interval: readonly [number, number];
  readonly atLeast: number;
  readonly draws: number;
}

/** One for each cell, row-major. */
export async function followDraws(counts: number[][], draws: number, seed: string): Promise<DrawnCell[]> {
  const live = liveFrom(counts);
  const thresholds = thresholdsOf(live);
  const follower = fixedAdjustment(thresholds.places.length, 0.99);
  const sampling = { seed, tableKey: '', draws };
  for await (const block of blocksInOrder(localSource(live, [], sampling, rankTable(thresholds)), sampling)) {
    follower.add(rankCounts(block.tallies, 0), block.draws);
  }
  const adjusted = await follower.adjusted();
  const own = cellPs(live);
  return thresholds.ofCell.map((threshold, cell) => {
    const { p, error } = adjusted[threshold]!;
    if (error?.kind !== 'sampling') throw new Error('drawn of a fixed number');
    return { p: Math.max(p!, own[cell]!.value), interval: error.interval, atLeast: error.atLeast, draws: error.draws };
  });
}
