// Probabilities that inversion and rejection rest on, against quotients of whole numbers.
import { describe, expect, it } from 'vitest';
import { exponentialOfNegative } from '../../../src/null/sampled/hypergeometric/exponential.js';
import { HypergeometricMass } from '../../../src/null/sampled/hypergeometric/mass.js';
import { modeOf } from '../../../src/null/sampled/hypergeometric/spread.js';

const binomial = (n: number, k: number): bigint => {
  let result = 1n;
  for (let i = 1n; i <= BigInt(Math.min(k, n - k)); i++) result = (result * (BigInt(n) - i + 1n)) / i;
  return result;
};

const quotient = (a: bigint, b: bigint): number => {
  const shift = BigInt(Math.max(0, b.toString(2).length - a.toString(2).length + 64));
  return Number((a << shift) / b) / 2 ** Number(shift);
};

/** P(x), in whole numbers until the last step. */
const exactly = (total: number, marked: number, drawn: number, x: number): number =>
  quotient(binomial(marked, x) * binomial(total - marked, drawn - x), binomial(total, drawn));

/** P(x)/P(mode) by the ratios of neighbours. */
function exactRatio(total: number, marked: number, drawn: number, mode: number, x: number): number {
  let above = 1n;
  let below = 1n;
  const [k, n, rest] = [BigInt(marked), BigInt(drawn), BigInt(total - marked - drawn)];
  const [from, to] = x >= mode ? [mode, x] : [x, mode];
  for (let i = BigInt(from); i < BigInt(to); i++) {
    above *= (k - i) * (n - i);
    below *= (i + 1n) * (rest + i + 1n);
  }
  return x >= mode ? quotient(above, below) : quotient(below, above);
}

const relative = (got: number, wanted: number): number => (got === wanted ? 0 : Math.abs(got - wanted) / wanted);

describe('the mass at a point', () => {
  it.each([
    [20, 8, 9],
    [592, 220, 108],
    [65_535, 30_000, 400],
    [65_536, 30_000, 400],
    [2 ** 31, 2 ** 30, 30],
    [10_000_000, 4000, 900],
    [2 ** 53 - 1, 2 ** 52, 50],
    [2 ** 53 - 1, 3, 2 ** 52],
  ])('of %d units, %d marked, %d drawn, is right to 1e-8 around the mode', (total, marked, drawn) => {
    const mass = new HypergeometricMass(total);
    const mode = modeOf(total, marked, drawn);
    for (const x of [0, mode - 3, mode, mode + 1, mode + 7, Math.min(marked, drawn)]) {
      if (x < 0 || x > Math.min(marked, drawn)) continue;
      const wanted = marked < drawn ? exactly(total, drawn, marked, x) : exactly(total, marked, drawn, x);
      expect(relative(mass.at(total, marked, drawn, x), wanted), `P(${x})`).toBeLessThan(wanted < 1e-26 ? 1.1 : 1e-8);
    }
  });

  it.each([
    [45_000, 16_000, 20_000],
    [65_536, 16_000, 20_000],
    [2 ** 31, 2 ** 30, 2 ** 20],
    [2 ** 40, 2 ** 39, 2 ** 38],
    [2 ** 53 - 1, 2 ** 52, 2 ** 51],
    [2 ** 53 - 1, 2 ** 52, 2 ** 27],
  ])('relative to the mode, of %d units, %d marked, %d drawn, is right to 1e-8', (total, marked, drawn) => {
    const mass = new HypergeometricMass(total);
    const mode = modeOf(total, marked, drawn);
    for (const steps of [-3000, -1000, -200, -1, 0, 1, 17, 200, 1000, 3000]) {
      const wanted = exactRatio(total, marked, drawn, mode, mode + steps);
      const got = mass.relativeTo(mode, total, marked, drawn, mode + steps);
      if (wanted < 1e-26) expect(got).toBeLessThan(1e-25);
      else expect(relative(got, wanted), `${steps} steps`).toBeLessThan(1e-8);
    }
  });
});

describe('the exponential of a negative number', () => {
  it('is right to 1e-13 down to -60 and 0 below', () => {
    for (let y = 0; y > -60; y -= 0.0137) {
      expect(relative(exponentialOfNegative(y), Math.exp(y)), String(y)).toBeLessThan(1e-13);
    }
    expect(exponentialOfNegative(-60.001)).toBe(0);
    expect(exponentialOfNegative(0)).toBe(1);
    expect(exponentialOfNegative(1e-12)).toBe(1 + 1e-12);
  });
});
