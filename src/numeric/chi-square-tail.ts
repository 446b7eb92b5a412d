// Tails of the chi-square and normal distributions that stay right where they are tiny, with their logarithms.
// Ours, because the packaged ones either round small upper tails to 0 or cost half a start of the program to load.
import { logFactorial } from './log-factorial.js';
import { devianceTerm, stirlingError } from './saddle-point.js';

export interface Tail {
  /** 0 when below the smallest double; then see ln. */
  readonly p: number;
  readonly ln: number;
}

/**
 * P(X >= x) for X chi-square with whole df >= 1, x >= 0 (may be Infinity). Relative error below 1e-13 while x < 1,000
 * and below 1e-16 x beyond. Upper incomplete gamma function: power series below its middle, else a continued fraction
 * (Legendre's) by the modified Lentz method (Thompson & Barnett 1986).
 */
export function chiSquareUpperTail(x: number, df: number): Tail {
  if (x <= 0) return { p: 1, ln: 0 };
  if (x === Infinity) return { p: 0, ln: -Infinity };
  const a = df / 2;
  const half = x / 2;
  if (half < a + 1) {
    const p = 1 - lowerBySeries(a, half);
    return { p, ln: Math.log(p) };
  }
  const ln = logPrefix(a, half) + Math.log(continuedFraction(a, half));
  return { p: Math.exp(ln), ln };
}

/** P(X <= x) for X chi-square, the complement of the upper tail (absolute error 1e-15 where it is near 1). */
export function chiSquareLowerTail(x: number, df: number): Tail {
  if (x <= 0) return { p: 0, ln: -Infinity };
  const half = x / 2;
  if (half < df / 2 + 1) {
    const p = lowerBySeries(df / 2, half);
    return { p, ln: Math.log(p) };
  }
  const p = 1 - chiSquareUpperTail(x, df).p;
  return { p, ln: Math.log(p) };
}

/** P(Z >= z) for a standard normal Z; half of a chi-square tail with one degree of freedom, since Z^2 has that law. */
export function normalUpperTail(z: number): Tail {
  const { p, ln } = chiSquareUpperTail(z * z, 1);
  if (z >= 0) return { p: p / 2, ln: ln - Math.LN2 };
  return { p: 1 - p / 2, ln: Math.log1p(-p / 2) };
}

/** ln of x^a e^-x / Gamma(a), for a a multiple of 1/2. */
function logPrefix(a: number, x: number): number {
  if (a >= 16) {
    // Gamma(a + 1) = sqrt(2 pi a) (a/e)^a e^delta: nothing large is left to cancel.
    return 0.5 * Math.log(a / (2 * Math.PI)) - devianceTerm(a, x) - stirlingError(a);
  }
  return a * Math.log(x) - x - logGammaOfHalves(a);
}

function logGammaOfHalves(a: number): number {
  if (Number.isInteger(a)) return logFactorial(a - 1);
  let gamma = Math.sqrt(Math.PI);
  for (let k = 0.5; k < a; k++) gamma *= k;
  return Math.log(gamma);
}

/** Lower tail: prefix / a x (1 + x/(a+1) + x^2/((a+1)(a+2)) + ...). */
function lowerBySeries(a: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let k = a + 1; term > sum * 1e-17; k++) {
    term *= x / k;
    sum += term;
  }
  return (sum / a) * Math.exp(logPrefix(a, x));
}

/** 1/(x+1-a - 1(1-a)/(x+3-a - 2(2-a)/(x+5-a - ...))). */
function continuedFraction(a: number, x: number): number {
  let b = x + 1 - a;
  let c = 1e300;
  let d = 1 / b;
  let value = d;
  for (let k = 1; k < 100_000; k++) {
    const factor = -k * (k - a);
    b += 2;
    d = 1 / (factor * d + b || 1e-300);
    c = b + factor / c || 1e-300;
    const step = d * c;
    value *= step;
    if (Math.abs(step - 1) < 1e-16) break;
  }
  return value;
}
