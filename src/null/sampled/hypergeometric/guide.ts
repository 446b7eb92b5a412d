// One look-up in place of an inversion, for laws that depend on one number only.
// A guide table (Chen & Asau 1974): [0, 1) is cut into equal shares; each keeps the outcome at its lower end, and a flag
// if a border between outcomes lies inside. Only then the borders are searched, from that outcome on. A law is laid out when it is
// first asked for; that changes no answer.
import type { UniformSource } from '../../../random/stream.js';
import { layBinomial, layHypergeometric } from './laws.js';
import type { Range } from './spread.js';

const resolution = 2 ** -32;
/** Outcomes are counted from the least one of their cell, in the bits below the flag. */
const flag = 0x8000;
const notLaidOut = 0xffff;
export const mostOutcomes = flag - 1;

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

/** Numbers kept per cell. */
const stride = 8;

export class Guides {
  private readonly numbers: Int32Array;
  private readonly entries: Uint16Array;
  /** P(outcome <= k) for each law, over the outcomes of its cell. */
  private readonly borders: Float64Array;

  constructor(private readonly cells: readonly GuidedLaws[]) {
    let entries = 0;
    let borders = 0;
    this.numbers = Int32Array.from(
      cells.flatMap(({ varying, outcomes, shares }) => {
        const bits = Math.log2(shares);
        const starts = [entries, borders] as const;
        entries += varying.length * shares;
        borders += varying.length * outcomes.length;
        return [varying.from, varying.length, starts[0], bits, 32 - bits, outcomes.from, starts[1], outcomes.length];
      }),
    );
    this.entries = new Uint16Array(entries).fill(notLaidOut);
    this.borders = new Float64Array(borders);
  }

  /**
   * The outcome that `word` (32 random bits, signed) selects from the law at `value`; -1 when there is no law for it.
   * One more word is taken from `source` if the first cannot tell on which side of a border it lies.
   */
  select(source: UniformSource, cell: number, value: number, word: number): number {
    const { numbers } = this;
    const n = cell * stride;
    const law = value - numbers[n]!;
    if (!(law >= 0 && law < numbers[n + 1]!)) return -1;
    const entry = this.entries[numbers[n + 2]! + (law << numbers[n + 3]!) + (word >>> numbers[n + 4]!)]!;
    return numbers[n + 5]! + (entry < flag ? entry : this.search(source, cell, law, entry, word));
  }

  private search(source: UniformSource, cell: number, law: number, entry: number, word: number): number {
    const { borders, numbers } = this;
    const n = cell * stride;
    if (entry === notLaidOut) this.layOut(cell, law);
    const row = numbers[n + 6]! + law * numbers[n + 7]!;
    let u = (word >>> 0) * resolution;
    let outcome = entry === notLaidOut ? 0 : entry - flag;
    while (borders[row + outcome]! <= u) outcome++;
    if (borders[row + outcome]! - u < resolution) {
      u += resolution * source.uniform();
      while (borders[row + outcome]! <= u) outcome++;
    }
    return outcome;
  }

  private layOut(cell: number, index: number): void {
    const { law, varying, outcomes, shares } = this.cells[cell]!;
    const { borders, entries, numbers } = this;
    const value = varying.from + index;
    const start = numbers[cell * stride + 6]! + index * outcomes.length;
    const stretch = { array: borders, start, length: outcomes.length, from: outcomes.from };
    if (law.kind === 'binomial') layBinomial(stretch, value, law.share);
    else layHypergeometric(stretch, law.total, law.fixed, value);
    let last = outcomes.length - 1;
    while (borders[start + last] === 0) last--;
    for (let k = 1; k < last; k++) borders[start + k]! += borders[start + k - 1]!;
    // The last outcome takes what rounding leaves of 1, so that every search ends.
    borders.fill(2, start + last, start + outcomes.length);
    const first = numbers[cell * stride + 2]! + index * shares;
    for (let share = 0, outcome = 0; share < shares; share++) {
      while (borders[start + outcome]! <= share / shares) outcome++;
      entries[first + share] = outcome + (borders[start + outcome]! < (share + 1) / shares ? flag : 0);
    }
  }
}
