// Why a rule of its own: what limits and p of a fixed number of draws come to when drawing stops at what they say.
import { describe, expect, it } from 'vitest';
import { clopperPearson } from '../../../src/pvalue/clopper-pearson.js';
import { mixtureAround } from '../../../src/pvalue/sequential/beta-mixture.js';
import { limitsAt } from '../../../src/pvalue/sequential/limits.js';
import { boundaries, walk, type Boundaries } from './exact-walk.js';

const alpha = 0.05;
const blockSize = 1000;

describe('stopping when the interval excludes the level, at a true p of just that level', () => {
  it('a Clopper-Pearson interval of 99% misses 8.1% of the time by 50 looks and 16% by 1,000', async () => {
    const boundary = await clopperPearsonBoundary(1000);
    const missed = (looks: number): number => {
      const { below, above } = walk(alpha, {
        blockSize,
        low: boundary.low.slice(0, looks),
        high: boundary.high.slice(0, looks),
      });
      return below + above;
    };
    expect(missed(1)).toBeLessThan(0.01);
    expect(missed(50)).toBeCloseTo(0.0815, 3);
    expect(missed(1000)).toBeCloseTo(0.1647, 3);
  });

  it('the interval of the stopping rule at 99% misses less than 1% of the time by 1,000 looks', () => {
    const mixture = mixtureAround(alpha);
    const boundary = boundaries(
      1000,
      blockSize,
      (hits, draws) => limitsAt(mixture, 0.01, hits, draws),
      ([, upper]) => upper < alpha,
      ([lower]) => lower > alpha,
    );
    const { below, above, lost } = walk(alpha, boundary);
    expect(below + above + lost).toBeLessThan(0.01);
  });

  /** Counts whose interval leaves alpha out, followed from look to look: they move by some alpha x blockSize a block. */
  async function clopperPearsonBoundary(looks: number): Promise<Boundaries> {
    const low: number[] = [];
    const high: number[] = [];
    for (let k = 1; k <= looks; k++) {
      const draws = k * blockSize;
      const spread = 2.2 * Math.sqrt(draws * alpha * (1 - alpha));
      let few = Math.floor(draws * alpha - spread);
      while ((await clopperPearson(few, draws, 0.99))[1] >= alpha) few--;
      let many = Math.ceil(draws * alpha + spread);
      while ((await clopperPearson(many, draws, 0.99))[0] <= alpha) many++;
      low.push(few);
      high.push(many);
    }
    return { blockSize, low, high };
  }
});

describe('(b + 1)/(m + 1) read at every look, until it is at or below the level', () => {
  it('is at or below 0.05 with probability above 0.057 under the null by 400 looks after 50, at most 0.05 at any one look', () => {
    const many = 400;
    const smallBlock = 50;
    const low = Array.from({ length: many }, (_, k) => Math.floor(alpha * ((k + 1) * smallBlock + 1)) - 1);
    const high = low.map(() => Infinity);
    expect(chanceUnderNull({ blockSize: smallBlock, low, high })).toBeGreaterThan(0.057);
    for (const k of [0, 19, many - 1]) {
      const onlyAt = low.map((hits, at) => (at === k ? hits : -1));
      expect(chanceUnderNull({ blockSize: smallBlock, low: onlyAt, high })).toBeLessThanOrEqual(alpha + 1e-6);
    }
  });

  /** With a true p of 1/200, 2/200 ... 1; beyond 0.2 hardly any chance is left. */
  function chanceUnderNull(boundary: Boundaries): number {
    let sum = 0;
    for (let j = 1; j <= 40; j++) sum += walk(j / 200, boundary).below;
    return sum / 200;
  }
});
