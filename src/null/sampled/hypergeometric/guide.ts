// One look-up in place of an inversion, for laws that depend on one number only.
// A guide table (Chen & Asau 1974): [0, 1) is cut into equal shares; each keeps the outcome at its lower end, and a flag
// if a border between outcomes lies inside. Only then the borders are searched, from that outcome on. A law is laid out when it is
// first asked for; that changes no answer.
import type { UniformSource } from '../../../random/stream.js';
import { layBinomial, layHypergeometric } from './laws.js';
import type { Range } from './spread.js';

const resolution = 2 ** -32;
/** Set where the share holds a border. */
const flag = 0x8000;
const notLaidOut = 0xffff;
/** Outcomes are kept in the bits below the flag. */
export const mostOutcome = flag - 2;

/** The laws of one cell, one for each value of the number they depend on. */
export interface GuidedLaws {
  readonly law: VaryingLaw;
  readonly varying: Range;
  /** What the laws give: anything outside has no mass that a double could add to 1. */
  readonly outcomes: Range;
  /** Shares per law, a power of two. */
  readonly shares: number;
}

/** A hypergeometric law with two of its numbers fixed, or a binomial one with its share fixed. */
export type VaryingLaw =
  | { readonly kind: 'hypergeometric'; readonly total: number; readonly fixed: number }
  | { readonly kind: 'binomial'; readonly share: number };

export class Guide {
  private readonly from: number;
  private readonly count: number;
  private readonly bits: number;
  private readonly entries: Uint16Array;
  /** P(outcome <= k) for each law, over the outcomes of the cell. */
  private readonly borders: Float64Array;

  constructor(private readonly laws: GuidedLaws) {
    const { varying, outcomes, shares } = laws;
    this.from = varying.from;
    this.count = varying.length;
    this.bits = Math.log2(shares);
    this.entries = new Uint16Array(varying.length * shares).fill(notLaidOut);
    this.borders = new Float64Array(varying.length * outcomes.length);
  }

  /**
   * The outcome that `word` (32 random bits, signed) selects from the law at `value`; -1 when there is no law for it. With
   * `half`, its upper 16 bits alone select, and the lower ones are left for another purpose. More bits are taken
   * from `source` where these cannot tell on which side of a border they lie.
   */
  select(source: UniformSource, value: number, word: number, half: boolean): number {
    const law = value - this.from;
    if (!(law >= 0 && law < this.count)) return -1;
    // A shift by -bits is one by 32 - bits.
    const share = (law << this.bits) + (word >>> -this.bits);
    let entry = this.entries[share]!;
    if (entry === notLaidOut) {
      // Before any bit is taken: what a draw takes from the source must not depend on the draws before it.
      this.layOut(law);
      entry = this.entries[share]!;
    }
    if (entry < flag) return entry;
    const u = half ? ((word >>> 16) + source.uniform()) / 0x10000 : (word >>> 0) * resolution;
    return this.search(source, law, entry - flag, u, half ? resolution / 0x10000 : resolution);
  }

  /** @param from the outcome at the lower end of the share. @param width u is known to lie between u and u + width. */
  private search(source: UniformSource, law: number, from: number, u: number, width: number): number {
    const { borders } = this;
    const { outcomes } = this.laws;
    const row = law * outcomes.length - outcomes.from;
    let outcome = from;
    while (borders[row + outcome]! <= u) outcome++;
    if (borders[row + outcome]! - u >= width) return outcome;
    const refined = u + width * source.uniform();
    while (borders[row + outcome]! <= refined) outcome++;
    return outcome;
  }

  private layOut(index: number): void {
    const { law, varying, outcomes, shares } = this.laws;
    const { borders, entries } = this;
    const value = varying.from + index;
    const start = index * outcomes.length;
    const stretch = { array: borders, start, length: outcomes.length, from: outcomes.from };
    if (law.kind === 'binomial') layBinomial(stretch, value, law.share);
    else layHypergeometric(stretch, law.total, law.fixed, value);
    let last = outcomes.length - 1;
    while (borders[start + last] === 0) last--;
    for (let k = 1; k < last; k++) borders[start + k]! += borders[start + k - 1]!;
    // The last outcome takes what rounding leaves of 1, so that every search ends.
    borders.fill(2, start + last, start + outcomes.length);
    for (let share = 0, k = 0; share < shares; share++) {
      while (borders[start + k]! <= share / shares) k++;
      entries[index * shares + share] = outcomes.from + k + (borders[start + k]! < (share + 1) / shares ? flag : 0);
    }
  }
}
