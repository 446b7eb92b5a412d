// Decimals and fractions as people type them, read as the rational numbers they are: no rounding enters a comparison
// through the way a setting was written.
import { greatestCommonDivisor } from './greatest-common-divisor.js';

export interface Rational {
  readonly numerator: bigint;
  /** Positive. */
  readonly denominator: bigint;
}

const decimal = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,3}))?$/;

/** "2", "-0.5", "1.5e3": the number as written; undefined when it is not a decimal. */
export function decimalRational(text: string): Rational | undefined {
  const match = decimal.exec(text.trim());
  if (match === null) return undefined;
  const [, sign, whole = '', part = '', power = '0'] = match;
  if (whole === '' && part === '') return undefined;
  const digits = BigInt(`${whole}${part}`) * (sign === '-' ? -1n : 1n);
  const shift = BigInt(power) - BigInt(part.length);
  return lowest(shift >= 0n ? digits * 10n ** shift : digits, shift >= 0n ? 1n : 10n ** -shift);
}

/** A decimal, or two of them with a stroke between: "2/3". */
export function fractionRational(text: string): Rational | undefined {
  const parts = text.split('/').map(decimalRational);
  const [above, below] = parts;
  if (parts.length === 1) return above;
  if (parts.length !== 2 || above === undefined || below === undefined || below.numerator === 0n) return undefined;
  return lowest(above.numerator * below.denominator, above.denominator * below.numerator);
}

/** In lowest terms, the denominator positive; denominator not 0. */
export function lowest(numerator: bigint, denominator: bigint): Rational {
  const magnitude = (x: bigint): bigint => (x < 0n ? -x : x);
  const divisor = greatestCommonDivisor(magnitude(numerator), magnitude(denominator)) * (denominator < 0n ? -1n : 1n);
  return { numerator: numerator / divisor, denominator: denominator / divisor };
}

/** The nearest double (both parts may be far beyond the range of doubles). */
export function toDouble({ numerator, denominator }: Rational): number {
  const size = (x: bigint): number => x.toString(2).length;
  const negative = numerator < 0n;
  const top = negative ? -numerator : numerator;
  if (top <= Number.MAX_SAFE_INTEGER && denominator <= Number.MAX_SAFE_INTEGER) {
    return Number(numerator) / Number(denominator);
  }
  const shift = Math.max(0, size(denominator) - size(top) + 64);
  const drop = Math.max(0, size(top) - size(denominator) - 64);
  // 64 bits or more of the quotient, the last one set when anything is left over, so that the conversion rounds rightly.
  const divisor = denominator << BigInt(drop);
  const shifted = top << BigInt(shift);
  const quotient = (shifted / divisor) | (shifted % divisor === 0n ? 0n : 1n);
  const scaled = Number(quotient) * 2 ** (drop - shift);
  return negative ? -scaled : scaled;
}

export const rationalText = ({ numerator, denominator }: Rational): string =>
  denominator === 1n ? `${numerator}` : `${numerator}/${denominator}`;
