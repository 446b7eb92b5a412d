// Adjusted p-values from the draws of a run: of a fixed number (b + 1) / (m + 1), under a stopping rule the upper end of limits
// that hold at every look, plus their risk - so that it does not matter which p-value ended the drawing.
import { clopperPearson } from '../pvalue/clopper-pearson.js';
import { sequentialRule } from '../pvalue/sequential/contract.js';
import { look, startInterval, type RunningInterval } from '../pvalue/sequential/running-interval.js';
import type { AdjustedP } from './adjusted-p.js';

export interface SampledAdjustment {
  /** Draws of each rank, block after block in their order. */
  add(byRank: readonly number[], draws: number): void;
  /** One for each rank, rising. */
  adjusted(): Promise<AdjustedP[]>;
}

/** @param ranks number of thresholds */
export function fixedAdjustment(ranks: number, confidence: number): SampledAdjustment {
  const atLeast = new Array<number>(ranks).fill(0);
  let made = 0;
  return {
    add(byRank, draws) {
      made += draws;
      upTo(byRank, ranks).forEach((count, rank) => (atLeast[rank]! += count));
    },
    adjusted: () =>
      Promise.all(
        atLeast.map(async (hits): Promise<AdjustedP> => {
          return {
            p: (hits + 1) / (made + 1),
            method: 'sample',
            error: {
              kind: 'sampling',
              atLeast: hits,
              draws: made,
              estimate: hits / made,
              interval: await clopperPearson(hits, made, confidence),
              confidence,
            },
          };
        }),
      ),
  };
}

/** Under a stopping rule that reads the same draws. @param alpha where the limits are made sharpest */
export function followedAdjustment(ranks: number, alpha: number, risk: number): SampledAdjustment {
  const intervals = Array.from({ length: ranks }, (): RunningInterval => startInterval(alpha, risk));
  return {
    add(byRank, draws) {
      upTo(byRank, ranks).forEach((count, rank) => (intervals[rank] = look(intervals[rank]!, count, draws)));
    },
    adjusted() {
      let least = 0;
      const found = intervals.map(({ hits, draws, lower, upper }): AdjustedP => {
        least = Math.max(least, Math.min(1, upper + risk));
        return {
          p: least,
          method: 'sample',
          error: {
            kind: 'sequential',
            rule: sequentialRule,
            level: 1 - risk,
            risk,
            atLeast: hits,
            draws,
            estimate: hits / draws,
            interval: [lower, upper],
          },
        };
      });
      return Promise.resolve(found);
    },
  };
}

/** Draws whose smallest p is at most each threshold. */
function upTo(byRank: readonly number[], ranks: number): number[] {
  let sum = 0;
  return byRank.slice(0, ranks).map((count) => (sum += count));
}
