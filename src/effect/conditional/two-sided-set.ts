// The odds ratios that a two-sided rule does not reject, given all margins: for the rule `probability` (Sterne 1954;
// Baptista & Pike 1977) and for `blaker` (Blaker 2000). On the upper side the counts as extreme as a are those up to a and
// those from some m on; m rises with psi at crossings x_m. Between two crossings p is smooth and falls, then rises; so the
// set is found piece by piece, whole blocks of pieces being settled by bounds.
import { exactUpperEnd, startFor } from './central.js';
import { logStep, mirrored, tally, type OddsLaw, type Tally } from './odds-law.js';
import { lastWhere, rootOfIncreasing } from './root.js';

export type TwoSidedSetRule = 'probability' | 'blaker';

export interface TwoSidedSet {
  /** Ends of the hull, in ln psi. */
  readonly lower: number;
  readonly upper: number;
  readonly hasGap: boolean;
}

/** The hull of all ln psi with p(psi) > alpha. */
export function twoSidedSet(law: OddsLaw, rule: TwoSidedSetRule, alpha: number): TwoSidedSet {
  const upper = new UpperSide(law, rule, alpha).end();
  const lower = new UpperSide(mirrored(law), rule, alpha).end();
  return { lower: -lower.end, upper: upper.end, hasGap: lower.hasGap || upper.hasGap };
}

const whole = ({ lower, at, middle, upper }: Tally): number => lower + at + middle + upper;

/** Values of psi from where the observed count is the most probable (or the median) upward. */
class UpperSide {
  private readonly crossings = new Map<number, number>();
  /** ln P(k) - ln P(a) at psi = 1 for k = a, a + 1, ... */
  private readonly logWeights = [0];

  constructor(
    private readonly law: OddsLaw,
    private readonly rule: TwoSidedSetRule,
    private readonly alpha: number,
  ) {}

  end(): { end: number; hasGap: boolean } {
    const { observed, highest } = this.law;
    if (observed === highest) return { end: Infinity, hasGap: false };
    const oneTailed = exactUpperEnd(this.law, this.alpha);
    const top = this.topPiece();
    // Beyond the last crossing only the counts up to a are as extreme.
    const beyondAll = top === highest && oneTailed > this.crossing(highest);
    const found = beyondAll ? { end: oneTailed, piece: highest + 1 } : this.topmost(observed + 1, top);
    // Up to the one-tailed limit the counts up to a alone have more than alpha.
    const from = this.pieceAt(oneTailed, found.piece);
    return { end: found.end, hasGap: from <= found.piece && this.dips(from, found.piece, found.end) };
  }

  /** P(count <= a or count >= m) at x. */
  private pWith(x: number, m: number): number {
    const sums = tally(this.law, x, m);
    return (sums.lower + sums.at + sums.upper) / whole(sums);
  }

  /** Above this ln psi the count m is less extreme than a. */
  private crossing(m: number): number {
    const { observed, highest } = this.law;
    if (m > highest) return Infinity;
    const known = this.crossings.get(m);
    if (known !== undefined) return known;
    const x = this.rule === 'probability' ? -this.logWeight(m) / (m - observed) : this.tailCrossing(m);
    this.crossings.set(m, x);
    return x;
  }

  private logWeight(m: number): number {
    const weights = this.logWeights;
    const a = this.law.observed;
    for (let k = a + weights.length; k <= m; k++) weights.push(weights.at(-1)! + logStep(this.law, k - 1));
    return weights[m - a]!;
  }

  /** P(count >= m) = P(count <= a). */
  private tailCrossing(m: number): number {
    const nearest = this.crossings.get(m - 1) ?? this.crossings.get(m + 1);
    return rootOfIncreasing(
      (x) => {
        const sums = tally(this.law, x, m);
        const lower = sums.lower + sums.at;
        return {
          value: Math.log(sums.upper / lower),
          slope: sums.upperFirst / sums.upper + sums.lowerFirst / lower,
        };
      },
      nearest ?? startFor(this.law),
    );
  }

