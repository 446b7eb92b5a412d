// How many more draws would settle a p against its level, if it is what it looks like so far.
import { allowedDeviance, deviance } from './limits.js';
import type { RunningInterval } from './running-interval.js';

/** Below `settledBelow` a p counts as below the level, above `settledAbove` as above it; settledBelow <= settledAbove. */
export interface Bounds {
  readonly settledBelow: number;
  readonly settledAbove: number;
}

/**
 * More draws after which the interval around the present share would just leave the nearer bound out: draws x (deviance
 * for one draw) = allowed deviance, which grows with ln draws. In whole blocks, rounded up to two digits. null where the
 * share lies between the bounds, or so near to one that 2^53 draws are not enough. A guide, not a promise: the share will move.
 */
export function drawsStillNeeded(
  { mixture, risk, hits, draws }: RunningInterval,
  { settledBelow, settledAbove }: Bounds,
  blockSize: number,
): number | null {
  const share = hits / draws;
  if (share >= settledBelow && share <= settledAbove) return null;
  const perDraw = deviance(share, 1, share < settledBelow ? settledBelow : settledAbove);
  let needed = draws;
  for (let step = 0; step < 200; step++) {
    // Starts below the answer and climbs to it: what is allowed grows far more slowly than the number of draws.
    const next = allowedDeviance(mixture, risk, share * needed, needed) / perDraw;
    if (next > Number.MAX_SAFE_INTEGER) return null;
    if (next <= needed * (1 + 1e-3)) break;
    needed = next;
  }
  return roundedUp(Math.max(1, Math.ceil((needed - draws) / blockSize)) * blockSize, blockSize);
}

/** To two significant digits, and whole blocks. */
function roundedUp(draws: number, blockSize: number): number {
  const step = Math.max(blockSize, 10 ** (Math.floor(Math.log10(draws)) - 1));
  return Math.ceil(Math.ceil(draws / step) * (step / blockSize)) * blockSize;
}
