// The likelihood-ratio statistic G2 (Wilks 1935).
import { devianceTerm } from '../numeric/saddle-point.js';
import type { LiveTable } from '../table/live-table.js';
import { compareSelfPowers } from './comparison/self-powers.js';
import type { BoundStatistic, Statistic } from './contract.js';
import { expectedCounts, slackOfSum, sumOverCells } from './expected.js';

export const likelihoodRatio: Statistic = {
  name: 'likelihood-ratio',
  sided: 'upper',
  shape: 'any',
  words: 'the likelihood-ratio statistic G²',
  formula: '2 sum over cells of n_ij ln(n_ij / e_ij), with 0 ln 0 = 0',
  range: '0 upwards',
  source: 'Wilks (1935)',
  limit: 'chi-square',
  bind,
};

/** Each cell adds 2 [n ln(n/e) - (n - e)], at least 0; the parts n - e add to nothing over a table. */
function bind(live: LiveTable): BoundStatistic {
  const expected = expectedCounts(live);
  const width = live.columns;
  const cell = (row: number, column: number, count: number): number =>
    2 * devianceTerm(count, expected[row * width + column]!);
  const observed = sumOverCells(live, live.counts, cell);
  return {
    value: (counts) => sumOverCells(live, counts, cell),
    sum: {
      cell,
      observed,
      slack: slackOfSum(expected.length, 64, observed, Math.sqrt(live.total * observed)),
      decide: (counts) => compareSelfPowers(counts, live.counts),
    },
  };
}
