// McNemar without holding the number of changed pairs: with n pairs fixed, each changes with an unknown probability psi and then either way
// alike; p is the largest probability, over psi, of a statistic (b - c) / sqrt(b + c) at least as extreme (Suissa & Shuster 1991).
// The largest is certified: L(psi) = E f(M), M binomial (n, psi), 0 <= f <= F. With psi = sin^2 t and L = F sin^2 theta, the score of M
// for t has variance 4n, so by Cauchy and Schwarz |L'| <= 2 sqrt(n L (F - L)), which says |dtheta/dt| <= sqrt(n).
import { tailsByDiscordant, type PairsTail } from './standardised-tails.js';

export interface CertifiedMaximum {
  /** A value that is attained, and one that none exceeds; rounding included. */
  readonly lower: number;
  readonly upper: number;
  /** Where the lower one is attained: probability that a pair changes. */
  readonly at: number;
}

/** Pairs up to which it is worked out. */
export const mostPairs = 100_000;
/** Statistics whose p would near the end of the doubles are left to the conditional test. */
export const largestSquare = 900;

const closeEnough = 1e-6;
/** Terms added up in all; then the bracket stays as wide as it is. */
const mostTerms = 2e8;
/** What rounding does to one evaluation, at most, of its value. */
const rounding = 1e-12;

export function unconditionalMcNemar(there: number, back: number, pairs: number, tail: PairsTail): CertifiedMaximum {
  const tails = tailsByDiscordant(there, back, pairs, tail);
  const most = tails.reduce((largest, f) => Math.max(largest, f), 0);
  const law = new MixedTails(tails);
  const angle = (value: number): number => Math.asin(Math.sqrt(Math.min(1, value / most)));
  const slope = Math.sqrt(pairs);
  let best = 0;
  let at = 0;
  const look = (t: number): number => {
    const psi = Math.sin(t) ** 2;
    const value = law.at(psi);
    if (value > best) {
      best = value;
      at = psi;
    }
    return angle(value);
  };
  const pieces = 64;
  let open: Piece[] = [];
  let previous = look(0);
  for (let k = 1; k <= pieces; k++) {
    const next = look((k / pieces) * (Math.PI / 2));
    open.push({
      from: ((k - 1) / pieces) * (Math.PI / 2),
      to: (k / pieces) * (Math.PI / 2),
      first: previous,
      last: next,
    });
    previous = next;
  }
  const boundOf = ({ from, to, first, last }: Piece): number => {
    const top = Math.min(Math.PI / 2, (first + last + slope * (to - from)) / 2);
    return most * Math.sin(top) ** 2;
  };
  for (;;) {
    const goal = best * (1 + closeEnough);
    open = open.filter((piece) => boundOf(piece) > goal);
    if (open.length === 0) return bracket(best, goal, at);
    if (law.terms > mostTerms)
      return bracket(
        best,
        open.reduce((top, piece) => Math.max(top, boundOf(piece)), goal),
        at,
      );
    open = open.flatMap(({ from, to, first, last }) => {
      const middle = (from + to) / 2;
      const between = look(middle);
      return [
        { from, to: middle, first, last: between },
        { from: middle, to, first: between, last },
      ];
    });
  }
}

interface Piece {
  readonly from: number;
  readonly to: number;
  /** theta at the two ends. */
  readonly first: number;
  readonly last: number;
}

const bracket = (best: number, top: number, at: number): CertifiedMaximum => ({
  lower: best * (1 - rounding),
  upper: Math.min(1, top * (1 + rounding)),
  at,
});

/** E f(M) for M binomial (n, psi). */
class MixedTails {
  terms = 0;
  private readonly n: number;

  constructor(private readonly tails: Float64Array) {
    this.n = tails.length - 1;
  }

  /** Weights relative to that of the mode, outwards until they are nothing; what is left out weighs below 1e-20. */
  at(psi: number): number {
    const { n, tails } = this;
    if (psi <= 0) return tails[0]!;
    if (psi >= 1) return tails[n]!;
    const odds = psi / (1 - psi);
    const mode = Math.min(n, Math.floor((n + 1) * psi));
    let whole = 1;
    let sum = tails[mode]!;
    for (let m = mode, weight = 1; m < n && weight > 1e-24; this.terms++) {
      weight *= ((n - m) / (m + 1)) * odds;
      m++;
      whole += weight;
      sum += weight * tails[m]!;
    }
    for (let m = mode, weight = 1; m > 0 && weight > 1e-24; this.terms++) {
      weight *= m / (n - m + 1) / odds;
      m--;
      whole += weight;
      sum += weight * tails[m]!;
    }
    return sum / whole;
  }
}
