// The yardstick for the number of draws: boundaries that give a verdict and nothing else, and spend the allowed risk exactly
// where it is hardest, at the level itself (Gandy 2009), looked at after whole blocks.
import { added, blockLaw, type Boundaries, type Law } from './exact-walk.js';

interface Spending {
  readonly blocks: number;
  readonly blockSize: number;
  /** True p at which a stop below, or above, is the rarest error. */
  readonly belowAt: number;
  readonly aboveAt: number;
  /** For each side. */
  readonly risk: number;
  /** Spent by m draws: risk x m / (halfTime + m). */
  readonly halfTime: number;
}

/** The widest boundaries whose probability of being crossed by look k, at the level, is at most what may be spent by then. */
export function spentBoundaries({ blocks, blockSize, belowAt, aboveAt, risk, halfTime }: Spending): Boundaries {
  const side = (p: number): number[] => {
    const block = blockLaw(p, blockSize);
    let law: Law = { from: 0, weights: Float64Array.of(1) };
    let spent = 0;
    return Array.from({ length: blocks }, (_, k) => {
      const draws = (k + 1) * blockSize;
      const allowed = (risk * draws) / (halfTime + draws);
      const { from, weights } = added(law, block);
      let first = 0;
      for (; spent + weights[first]! <= allowed; first++) spent += weights[first]!;
      let last = weights.length;
      while (weights[last - 1]! < 1e-20) last--;
      law = { from: from + first, weights: weights.subarray(first, last) };
      return law.from - 1;
    });
  };
  // Above is below, told in misses.
  const misses = side(1 - aboveAt);
  return { blockSize, low: side(belowAt), high: misses.map((count, k) => (k + 1) * blockSize - count) };
}
