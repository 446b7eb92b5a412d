// Do the groups lie alike on an ordered scale? The variation of the groups' mean scores over that of all units (Kruskal &
// Wallis 1952 with midranks; with other scores the row mean scores of Landis, Heyman & Koch 1978). With the margins held it rises
// with sum S_g^2 / size_g, S_g the sum of scores of group g, in which every comparison is made.
import { greatestCommonDivisor } from '../numeric/greatest-common-divisor.js';
import { lowest, toDouble } from '../numeric/rational.js';
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Choices, Place, Roles, Statistic } from './contract.js';
import { exactSumsOfGroups, scoredResponses, slackOfSquares, sumsOfGroups } from './scored-responses.js';

export const kruskalWallis: Statistic = {
  name: 'kruskal-wallis',
  sided: 'upper',
  shape: 'any',
  words: 'the Kruskal-Wallis statistic (do the groups lie alike on the ordered scale of the responses?)',
  formula:
    '(n - 1) x sum over groups of size x (mean score - overall mean)^2 / sum over units of (score - overall mean)^2; midranks unless scores are declared',
  range: '0 (equal mean scores) to n - 1',
  source: 'Kruskal & Wallis (1952)',
  limit: 'chi-square',
  takes: ['groups', 'response-scores'],
  standardResponseScores: 'midranks',
  bind,
};

function bind(live: LiveTable, _roles: Roles, choices: Choices = {}): BoundStatistic {
  const responses = scoredResponses(live, choices, 'midranks');
  const { sizes, sum, spread, total } = responses;
  const multiple = Array.from(sizes, BigInt).reduce((lcm, size) => (lcm / greatestCommonDivisor(lcm, size)) * size, 1n);
  const weights = Array.from(sizes, (size) => multiple / BigInt(size));
  /** The least common multiple of the sizes times sum S^2 / size. */
  const exactly = (counts: ArrayLike<number>): bigint =>
    exactSumsOfGroups(live, responses, counts).reduce((all, each, g) => all + each * each * weights[g]!, 0n);
  const sums = new Float64Array(sizes.length);
  const inDoubles = (counts: ArrayLike<number>): number => {
    sumsOfGroups(live, responses, counts, sums);
    let all = 0;
    for (let g = 0; g < sums.length; g++) all += (sums[g]! * sums[g]!) / sizes[g]!;
    return all;
  };
  const observed = inDoubles(live.counts);
  const observedExactly = exactly(live.counts);
  const slack = slackOfSquares(live, responses);
  return {
    // (n - 1) (n sum S^2 / size - S^2) / (n sum v^2 - S^2).
    value: (counts) =>
      spread === 0n
        ? 0
        : toDouble(lowest((total - 1n) * (total * exactly(counts) - sum * sum * multiple), multiple * spread)),
    place: (counts): Place => {
      const difference = inDoubles(counts) - observed;
      if (difference > slack) return 1;
      if (difference < -slack) return -1;
      const exact = exactly(counts) - observedExactly;
      return exact > 0n ? 1 : exact < 0n ? -1 : 0;
    },
    degreesOfFreedom: sizes.length - 1,
  };
}
