// How many of t events fall into the first group when both groups have the same proportion: the hypergeometric law
// (Fisher 1935), as weights that start from its mode, so that each is right to about 4 n 2^-53.

export interface GroupLaw {
  /** Smallest and largest possible number of events in the first group. */
  readonly lowest: number;
  readonly highest: number;
  /** weights[x1 - lowest], 2^900 at the mode; 0 where below 1e-600 of it. */
  readonly weights: Float64Array;
  /** Their sum. */
  readonly whole: number;
}

const atMode = 2 ** 900;

/** O(highest - lowest). */
export function groupLaw(firstSize: number, secondSize: number, events: number): GroupLaw {
  const lowest = Math.max(0, events - secondSize);
  const highest = Math.min(firstSize, events);
  const mode = Math.min(
    highest,
    Math.max(lowest, Math.floor(((events + 1) * (firstSize + 1)) / (firstSize + secondSize + 2))),
  );
  const weights = new Float64Array(highest - lowest + 1);
  const middle = mode - lowest;
  weights[middle] = atMode;
  let whole = atMode;
  for (let x = mode; x < highest; x++) {
    const ratio = ((firstSize - x) * (events - x)) / ((x + 1) * (secondSize - events + x + 1));
    whole += weights[x + 1 - lowest] = weights[x - lowest]! * ratio;
  }
  for (let x = mode; x > lowest; x--) {
    const ratio = (x * (secondSize - events + x)) / ((firstSize - x + 1) * (events - x + 1));
    whole += weights[x - 1 - lowest] = weights[x - lowest]! * ratio;
  }
  return { lowest, highest, weights, whole };
}

/** Relative error of a quotient of sums of those weights. */
export const lawError = (firstSize: number, secondSize: number): number =>
  (5 * Math.min(firstSize, secondSize) + 20) * 2 ** -53 * 2;
