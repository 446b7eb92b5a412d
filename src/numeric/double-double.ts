// Arithmetic with about 32 significant digits: a number held as the unevaluated sum of two doubles (Dekker 1971; Knuth
// 1969 for the error-free sum). Used where thousands of rounded steps would eat the promised twelve digits.

const splitter = 134217729; // 2^27 + 1 (Veltkamp): halves a 53-bit significand

/** Rounding error of the product a b, exactly (Dekker 1971). Valid while |a|, |b| < 2^996 and a b does not underflow. */
export function productError(a: number, b: number, product: number): number {
  const bigA = splitter * a;
  const highA = bigA - (bigA - a);
  const lowA = a - highA;
  const bigB = splitter * b;
  const highB = bigB - (bigB - b);
  const lowB = b - highB;
  return lowA * lowB - (product - highA * highB - lowA * highB - highA * lowB);
}

/** A running value of about 106 bits, changed in place so that loops allocate nothing. */
export class DoubleDouble {
  high: number;
  low: number;

  constructor(high = 0, low = 0) {
    this.high = high;
    this.low = low;
  }

  set(high: number, low = 0): this {
    this.high = high;
    this.low = low;
    return this;
  }

  /** Adds a double. Relative error 2^-104. */
  add(x: number): this {
    const sum = this.high + x;
    const part = sum - this.high;
    const error = this.high - (sum - part) + (x - part) + this.low;
    this.high = sum + error;
    this.low = error - (this.high - sum);
    return this;
  }

  /** Adds another value of this kind. */
  addPair(high: number, low: number): this {
    const sum = this.high + high;
    const part = sum - this.high;
    const error = this.high - (sum - part) + (high - part) + this.low + low;
    this.high = sum + error;
    this.low = error - (this.high - sum);
    return this;
  }

  /** Multiplies by a double. Relative error 2^-103. */
  multiply(x: number): this {
    const product = this.high * x;
    const error = productError(this.high, x, product) + this.low * x;
    this.high = product + error;
    this.low = error - (this.high - product);
    return this;
  }

  /** Divides by a double. Relative error 2^-102. */
  divide(x: number): this {
    const quotient = this.high / x;
    const product = quotient * x;
    const rest = this.high - product - productError(quotient, x, product) + this.low;
    const correction = rest / x;
    this.high = quotient + correction;
    this.low = correction - (this.high - quotient);
    return this;
  }

  get value(): number {
    return this.high + this.low;
  }
}
