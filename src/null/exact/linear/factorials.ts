// n! as mantissa and exponent, for weights that are ratios of factorials of any size.
import { DoubleDouble } from '../../../numeric/double-double.js';

export interface Factorials {
  /** n! = mantissas[n] 2^exponents[n], mantissas in [1, 2), each within one unit in the last place. */
  readonly mantissas: Float64Array;
  readonly exponents: Float64Array;
}

/** 0! to highest!. O(highest). */
export function factorialsUpTo(highest: number): Factorials {
  const mantissas = new Float64Array(highest + 1);
  const exponents = new Float64Array(highest + 1);
  const product = new DoubleDouble(1);
  let exponent = 0;
  for (let n = 0; n <= highest; n++) {
    if (n > 0) product.multiply(n);
    while (product.high >= 2) {
      product.set(product.high / 2, product.low / 2);
      exponent++;
    }
    mantissas[n] = product.value;
    exponents[n] = exponent;
  }
  return { mantissas, exponents };
}

/** mantissa 2^exponent. */
export interface Scaled {
  mantissa: number;
  exponent: number;
}

/**
 * The share of ways in which `drawn` of `pool` units, of which `marked` are marked, hold k marked ones (the hypergeometric
 * law), as mantissa and exponent written to `into`. Relative error: nine factorials and eight roundings, below 18 units of
 * 2^-53; for one or two units drawn the ratio of two whole numbers below 2^53, one unit. Pools up to 2^25.
 */
export class HypergeometricWeights {
  private common = 1;
  private commonExponent = 0;
  private marked = 0;
  private drawn = 0;
  private pool = 0;

  constructor(private readonly factorials: Factorials) {}

  /** Units of 2^-53 that a weight may be off by. */
  static error = (drawn: number): number => (drawn < 3 ? 1 : 18);

  /** Fixes everything but k. */
  set(marked: number, drawn: number, pool: number): void {
    const { mantissas: m, exponents: e } = this.factorials;
    this.marked = marked;
    this.drawn = drawn;
    this.pool = pool;
    if (drawn < 3) return;
    this.common = (m[marked]! * m[pool - marked]! * m[drawn]! * m[pool - drawn]!) / m[pool]!;
    this.commonExponent = e[marked]! + e[pool - marked]! + e[drawn]! + e[pool - drawn]! - e[pool]!;
  }

  weigh(k: number, into: Scaled): void {
    const { mantissas: m, exponents: e } = this.factorials;
    const { marked, drawn, pool } = this;
    if (drawn < 3) {
      const others = pool - marked;
      into.exponent = 0;
      if (drawn === 0) into.mantissa = 1;
      else if (drawn === 1) into.mantissa = (k === 1 ? marked : others) / pool;
      else {
        const ways = k === 0 ? others * (others - 1) : k === 1 ? 2 * marked * others : marked * (marked - 1);
        into.mantissa = ways / (pool * (pool - 1));
      }
      return;
    }
    const rest = pool - marked - drawn + k;
    into.mantissa = this.common / (m[k]! * m[marked - k]! * m[drawn - k]! * m[rest]!);
    into.exponent = this.commonExponent - e[k]! - e[marked - k]! - e[drawn - k]! - e[rest]!;
  }
}
