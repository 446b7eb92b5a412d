// The terms of the law of a 2x2 table's corner, one after the other, by the ratio of neighbours in double-double: the inner loop of
// every exact 2x2 p. Written out on local doubles, because a command that ends in a quarter of a second never gets its method
// calls compiled away.
import { productError } from '../../numeric/double-double.js';
import type { WideSum } from '../../numeric/wide-number.js';

/** What the terms need of the law: totals of the corner's row, of its column and of the table, and where the walk begins. */
interface Margins {
  readonly row: number;
  readonly column: number;
  readonly total: number;
  readonly middle: number;
}

const small = 2 ** -500;
const large = 2 ** 500;
/** Products of two whole numbers up to this are exact in a double. */
const exactFactor = 94_906_265;

export class CornerTerms {
  /** The count whose term is held: `high + low`, times 2^exponent, in units of the middle's. */
  at: number;
  private high = 1;
  private low = 0;
  private exponent = 0;
  private readonly row: number;
  private readonly column: number;
  /** May be negative; `rest + k` is not. */
  private readonly rest: number;
  private readonly isNarrow: boolean;

  constructor(
    { row, column, total, middle }: Margins,
    private readonly direction: 1 | -1,
  ) {
    this.at = middle;
    this.row = row;
    this.column = column;
    this.rest = total - row - column;
    this.isNarrow = total <= exactFactor;
  }

  /** Goes to a count by the base-2 logarithm of its term. */
  leapTo(count: number, log2: number): void {
    this.exponent = Math.floor(log2);
    this.high = 2 ** (log2 - this.exponent);
    this.low = 0;
    this.at = count;
  }

  /** Base-2 logarithm of the present term. */
  get log2(): number {
    return Math.log2(this.high) + this.exponent;
  }

  /**
   * Adds the terms `from` to `last` to a mass, or as far as one exponent reaches; `from` is the present count or the next.
   * @returns the count of the last term added
   */
  addThrough(from: number, last: number, mass: WideSum): number {
    const { row, column, rest, isNarrow, direction } = this;
    const turns = isNarrow ? 1 : 2;
    let { at, high, low } = this;
    let sumHigh = at === from ? high : 0;
    let sumLow = at === from ? low : 0;
    while (at !== last && high >= small) {
      const next = at + direction;
      const first = direction > 0 ? row - at : at;
      const second = direction > 0 ? column - at : rest + at;
      const third = direction > 0 ? next : row - next;
      const fourth = direction > 0 ? rest + next : column - next;
      at = next;
      for (let turn = turns; turn > 0; turn--) {
        const by = isNarrow ? first * second : turn === 2 ? first : second;
        const product = high * by;
        const error = productError(high, by, product) + low * by;
        high = product + error;
        low = error - (high - product);
      }
      for (let turn = turns; turn > 0; turn--) {
        const by = isNarrow ? third * fourth : turn === 2 ? third : fourth;
        const quotient = high / by;
        const product = quotient * by;
        const correction = (high - product - productError(quotient, by, product) + low) / by;
        high = quotient + correction;
        low = correction - (high - quotient);
      }
      const sum = sumHigh + high;
      const part = sum - sumHigh;
      const error = sumHigh - (sum - part) + (high - part) + sumLow + low;
      sumHigh = sum + error;
      sumLow = error - (sumHigh - sum);
    }
    mass.add(sumHigh, this.exponent, sumLow);
    if (high < small) {
      high *= large;
      low *= large;
      this.exponent -= 500;
    }
    this.at = at;
    this.high = high;
    this.low = low;
    return at;
  }
}
