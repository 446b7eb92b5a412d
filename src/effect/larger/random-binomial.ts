// Binomial numbers by inversion from the mode outward (Kemp 1986): about one standard deviation of steps each, any size.
import { beyondEntropy, devianceTerm } from '../../numeric/saddle-point.js';
import type { UniformSource } from '../../random/stream.js';

/** Successes among n, 0 <= p <= 1. */
export function randomBinomial(n: number, p: number, source: UniformSource): number {
  if (n === 0 || p <= 0) return 0;
  if (p >= 1) return n;
  const mode = Math.min(n, Math.floor((n + 1) * p));
  const odds = p / (1 - p);
  const top = pointAt(n, p, mode);
  let left = uniform53(source) - top;
  if (left < 0) return mode;
  let below = top;
  let above = top;
  for (let reach = 1; mode - reach >= 0 || mode + reach <= n; reach++) {
    const up = mode + reach;
    if (up <= n) {
      above *= ((n - up + 1) / up) * odds;
      left -= above;
      if (left < 0) return up;
    }
    const down = mode - reach;
    if (down >= 0) {
      below *= (down + 1) / (n - down) / odds;
      left -= below;
      if (left < 0) return down;
    }
    // What is left is rounding.
    if (above < 1e-18 && below < 1e-18) break;
  }
  return mode;
}

/** A multiple of 2^-53 in [0, 1). */
const uniform53 = (source: UniformSource): number =>
  ((source.word() >>> 5) * 67108864 + (source.word() >>> 6)) / 9007199254740992;

/** P(k) by the saddle-point expansion (Loader 2000). */
function pointAt(n: number, p: number, k: number): number {
  return Math.exp(
    beyondEntropy(n) -
      beyondEntropy(k) -
      beyondEntropy(n - k) -
      devianceTerm(k, n * p) -
      devianceTerm(n - k, n * (1 - p)),
  );
}