  /** A piece above which p is at most alpha: there are at most `highest - lowest + 1` counts as extreme, none of them more
   *  probable than a (rule probability), or p is at most twice the tail (blaker). The last piece when there is none. */
  private topPiece(): number {
    const { observed, lowest, highest } = this.law;
    const enough = (m: number): boolean => {
      const sums = tally(this.law, this.crossing(m), m);
      const share = this.rule === 'probability' ? (highest - lowest + 1) * sums.at : 2 * (sums.lower + sums.at);
      return share <= this.alpha * whole(sums);
    };
    for (let reach = 1; observed + reach < highest; reach *= 2) if (enough(observed + reach)) return observed + reach;
    return highest;
  }

  /** The first piece whose right end is at or above x, at most `last`. */
  private pieceAt(x: number, last: number): number {
    let low = this.law.observed + 1;
    let high = last;
    while (low < high) {
      const middle = low + Math.floor((high - low) / 2);
      if (this.crossing(middle) >= x) high = middle;
      else low = middle + 1;
    }
    return low;
  }

  /** Supremum of p > alpha among the pieces from..to; the first piece of all is one where p = 1. */
  private topmost(from: number, to: number): { end: number; piece: number } {
    return this.topWithin(from, to) ?? { end: this.crossing(from), piece: from };
  }

  private topWithin(from: number, to: number): { end: number; piece: number } | undefined {
    if (from === to) return this.topOfPiece(from);
    if (from > this.law.observed + 1 && this.mostOn(from, to) <= this.alpha) return undefined;
    const middle = from + Math.floor((to - from) / 2);
    return this.topWithin(middle + 1, to) ?? this.topWithin(from, middle);
  }

  private topOfPiece(m: number): { end: number; piece: number } | undefined {
    const right = this.crossing(m);
    if (m === this.law.observed + 1 || this.pWith(right, m) > this.alpha) return { end: right, piece: m };
    const left = this.crossing(m - 1);
    if (this.pWith(left, m) <= this.alpha) return undefined;
    return { end: lastWhere((x) => this.pWith(x, m) > this.alpha, left, right), piece: m };
  }

  /** Bounds on p over the pieces from..to: the lower tail falls with psi, every upper tail rises with it. */
  private mostOn(from: number, to: number): number {
    return this.lowerTail(this.crossing(from - 1)) + this.upperTail(this.crossing(to), from);
  }

  private leastOn(from: number, to: number): number {
    return this.lowerTail(this.crossing(to)) + this.upperTail(this.crossing(from - 1), to);
  }

  private lowerTail(x: number): number {
    const sums = tally(this.law, x, this.law.observed + 1);
    return (sums.lower + sums.at) / whole(sums);
  }

  private upperTail(x: number, m: number): number {
    const sums = tally(this.law, x, m);
    return sums.upper / whole(sums);
  }

  /** Whether p <= alpha somewhere on the pieces from..to, below `end`. */
  private dips(from: number, to: number, end: number): boolean {
    if (from <= this.law.observed + 1) return from < to && this.dips(from + 1, to, end);
    if (from < to && this.crossing(to) < Infinity && this.leastOn(from, to) > this.alpha) return false;
    if (from < to) {
      const middle = from + Math.floor((to - from) / 2);
      return this.dips(from, middle, end) || this.dips(middle + 1, to, end);
    }
    return this.dipsInPiece(from, Math.min(end, this.crossing(from)), end);
  }

  private dipsInPiece(m: number, right: number, end: number): boolean {
    const left = this.crossing(m - 1);
    if (left >= end) return false;
    if (this.pWith(left, m) <= this.alpha) return true;
    if (right < end && this.pWith(right, m) <= this.alpha) return true;
    const falls = (x: number): boolean => this.fallsAt(x, m);
    if (!falls(left) || falls(right)) return false;
    return this.pWith(lastWhere(falls, left, right), m) <= this.alpha;
  }

  /** p falls where the mean of the counts in between exceeds the mean of all. */
  private fallsAt(x: number, m: number): boolean {
    const sums = tally(this.law, x, m);
    if (sums.middle === 0) return false;
    const mean = (sums.middleFirst + sums.upperFirst - sums.lowerFirst) / whole(sums);
    return sums.middleFirst / sums.middle > mean;
  }
}
