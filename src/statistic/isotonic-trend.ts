// Does the response rise with the groups (or fall), in steps of unknown size? The largest trend over all nondecreasing scores
// of the groups, and the largest over all nonincreasing ones. Each is reached at an isotonic regression of the groups' mean scores
// (Bartholomew 1959; Barlow, Bartholomew, Bremner & Brunk 1972): neighbours whose means go the other way are pooled, and the
// statistic is the variation of what is left.
import { lowest, toDouble, type Rational } from '../numeric/rational.js';
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Choices, Place, Roles, Statistic } from './contract.js';
import { exactSumsOfGroups, scoredResponses, slackOfSquares, sumsOfGroups } from './scored-responses.js';

export const isotonicTrend: Statistic = {
  name: 'isotonic-trend',
  sided: 'signed',
  shape: 'any',
  words: 'the largest standardised trend over monotone group scores (a rise or fall of unknown shape)',
  formula:
    'sqrt((n - 1) x sum over groups of size x (isotonic mean - overall mean)^2 / sum over units of (score - overall mean)^2), with minus for a fall; the larger of rise and fall',
  range: '-sqrt(n - 1) (falling) to sqrt(n - 1) (rising); centre 0',
  source: 'Bartholomew (1959)',
  limit: 'none',
  takes: ['groups', 'response-scores'],
  standardResponseScores: 'places',
  bind,
};

function bind(live: LiveTable, _roles: Roles, choices: Choices = {}): BoundStatistic {
  const responses = scoredResponses(live, choices, 'places');
  const { sizes, sum, spread, total } = responses;
  const exactSizes = Array.from(sizes, BigInt);
  const exactly = (counts: ArrayLike<number>, rising: boolean): Rational => {
    const sums = exactSumsOfGroups(live, responses, counts);
    return rising ? pooledExactly(sums, exactSizes) : pooledExactly(sums.toReversed(), exactSizes.toReversed());
  };
  const sums = new Float64Array(sizes.length);
  const room = { sums: new Float64Array(sizes.length), sizes: new Float64Array(sizes.length) };
  // Where a pooling was decided wrongly by rounding, the two means are so near that the square of their distance is lost in this.
  const slack = 2 * slackOfSquares(live, responses);

  const inDoubles = (counts: ArrayLike<number>): { rise: number; fall: number } => {
    sumsOfGroups(live, responses, counts, sums);
    return { rise: pooled(sums, sizes, room, true), fall: pooled(sums, sizes, room, false) };
  };
  const observed = inDoubles(live.counts);
  const observedExactly = { rise: exactly(live.counts, true), fall: exactly(live.counts, false) };
  const observedLarger = larger(observedExactly.rise, observedExactly.fall);

  const settled = (difference: number, other: () => Rational, own: Rational): Place =>
    difference > slack ? 1 : difference < -slack ? -1 : order(other(), own);

  return {
    value(counts) {
      if (spread === 0n) return 0;
      const [rise, fall] = [exactly(counts, true), exactly(counts, false)];
      const { numerator, denominator } = larger(rise, fall);
      const size = toDouble(lowest((total - 1n) * (total * numerator - sum * sum * denominator), denominator * spread));
      return order(rise, fall) < 0 ? -Math.sqrt(size) : Math.sqrt(size);
    },
    place: (counts) =>
      settled(inDoubles(counts).rise - observed.rise, () => exactly(counts, true), observedExactly.rise),
    placeLower: (counts) =>
      settled(inDoubles(counts).fall - observed.fall, () => exactly(counts, false), observedExactly.fall),
    distance(counts) {
      const { rise, fall } = inDoubles(counts);
      return settled(
        Math.max(rise, fall) - Math.max(observed.rise, observed.fall),
        () => larger(exactly(counts, true), exactly(counts, false)),
        observedLarger,
      );
    },
  };
}

function order(a: Rational, b: Rational): Place {
  const difference = a.numerator * b.denominator - b.numerator * a.denominator;
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
}

const larger = (a: Rational, b: Rational): Rational => (order(a, b) < 0 ? b : a);

/** Pool adjacent violators: sum over blocks of (sum of scores)^2 / size, block means rising (or falling). O(groups). */
function pooled(
  sums: Float64Array,
  sizes: Float64Array,
  blocks: { readonly sums: Float64Array; readonly sizes: Float64Array },
  rising: boolean,
): number {
  let top = -1;
  for (let k = 0; k < sums.length; k++) {
    const g = rising ? k : sums.length - 1 - k;
    let sum = sums[g]!;
    let size = sizes[g]!;
    while (top >= 0 && blocks.sums[top]! * size >= sum * blocks.sizes[top]!) {
      sum += blocks.sums[top]!;
      size += blocks.sizes[top]!;
      top--;
    }
    top++;
    blocks.sums[top] = sum;
    blocks.sizes[top] = size;
  }
  let all = 0;
  for (let b = 0; b <= top; b++) all += (blocks.sums[b]! * blocks.sums[b]!) / blocks.sizes[b]!;
  return all;
}

/** The same in whole numbers, as a fraction in lowest terms. */
function pooledExactly(sums: readonly bigint[], sizes: readonly bigint[]): Rational {
  const blocks: { sum: bigint; size: bigint }[] = [];
  sums.forEach((first, g) => {
    let sum = first;
    let size = sizes[g]!;
    for (let last = blocks.at(-1); last !== undefined && last.sum * size >= sum * last.size; last = blocks.at(-1)) {
      sum += last.sum;
      size += last.size;
      blocks.pop();
    }
    blocks.push({ sum, size });
  });
  return blocks.reduce<Rational>(
    ({ numerator, denominator }, { sum, size }) =>
      lowest(numerator * size + sum * sum * denominator, denominator * size),
    { numerator: 0n, denominator: 1n },
  );
}
