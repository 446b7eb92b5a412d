// One look-up in place of an inversion, for laws that depend on one number only and are laid out before the first draw.
// A guide table (Chen & Asau 1974): [0, 1) is cut into equal shares; each keeps the outcome at its lower end, and a flag
// if a border between outcomes lies inside. Only then the borders are searched, from that outcome on.
import type { UniformSource } from '../../../random/stream.js';
import type { Law } from './laws.js';
import type { Range } from './spread.js';

const resolution = 2 ** -32;
const flag = 0x8000;
/** Outcomes are counted from the least one of their cell, in the bits below the flag. */
export const mostOutcomes = flag;

/** The laws of one cell, one for each value of the number they depend on. */
export interface GuidedLaws {
  readonly varying: Range;
  /** What the laws give: anything outside has no mass that a double could add to 1. */
  readonly outcomes: Range;
  /** Shares per law, a power of two. */
  readonly shares: number;
  lawAt(value: number): Law;
}

/** Numbers kept per cell. */
const stride = 8;

export class Guides {
  private readonly numbers: Int32Array;
  private readonly entries: Uint16Array;
  /** P(outcome <= k) for each law, over the outcomes of its cell. */
  private readonly borders: Float64Array;

  constructor(cells: readonly GuidedLaws[]) {
    let entries = 0;
    let borders = 0;
    this.numbers = new Int32Array(cells.length * stride);
    cells.forEach(({ varying, outcomes, shares }, cell) => {
      const bits = Math.log2(shares);
      this.numbers.set([varying.from, varying.length, entries, bits, 32 - bits, outcomes.from, borders, outcomes.length], cell * stride); // prettier-ignore
      entries += varying.length * shares;
      borders += varying.length * outcomes.length;
    });
    this.entries = new Uint16Array(entries);
    this.borders = new Float64Array(borders);
    cells.forEach((laws, cell) => {
      for (let law = 0; law < laws.varying.length; law++) {
        const n = cell * stride;
        const start = this.numbers[n + 2]! + law * laws.shares;
        const row = this.numbers[n + 6]! + law * laws.outcomes.length;
        this.lay(laws.lawAt(laws.varying.from + law), laws, start, row);
      }
    });
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
    return entry < flag ? numbers[n + 5]! + entry : numbers[n + 5]! + this.search(source, n, law, entry - flag, word);
  }

  private search(source: UniformSource, n: number, law: number, first: number, word: number): number {
    const { borders, numbers } = this;
    const row = numbers[n + 6]! + law * numbers[n + 7]!;
    let u = (word >>> 0) * resolution;
    let outcome = first;
    while (borders[row + outcome]! <= u) outcome++;
    if (borders[row + outcome]! - u < resolution) {
      u += resolution * source.uniform();
      while (borders[row + outcome]! <= u) outcome++;
    }
    return outcome;
  }

  private lay({ least, masses }: Law, { outcomes, shares }: GuidedLaws, start: number, row: number): void {
    const { borders, entries } = this;
    let sum = 0;
    for (let k = 0; k < outcomes.length; k++) {
      sum += masses[outcomes.from + k - least] ?? 0;
      borders[row + k] = sum;
    }
    // The last outcome takes what rounding leaves of 1, so that every search ends.
    const last = Math.min(outcomes.length, least + masses.length - outcomes.from) - 1;
    borders.fill(2, row + last, row + outcomes.length);
    let outcome = 0;
    for (let share = 0; share < shares; share++) {
      while (borders[row + outcome]! <= share / shares) outcome++;
      entries[start + share] = outcome + (borders[row + outcome]! < (share + 1) / shares ? flag : 0);
    }
  }
}
