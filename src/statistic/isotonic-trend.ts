// Does the response rise with the groups, in steps of unknown size? The largest trend over all nondecreasing scores of the
// groups. It is reached at the isotonic regression of the groups' mean scores (Bartholomew 1959; Barlow, Bartholomew, Bremner &
// Brunk 1972): neighbours whose means fall are pooled, and the statistic is the variation of what is left.
import { lowest, toDouble, type Rational } from '../numeric/rational.js';
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Choices, Place, Roles, Statistic } from './contract.js';
import { exactSumsOfGroups, scoredResponses, slackOfSquares, sumsOfGroups } from './scored-responses.js';

export const isotonicTrend: Statistic = {
  name: 'isotonic-trend',
  sided: 'upper',
  shape: 'any',
  words: 'the largest standardised trend over nondecreasing group scores (a rise of unknown shape)',
  formula:
    'sqrt((n - 1) x sum over groups of size x (isotonic mean - overall mean)^2 / sum over units of (score - overall mean)^2)',
  range: '0 (no rise anywhere) to sqrt(n - 1)',
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
  const exactly = (counts: ArrayLike<number>): Rational =>
    pooledExactly(exactSumsOfGroups(live, responses, counts), exactSizes);
  const sums = new Float64Array(sizes.length);
  const blocks = { sums: new Float64Array(sizes.length), sizes: new Float64Array(sizes.length) };
  const inDoubles = (counts: ArrayLike<number>): number => {
    sumsOfGroups(live, responses, counts, sums);
    return pooled(sums, sizes, blocks);
  };
  const observed = inDoubles(live.counts);
  const observedExactly = exactly(live.counts);
  // Where a pooling was decided wrongly by rounding, the two means are so near that the square of their distance is lost in this.
  const slack = 2 * slackOfSquares(live, responses);
  return {
    value(counts) {
      if (spread === 0n) return 0;
      const { numerator, denominator } = exactly(counts);
      return Math.sqrt(
        toDouble(lowest((total - 1n) * (total * numerator - sum * sum * denominator), denominator * spread)),
      );
    },
    place(counts): Place {
      const difference = inDoubles(counts) - observed;
      if (difference > slack) return 1;
      if (difference < -slack) return -1;
      const other = exactly(counts);
      const exact = other.numerator * observedExactly.denominator - observedExactly.numerator * other.denominator;
      return exact > 0n ? 1 : exact < 0n ? -1 : 0;
    },
  };
}

/** Pool adjacent violators: sum over blocks of (sum of scores)^2 / size, block means rising. O(groups). */
function pooled(
  sums: Float64Array,
  sizes: Float64Array,
  blocks: { readonly sums: Float64Array; readonly sizes: Float64Array },
): number {
  let top = -1;
  for (let g = 0; g < sums.length; g++) {
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
