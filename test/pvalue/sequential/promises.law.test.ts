// The promises of the stopping rule, by exact calculation. Every probability that was too small to carry counts against them.
import { describe, expect, it } from 'vitest';
import { mixtureAround } from '../../../src/pvalue/sequential/beta-mixture.js';
import { limitsAt } from '../../../src/pvalue/sequential/limits.js';
import { boundaries, missing, roundingOfWalks, settling, walk, type Walked } from './exact-walk.js';

interface Setting {
  readonly alpha: number;
  readonly risk: number;
  readonly blockSize: number;
  readonly blocks: number;
}

// The standard, a lower level, and many looks after few draws at a large risk, where the promise is hardest to keep.
const settings: readonly Setting[] = [
  { alpha: 0.05, risk: 0.0005, blockSize: 1000, blocks: 300 },
  { alpha: 0.01, risk: 0.0001, blockSize: 1000, blocks: 300 },
  { alpha: 0.05, risk: 0.02, blockSize: 10, blocks: 2000 },
  { alpha: 0.4, risk: 0.2, blockSize: 1, blocks: 2000 },
];

const truePs = ({ alpha, risk }: Setting): number[] => [
  ...[1e-7, 1e-4, 0.5 * alpha, 0.9 * alpha, alpha - risk, alpha - risk / 2, alpha],
  ...[1.0001 * alpha, 1.1 * alpha, 2 * alpha, 0.5, 0.99],
];

const told = ({ alpha, risk, blockSize, blocks }: Setting): string =>
  `alpha ${alpha}, risk ${risk}, ${blocks} looks after ${blockSize}`;

const crossed = ({ below, above, lost }: Walked): number => below + above + lost;

describe('whatever the true p, at any look', () => {
  it.each(settings.map((setting) => [told(setting), setting] as const))(
    '%s: an interval without it is ever shown with probability at most the risk',
    (_, setting) => {
      const { alpha, risk, blockSize, blocks } = setting;
      const mixture = mixtureAround(alpha);
      for (const p of truePs(setting)) {
        const missed = crossed(walk(p, missing(blocks, blockSize, mixture, risk, p)));
        expect(missed, `p = ${p}`).toBeLessThanOrEqual(risk + roundingOfWalks);
      }
    },
  );

  it.each(settings.map((setting) => [told(setting), setting] as const))(
    '%s: it is settled on the wrong side with probability at most the risk',
    (_, setting) => {
      const { alpha, risk, blockSize, blocks } = setting;
      const boundary = settling(blocks, blockSize, mixtureAround(alpha), risk, alpha);
      for (const p of truePs(setting)) {
        const { below, above, lost } = walk(p, boundary);
        expect((p > alpha ? below : above) + lost, `p = ${p}`).toBeLessThanOrEqual(risk + roundingOfWalks);
      }
    },
  );

  it('the limits are not wider than the promise asks for by more than a factor of three in risk', () => {
    const [alpha, risk] = [0.4, 0.2];
    const missed = walk(alpha, missing(2000, 1, mixtureAround(alpha), risk, alpha));
    expect(missed.below + missed.above).toBeGreaterThan(risk / 3);
  });

  it('limits at three times the risk would break the promise, so that these tests can fail', () => {
    const [alpha, risk] = [0.4, 0.2];
    const missed = walk(alpha, missing(2000, 1, mixtureAround(alpha), 3 * risk, alpha));
    expect(missed.below + missed.above).toBeGreaterThan(risk);
  });
});

describe('the reported p, upper limit + risk', () => {
  // Under the null the true p of a test whose tables are equally likely is uniform on 1/N, 2/N ... 1; ties only make it larger.
  const equallyLikely = 200;

  it.each([
    { alpha: 0.05, risk: 0.0005, blockSize: 1000, blocks: 60 },
    { alpha: 0.05, risk: 0.01, blockSize: 50, blocks: 200 },
  ])('alpha $alpha, risk $risk: is ever at or below a with probability at most a, for any a', (setting) => {
    const { alpha, risk, blockSize, blocks } = setting;
    const mixture = mixtureAround(alpha);
    for (const a of [0.002, 0.005, 0.01, 0.025, 0.05, 0.1, 0.25]) {
      const boundary = boundaries(
        blocks,
        blockSize,
        (hits, draws) => limitsAt(mixture, risk, hits, draws),
        ([, upper]) => upper + risk <= a,
        () => false,
      );
      expect(chanceUnderNull(boundary), `a = ${a}`).toBeLessThanOrEqual(a + roundingOfWalks);
    }
  });

  it('keeps most of the level: at or below 0.05 with probability above 0.043 by 60,000 draws', () => {
    const boundary = settling(60, 1000, mixtureAround(0.05), 0.0005, 0.05);
    expect(chanceUnderNull({ ...boundary, high: boundary.high.map(() => Infinity) })).toBeGreaterThan(0.043);
  });

  function chanceUnderNull(boundary: Parameters<typeof walk>[1]): number {
    let sum = 0;
    for (let j = 1; j <= equallyLikely; j++) {
      // A true p of 1 hits always.
      const { below, lost } = j === equallyLikely ? { below: 0, lost: 0 } : walk(j / equallyLikely, boundary);
      sum += below + lost;
      // From here on it only gets rarer.
      if (below < 1e-13) return (sum + (below + lost) * (equallyLikely - j)) / equallyLikely;
    }
    return sum / equallyLikely;
  }
});

describe('the doubled rule', () => {
  it('keeps its promise when the tails share the draws: hits of one are misses of the other', () => {
    const [alpha, risk, blockSize, blocks] = [0.05, 0.005, 100, 400];
    const mixture = mixtureAround(alpha / 2);
    const doubled = (hits: number, draws: number): [number, number] => {
      const [one, other] = [hits, draws - hits].map((count) => limitsAt(mixture, risk / 2, count, draws));
      return [Math.min(1, 2 * Math.min(one![0], other![0])), Math.min(1, 2 * Math.min(one![1], other![1]))];
    };
    for (const p of [0.001, 0.02, 0.025, 0.0275, 0.2, 0.5]) {
      const truth = 2 * p;
      const nearSide = boundaries(
        blocks,
        blockSize,
        (hits, draws) => doubled(Math.min(hits, Math.floor(draws / 2)), draws),
        ([, upper]) => upper < truth,
        ([lower]) => lower > truth,
      );
      // The far side mirrors the near one; what lies beyond a lower limit too high is counted as missed altogether.
      const high = nearSide.high.map((hits, k) =>
        nearSide.low[k]! < 0 ? hits : Math.min(hits, (k + 1) * blockSize - nearSide.low[k]!),
      );
      const missed = crossed(walk(p, { ...nearSide, high }));
      expect(missed, `p = ${p}`).toBeLessThanOrEqual(risk + roundingOfWalks);
    }
  });
});
