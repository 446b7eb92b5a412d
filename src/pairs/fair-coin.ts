// The law of a fair coin: how many of m discordant pairs changed one way, when either way is as likely. Walked from the middle in
// double-double, so that every probability is right to the last bit or two.
import { DoubleDouble } from '../numeric/double-double.js';

/** C(2k, k) / 4^k: the probability that 2k throws are split evenly; k >= 0. Relative error below 3e-16. */
function evenSplit(k: number): number {
  if (k < 512) {
    const product = new DoubleDouble(1);
    for (let i = 1; i <= k; i++) product.multiply(2 * i - 1).divide(2 * i);
    return product.value;
  }
  // Stirling's series; the next term, 399/(262144 k^5), is below 1e-16.
  const x = 1 / k;
  return (1 + x * (-1 / 8 + x * (1 / 128 + x * (5 / 1024 - (21 / 32768) * x)))) / Math.sqrt(Math.PI * k);
}

/** P(X = floor(m/2)) for X binomial (m, 1/2). */
export const middleMass = (m: number): number => evenSplit(Math.ceil(m / 2));

/**
 * A walk over P(X = x) outwards from the middle, x = ceil(m/2), ceil(m/2) + 1, ..., m; the law is symmetric. The value is
 * mass.value x 2^exponent.
 */
export class OutwardWalk {
  readonly mass: DoubleDouble;
  exponent = 0;
  x: number;

  constructor(private readonly m: number) {
    this.x = Math.ceil(m / 2);
    this.mass = new DoubleDouble(middleMass(m));
  }

  /** One step outwards; false at the end, where nothing is left. */
  step(): boolean {
    if (this.x >= this.m) return false;
    this.mass.multiply(this.m - this.x).divide(this.x + 1);
    this.x++;
    if (this.mass.high < 2 ** -400) {
      this.mass.set(this.mass.high * 2 ** 400, this.mass.low * 2 ** 400);
      this.exponent -= 400;
    }
    return true;
  }
}

/** How often the walk may step before what is left is nothing beside what was added (2^-110 of it). */
export const isNothingBeside = (term: number, sum: number): boolean => term < sum * 2 ** -110;
