// One hypergeometric count from one uniform number, by adding up the law outwards from its mode until the number is passed:
// mode, mode + 1, mode - 1, mode + 2, ... The steps grow with the spread of the law; for wide laws `rejection` is cheaper.
// The number has 32 bits; where they cannot tell two outcomes apart 32 more are drawn, so that rare outcomes keep their mass.
import type { UniformSource } from '../../../random/stream.js';
import type { HypergeometricMass } from './mass.js';
import { modeOf } from './spread.js';

const resolution = 2 ** -32;

/** Once both ends of the walk are below this, what is left of 1 is rounding (at most 1e-8) and goes to the mode. */
export const negligibleMass = 1e-19;

/**
 * The outcome that a random word (32 bits, signed) selects in the law of (total, marked, drawn). A function of its arguments
 * alone, except that one more word is taken from `source` when the first one cannot tell on which side of a border it is.
 */
export function invert(
  source: UniformSource,
  word: number,
  mass: HypergeometricMass,
  total: number,
  marked: number,
  drawn: number,
): number {
  const mode = modeOf(total, marked, drawn);
  let sum = mass.at(total, marked, drawn, mode);
  let value = (word >>> 0) * resolution;
  let settled = false;
  if (value < sum) {
    if (sum - value >= resolution) return mode;
    value += resolution * source.uniform();
    settled = true;
    if (value < sum) return mode;
  }
  // The four cells at the last outcome above and below the mode; a ratio is 0 at the end of the support, and so are the masses
  // beyond it.
  let up = sum;
  let upIn = mode;
  let upMarked = marked - mode;
  let upDrawn = drawn - mode;
  let upRest = total - marked - drawn + mode;
  let down = sum;
  let downIn = upIn;
  let downMarked = upMarked;
  let downDrawn = upDrawn;
  let downRest = upRest;
  for (;;) {
    up *= (upMarked * upDrawn) / ((upIn + 1) * (upRest + 1));
    upIn += 1;
    upMarked -= 1;
    upDrawn -= 1;
    upRest += 1;
    sum += up;
    if (value < sum) {
      if (settled || sum - value >= resolution) return upIn;
      value += resolution * source.uniform();
      settled = true;
      if (value < sum) return upIn;
    }
    down *= (downIn * downRest) / ((downMarked + 1) * (downDrawn + 1));
    downIn -= 1;
    downMarked += 1;
    downDrawn += 1;
    downRest -= 1;
    sum += down;
    if (value < sum) {
      if (settled || sum - value >= resolution) return downIn;
      value += resolution * source.uniform();
      settled = true;
      if (value < sum) return downIn;
    }
    if (up + down < negligibleMass) return mode;
  }
}
