// Several outcomes of the same subjects against one grouping: the groups are dealt to the subjects anew, all their outcomes going
// with them, so that adjusted p-values use how the outcomes hang together (Westfall & Young 1993). Subjects with the same outcomes
// are one column of a table of groups by outcome profiles; its margins hold all that is fixed, and it is never expanded.
import { drawTables } from '../draw-tables.js';
import type { JointCounts } from '../input/joint-counts.js';
import { makeTable } from '../table/table.js';
import { OutcomeValues } from './outcome-values.js';

export interface JointAnswer {
  /** Draws, the observed table not counted. */
  readonly draws: number;
  readonly outcomes: readonly JointOutcomeAnswer[];
}

export interface JointOutcomeAnswer {
  readonly label: string;
  /** Counts of this outcome: groups by levels. */
  readonly counts: number[][];
  /** Pearson's statistic; 0 where all subjects share a level. */
  readonly value: number;
  /** Draws at least as extreme: of this outcome alone; of the largest statistic, and of the smallest p, among it and those ranked
   *  behind it (never falling along the ranks). */
  readonly atLeast: number;
  readonly atLeastByLargest: number;
  readonly atLeastBySmallest: number;
}

/**
 * Step-down adjusted counts, by the largest statistic (maxT) and the smallest p (minP). Draws are made twice from the same streams:
 * once to learn each outcome's own law, once to compare. Memory: the distinct tables of each outcome.
 */
export function jointCounts(
  joint: JointCounts,
  seed: string,
  draws: number,
  onProgress?: (done: number, most: number) => void,
): JointAnswer {
  const values = joint.outcomes.map((_, k) => new OutcomeValues(joint, k));
  const table = makeTable({ counts: joint.counts });
  const each = function* (from: number): Generator<number[][]> {
    let done = from;
    for (const counts of drawTables(table, { number: draws, seed })) {
      yield counts;
      onProgress?.(++done, 2 * draws);
    }
  };
  for (const counts of each(0)) for (const outcome of values) outcome.see(counts);
  const places = placesOf(values);
  const byLargest = stepDown(values, places.statistic, places.observedStatistic);
  const bySmallest = stepDown(values, places.rarity, places.observedRarity);
  for (const counts of each(draws)) {
    const drawn = values.map((outcome) => outcome.rankOf(counts));
    byLargest.take(drawn);
    bySmallest.take(drawn);
  }
  const [largest, smallest] = [byLargest.counts(), bySmallest.counts()];
  return {
    draws,
    outcomes: values.map((outcome, k) => ({
      label: joint.outcomes[k]!.label,
      counts: outcome.observedCounts,
      value: outcome.observedValue,
      atLeast: outcome.drawsAtLeast(outcome.observedRank),
      atLeastByLargest: largest[k]!,
      atLeastBySmallest: smallest[k]!,
    })),
  };
}

interface Places {
  /** For each outcome and rank of its values: larger is more extreme, comparable between outcomes; equal means tied exactly. */
  readonly statistic: readonly Float64Array[];
  readonly rarity: readonly Float64Array[];
  readonly observedStatistic: readonly number[];
  readonly observedRarity: readonly number[];
}

function placesOf(values: readonly OutcomeValues[]): Places {
  const all = values.flatMap((outcome, k) => outcome.ranked.map((value, rank) => ({ k, rank, value })));
  all.sort((a, b) => a.value.compare(b.value));
  const statistic = values.map((outcome) => new Float64Array(outcome.ranked.length));
  let place = 0;
  all.forEach((one, at) => {
    if (at > 0 && one.value.compare(all[at - 1]!.value) !== 0) place++;
    statistic[one.k]![one.rank] = place;
  });
  // Few draws at least as extreme is rare; whole numbers, so that equal p-values tie.
  const rarity = values.map((outcome) => Float64Array.from(outcome.ranked, (_, rank) => -outcome.drawsAtLeast(rank)));
  const observed = (lists: readonly Float64Array[]): number[] =>
    values.map((outcome, k) => lists[k]![outcome.observedRank]!);
  return { statistic, rarity, observedStatistic: observed(statistic), observedRarity: observed(rarity) };
}

/** Outcomes from the most extreme on; the largest of each and those behind it is held against the one observed. */
function stepDown(values: readonly OutcomeValues[], places: readonly Float64Array[], observed: readonly number[]) {
  const order = values.map((_, k) => k).sort((a, b) => observed[b]! - observed[a]!);
  const atLeast = new Float64Array(values.length);
  return {
    take(ranks: readonly number[]): void {
      let most = -Infinity;
      for (let at = order.length - 1; at >= 0; at--) {
        const k = order[at]!;
        most = Math.max(most, places[k]![ranks[k]!]!);
        if (most >= observed[k]!) atLeast[k]!++;
      }
    },
    /** Never falling along the order. */
    counts(): number[] {
      const out = Array.from(atLeast);
      let most = 0;
      for (const k of order) out[k] = most = Math.max(most, atLeast[k]!);
      return out;
    },
  };
}
