// A positive number with 32 digits and an exponent that cannot run out, for products and powers.
import { DoubleDouble } from '../../numeric/double-double.js';
import { exponentOf } from '../../numeric/wide-number.js';

/** value = (high + low) 2^exponent; every operation keeps 100 bits. */
export class ScaledNumber {
  private readonly mantissa = new DoubleDouble(1);
  exponent = 0;

  get high(): number {
    return this.mantissa.high;
  }

  get low(): number {
    return this.mantissa.low;
  }

  get log2(): number {
    return Math.log2(this.mantissa.high) + this.exponent;
  }

  times(x: number): this {
    this.mantissa.multiply(x);
    return this.settle();
  }

  over(x: number): this {
    this.mantissa.divide(x);
    return this.settle();
  }

  timesPair(high: number, low: number): this {
    const { high: a, low: b } = this.mantissa;
    const rest = a * low + b * high;
    this.mantissa.set(a).multiply(high).add(rest);
    return this.settle();
  }

  timesScaled(other: ScaledNumber): this {
    this.exponent += other.exponent;
    return this.timesPair(other.high, other.low);
  }

  /** Divided by a double-double. */
  overPair(high: number, low: number): this {
    const quotient = this.mantissa.high / high;
    const back = new DoubleDouble(high, low).multiply(quotient);
    const rest = new DoubleDouble(this.mantissa.high, this.mantissa.low).addPair(-back.high, -back.low);
    this.mantissa.set(quotient).add(rest.value / high);
    return this.settle();
  }

  private settle(): this {
    const { high, low } = this.mantissa;
    if (high > 2 ** -200 && high < 2 ** 200) return this;
    const e = exponentOf(high);
    this.mantissa.set(high * 2 ** -e, low * 2 ** -e);
    this.exponent += e;
    return this;
  }
}

/** base^power for a positive double and any whole power. Relative error about |power| 2^-102. */
export function powerOf(base: number, power: number): ScaledNumber {
  const square = new ScaledNumber().times(base);
  const result = new ScaledNumber();
  let left = Math.abs(power);
  while (left > 0) {
    if (left % 2 === 1) result.timesScaled(square);
    left = Math.floor(left / 2);
    if (left > 0) {
      const { high, low, exponent } = square;
      square.timesPair(high, low);
      square.exponent += exponent;
    }
  }
  if (power >= 0) return result;
  const { high, low, exponent } = result;
  const inverse = new ScaledNumber().overPair(high, low);
  inverse.exponent -= exponent;
  return inverse;
}
