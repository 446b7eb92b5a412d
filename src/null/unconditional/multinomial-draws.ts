// Tables of a fixed total drawn from given cell probabilities (a multinomial), cell by cell as binomials from what is left:
// each by inversion from its mode, one uniform number of 64 bits a cell, about as many steps as its standard deviation.
import { logFactorial } from '../../numeric/log-factorial.js';
import type { UniformSource } from '../../random/stream.js';

export class MultinomialDrawer {
  /** Probability of each cell among those from it on. */
  private readonly shares: Float64Array;

  constructor(
    private readonly total: number,
    probabilities: ArrayLike<number>,
  ) {
    this.shares = new Float64Array(probabilities.length);
    let rest = 0;
    for (let k = probabilities.length - 1; k >= 0; k--) {
      rest += probabilities[k]!;
      this.shares[k] = rest === 0 ? 0 : Math.min(1, probabilities[k]! / rest);
    }
  }

  draw(stream: UniformSource, into: Float64Array): void {
    let left = this.total;
    const last = this.shares.length - 1;
    for (let k = 0; k < last; k++) {
      const count = binomial(stream, left, this.shares[k]!);
      into[k] = count;
      left -= count;
    }
    into[last] = left;
  }
}

/** A binomial count; the uniform number is used up from the mode outward, so that the sum of all steps is 1. */
function binomial(stream: UniformSource, units: number, share: number): number {
  if (units === 0 || share === 0) return 0;
  if (share === 1) return units;
  const mode = Math.min(units, Math.floor((units + 1) * share));
  const odds = share / (1 - share);
  const atMode = Math.exp(
    logFactorial(units) -
      logFactorial(mode) -
      logFactorial(units - mode) +
      mode * Math.log(share) +
      (units - mode) * Math.log1p(-share),
  );
  let left = stream.uniform() + stream.uniform() * 2 ** -32 - atMode;
  if (left < 0) return mode;
  let [up, down] = [mode, mode];
  let [above, below] = [atMode, atMode];
  while (up < units || down > 0) {
    if (up < units) {
      above *= ((units - up) / (up + 1)) * odds;
      up++;
      left -= above;
      if (left < 0) return up;
    }
    if (down > 0) {
      below *= down / ((units - down + 1) * odds);
      down--;
      left -= below;
      if (left < 0) return down;
    }
    if (above < 1e-18 && below < 1e-18) break;
  }
  return mode;
}
