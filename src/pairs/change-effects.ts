// How strong the change is: the matched odds ratio of two levels, and for each level the difference of its two shares.
import type { Effect } from '../effect/contract.js';
import type { Table } from '../table/table.js';
import { matchedDifference } from './matched-difference.js';
import { matchedOddsRatio } from './matched-odds-ratio.js';
import { normalQuantile } from './normal-quantile.js';

/** Two levels: both effects, for the first level. More: a difference for every level against the others together. */
export async function changeEffects(table: Table, confidence: number): Promise<Effect[]> {
  const z = await normalQuantile(confidence);
  const { counts, rowTotals, columnTotals, rowLabels, total } = table;
  const difference = (level: number): Effect => {
    const both = counts[level]![level]!;
    const there = rowTotals[level]! - both;
    const back = columnTotals[level]! - both;
    return matchedDifference(
      { both, there, back, neither: total - both - there - back },
      rowLabels[level]!,
      confidence,
      z,
    );
  };
  if (rowLabels.length > 2) return rowLabels.map((_, level) => difference(level));
  return [await matchedOddsRatio(counts[0]![1]!, counts[1]![0]!, confidence), difference(0)];
}
