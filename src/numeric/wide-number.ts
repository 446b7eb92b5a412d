// Non-negative numbers with 32 digits and an exponent that cannot run out: m x 2^e with m a double-double in [1, 2).
// Null masses range from 1 to far below the smallest double; they are multiplied, added and compared here.
import { DoubleDouble } from './double-double.js';

/** Exponent of a positive normal double: x = m 2^e with m in [1, 2). */
export function exponentOf(x: number): number {
  let e = Math.floor(Math.log2(x));
  // log2 may be one off beside a power of two.
  if (x < 2 ** e) e--;
  else if (x >= 2 ** (e + 1)) e++;
  return e;
}

/** A sum of non-negative terms m 2^e of any magnitude, with double-double carry: relative error below 2^-90 for up to 2^12
 *  terms of like size and 2^-100 x terms in general. */
export class WideSum {
  private readonly sum = new DoubleDouble();
  private exponent = 0;
  private empty = true;

  /** Adds mantissa x 2^exponent; the mantissa may be any non-negative double-double of moderate size (below 2^500). */
  add(high: number, exponent: number, low = 0): void {
    if (high === 0) return;
    if (this.empty) {
      this.exponent = exponent;
      this.empty = false;
    }
    const shift = exponent - this.exponent;
    if (shift > 256) {
      const down = shift > 1000 ? 0 : 2 ** -shift;
      this.sum.set(this.sum.high * down, this.sum.low * down).addPair(high, low);
      this.exponent = exponent;
    } else if (shift >= -1000) {
      const scale = 2 ** shift;
      this.sum.addPair(high * scale, low * scale);
      if (this.sum.high > 2 ** 600) this.renormalise();
    }
  }

  addSum(other: WideSum): void {
    if (!other.empty) this.add(other.sum.high, other.exponent, other.sum.low);
  }

  private renormalise(): void {
    const e = exponentOf(this.sum.high);
    this.sum.set(this.sum.high * 2 ** -e, this.sum.low * 2 ** -e);
    this.exponent += e;
  }

  get isZero(): boolean {
    return this.empty;
  }

  /** log2 of the sum; -Infinity when nothing was added. */
  get log2(): number {
    return this.empty ? -Infinity : this.exponent + Math.log2(this.sum.high);
  }

  /** This sum over another, as a double and its common logarithm. */
  over(whole: WideSum): { value: number; log10: number } {
    if (this.empty) return { value: 0, log10: -Infinity };
    if (!this.sharesScaleWith(whole)) {
      const quotient = this.sum.high / whole.sum.high;
      const shift = this.exponent - whole.exponent;
      return { value: scaleByPower(quotient, shift), log10: Math.log10(quotient) + shift * Math.log10(2) };
    }
    const scale = 2 ** (this.exponent - whole.exponent);
    if (this.sum.high === whole.sum.high && this.sum.low === whole.sum.low && scale === 1)
      return { value: 1, log10: 0 };
    const quotient = dividePairs(this.sum, whole.sum) * scale;
    return { value: quotient, log10: Math.log10(quotient) };
  }

  /** This sum over another, less 1: keeps 90 bits where the two are nearly equal. Neither may be empty. */
  relativeDifference(other: WideSum): number {
    if (!this.sharesScaleWith(other)) return this.exponent + Math.log2(this.sum.high) < other.log2 ? -1 : Infinity;
    const scale = 2 ** (this.exponent - other.exponent);
    const difference = new DoubleDouble(this.sum.high * scale, this.sum.low * scale);
    return difference.addPair(-other.sum.high, -other.sum.low).value / other.sum.high;
  }

  private sharesScaleWith(whole: WideSum): boolean {
    return Math.abs(this.exponent - whole.exponent) < 300;
  }
}

/** Correctly rounded to within an ulp: quotient of two double-doubles. */
function dividePairs(a: DoubleDouble, b: DoubleDouble): number {
  const q = a.high / b.high;
  const rest = new DoubleDouble(b.high, b.low).multiply(q);
  const left = new DoubleDouble(a.high, a.low).addPair(-rest.high, -rest.low);
  return q + left.value / b.high;
}

/** x 2^shift without an intermediate overflow; 0 when it falls below the smallest double. */
export function scaleByPower(x: number, shift: number): number {
  let scaled = x;
  let left = shift;
  while (left < -1000 && scaled !== 0) {
    scaled *= 2 ** -1000;
    left += 1000;
  }
  while (left > 1000 && scaled !== Infinity) {
    scaled *= 2 ** 1000;
    left -= 1000;
  }
  return scaled === 0 ? 0 : scaled * 2 ** Math.max(-1074, Math.min(1023, left));
}
