// The percentile bootstrap (Efron 1979): tables of n independent units drawn from the shares seen, the measure of each, and the
// share of the middle ones asked for. Drawn in numbered blocks, so that the same seed gives the same limits anywhere.
import { blockStream, type UniformSource } from '../../random/stream.js';
import { liveTable, type LiveTable } from '../../table/live-table.js';
import { makeTable } from '../../table/table.js';
import { randomBinomial } from './random-binomial.js';

/** Tables in a block. */
const blockSize = 100;

export interface Resampling {
  readonly draws: number;
  readonly seed: string;
  readonly tableKey: string;
}

/**
 * Lower and upper limit; resampled tables for which the measure has no value count as `otherwise`.
 * @param measure of the resampled table, its empty lines left out.
 */
export function bootstrapLimits(
  live: LiveTable,
  measure: (resampled: LiveTable) => number | undefined,
  otherwise: number,
  confidence: number,
  { draws, seed, tableKey }: Resampling,
): [number, number] {
  const values = new Float64Array(draws);
  for (let block = 0; block * blockSize < draws; block++) {
    // The word keeps these streams apart from those that p-values are drawn from.
    const source = blockStream(seed, `${tableKey}/bootstrap`, block);
    for (let k = block * blockSize; k < Math.min(draws, (block + 1) * blockSize); k++) {
      const counts = resampled(live, source);
      values[k] = measure(counts) ?? otherwise;
    }
  }
  values.sort();
  const outside = Math.max(1, Math.floor(((draws + 1) * (1 - confidence)) / 2));
  return [values[outside - 1]!, values[draws - outside]!];
}

/** n units over the cells, with the shares of the table seen: cell by cell, what is left of the units. */
function resampled({ rows, columns, counts, total }: LiveTable, source: UniformSource): LiveTable {
  let left = total;
  let weightLeft = total;
  const drawn = Array.from({ length: rows }, (_, i) =>
    Array.from({ length: columns }, (__, j) => {
      const weight = counts[i * columns + j]!;
      const count = weight === weightLeft ? left : randomBinomial(left, weight / weightLeft, source);
      left -= count;
      weightLeft -= weight;
      return count;
    }),
  );
  return liveTable(makeTable({ counts: drawn }));
}
