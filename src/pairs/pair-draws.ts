// Random tables with every n_ij + n_ji held: each changed pair is turned round or not by a fair coin. Blocks of draws are functions of
// seed, table and number alone, and are counted for both statistics at once.
import type { OrderingName } from '../null/contract.js';
import type { BlockSource } from '../null/sampled/block-source.js';
import { blockSize } from '../null/sampled/limits.js';
import { drawsInBlock, type Sampling, type Tally } from '../null/sampled/sample-cuts.js';
import { blockStream, type UniformSource } from '../random/stream.js';
import { middleMass } from './fair-coin.js';
import type { HomogeneityForm } from './homogeneity.js';
import type { DiscordantPair } from './square-table.js';
import { compareKeys, keyOf, lastOfSum, symmetryKeys } from './symmetry-keys.js';

/** Changed pairs between two levels that the look-up tables reach; together they stay under 4 MB for 20 levels of like size. */
export const mostPerPair = 1e8;

/** Draws X binomial (m, 1/2) by looking a number up among the sums of its law, nearest the middle first. */
class CoinCounts {
  private readonly borders: Float64Array;
  private readonly lowest: number;
  private readonly guide: Int32Array;

  constructor(m: number) {
    const middle = Math.ceil(m / 2);
    // Beyond 9 standard deviations lies less than 2^-59: no number of 53 bits falls there.
    const reach = Math.min(middle, Math.ceil(4.5 * Math.sqrt(m)) + 12);
    this.lowest = Math.max(0, m - middle - reach);
    const highest = Math.min(m, middle + reach);
    const masses = new Float64Array(highest - this.lowest + 1);
    for (let x = middle, mass = middleMass(m); x <= highest; x++) {
      masses[x - this.lowest] = mass;
      if (m - x >= this.lowest) masses[m - x - this.lowest] = mass;
      mass *= (m - x) / (x + 1);
    }
    let sum = 0;
    this.borders = masses.map((mass) => (sum += mass));
    this.borders[masses.length - 1] = Infinity;
    const shares = 2 ** Math.min(12, Math.ceil(Math.log2(masses.length + 1)));
    this.guide = new Int32Array(shares);
    for (let share = 0, at = 0; share < shares; share++) {
      while (this.borders[at]! <= share / shares) at++;
      this.guide[share] = at;
    }
  }

  draw(source: UniformSource): number {
    // 53 bits: a word, and 21 bits of the next.
    const u = ((source.word() >>> 0) * 2 ** 21 + (source.word() >>> 11)) * 2 ** -53;
    let at = this.guide[Math.floor(u * this.guide.length)]!;
    while (this.borders[at]! <= u) at++;
    return this.lowest + at;
  }
}

export interface PairDraws extends BlockSource {
  /** Draws one table: for each discordant pair of levels, how many went there. */
  drawSplits(stream: UniformSource): readonly number[];
}

/** Which tally answers a statistic on an ordering: Bowker's, which for two levels is McNemar's distance; Stuart's; and for two levels
 *  one way and the other. */
export const tallyFor = (statistic: string, ordering: OrderingName): number =>
  statistic === 'marginal-homogeneity'
    ? 1
    : statistic === 'mcnemar' && ordering === 'upper'
      ? 2
      : ordering === 'lower'
        ? 3
        : 0;

export function pairDraws(pairs: readonly DiscordantPair[], form: HomogeneityForm, sampling: Sampling): PairDraws {
  const coins = pairs.map(({ there, back }) => new CoinCounts(there + back));
  const placeBowker = bowkerPlace(pairs);
  const splits = new Array<number>(pairs.length).fill(0);
  const differences = new Float64Array(form.levels);
  const draw = (stream: UniformSource): void => {
    for (let k = 0; k < coins.length; k++) splits[k] = coins[k]!.draw(stream);
  };
  const placeStuart = (): number => {
    differences.fill(0);
    for (let k = 0; k < pairs.length; k++) {
      const { first, second, there, back } = pairs[k]!;
      const turned = 2 * splits[k]! - there - back;
      differences[first]! += turned;
      differences[second]! -= turned;
    }
    return form.place(differences);
  };
  const countBlock = (block: number): Tally[] => {
    const stream = blockStream(sampling.seed, sampling.tableKey, block);
    const counted = Array.from({ length: form.levels === 2 ? 4 : 2 }, (): [number, number, number] => [0, 0, 0]);
    const seen = pairs[0]?.there ?? 0;
    for (let left = drawsInBlock(sampling.draws, block); left > 0; left--) {
      draw(stream);
      counted[0]![placeBowker(splits) + 1]!++;
      counted[1]![placeStuart() + 1]!++;
      if (form.levels > 2) continue;
      const way = Math.sign((splits[0] ?? 0) - seen);
      counted[2]![way + 1]!++;
      counted[3]![1 - way]!++;
    }
    return counted;
  };
  return {
    stride: Math.max(1, Math.floor(4e8 / (blockSize * 50 * (pairs.length + 1) * 4))),
    ahead: false,
    tallies: (first, end) => Promise.resolve(Array.from({ length: end - first }, (_, k) => countBlock(first + k))),
    drawSplits(stream) {
      draw(stream);
      return [...splits];
    },
    close: () => Promise.resolve(),
  };
}

/** Exact place of a split by Bowker's statistic: keys where they reach, else whole numbers. */
function bowkerPlace(pairs: readonly DiscordantPair[]): (splits: readonly number[]) => number {
  const keys = symmetryKeys(pairs);
  const totals = pairs.map(({ there, back }) => there + back);
  if (keys === undefined) return placeInFractions(pairs, totals);
  const { weights, observed, slack } = keys;
  const rounded = weights.map(Number);
  const exactBits = slack === 0;
  return (splits) => {
    let value = 0;
    for (let k = 0; k < totals.length; k++) {
      const difference = 2 * splits[k]! - totals[k]!;
      value += difference * difference * rounded[k]!;
    }
    if (exactBits || Math.abs(value - observed.value) > slack) return Math.sign(value - observed.value);
    let last = 0;
    for (let k = 0; k < totals.length; k++) {
      last = lastOfSum(last, keyOf(BigInt(2 * splits[k]! - totals[k]!) ** 2n * weights[k]!).last);
    }
    return compareKeys(value, last, observed.value, observed.last, slack);
  };
}

/** The statistic itself in doubles; near ties over the common denominator. */
function placeInFractions(
  pairs: readonly DiscordantPair[],
  totals: readonly number[],
): (splits: readonly number[]) => number {
  const denominator = totals.reduce((all, m) => all * BigInt(m), 1n);
  const weights = totals.map((m) => denominator / BigInt(m));
  const exact = (difference: (k: number) => number): bigint =>
    weights.reduce((sum, weight, k) => sum + BigInt(difference(k)) ** 2n * weight, 0n);
  const rounded = (difference: (k: number) => number): number =>
    totals.reduce((sum, m, k) => sum + difference(k) ** 2 / m, 0);
  const seen = (k: number): number => pairs[k]!.there - pairs[k]!.back;
  const observed = { exact: exact(seen), rounded: rounded(seen) };
  return (splits) => {
    const difference = (k: number): number => 2 * splits[k]! - totals[k]!;
    const value = rounded(difference);
    const slack = (pairs.length + 4) * 2 ** -50 * (value + observed.rounded + 1);
    if (Math.abs(value - observed.rounded) > slack) return Math.sign(value - observed.rounded);
    const apart = exact(difference) - observed.exact;
    return apart > 0n ? 1 : apart < 0n ? -1 : 0;
  };
}
