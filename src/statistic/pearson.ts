// Pearson's chi-square statistic (Pearson 1900).
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Statistic } from './contract.js';
import { cellWeights, compareWeightedSquares } from './comparison/weighted-squares.js';
import { expectedCounts, slackOfSum, sumOverCells } from './expected.js';

export const pearson: Statistic = {
  name: 'pearson',
  sided: 'upper',
  shape: 'any',
  words: "Pearson's chi-square statistic",
  formula: 'sum over cells of (n_ij - e_ij)^2 / e_ij, with e_ij = R_i C_j / n',
  range: '0 (counts as expected) to n (min(rows, columns) - 1)',
  source: 'Pearson (1900)',
  limit: 'chi-square',
  bind,
};

/**
 * Ranked by sum w n^2 in whole numbers when the margins allow it below 2^53 (then ties need no second look);
 * otherwise by the statistic itself.
 */
function bind(live: LiveTable): BoundStatistic {
  const expected = expectedCounts(live);
  const weights = cellWeights(live);
  const width = live.columns;
  const term = (row: number, column: number, count: number): number => {
    const e = expected[row * width + column]!;
    return ((count - e) * (count - e)) / e;
  };
  const exactWeights = weights.asDoubles;
  const cell =
    exactWeights === null
      ? term
      : (row: number, column: number, count: number): number => exactWeights[row * width + column]! * count * count;
  const observed = sumOverCells(live, live.counts, cell);
  return {
    value: (counts) => sumOverCells(live, counts, term),
    sum: {
      cell,
      observed,
      slack: exactWeights === null ? slackOfSum(expected.length, 6, observed, Math.sqrt(live.total * observed)) : 0,
      decide: (counts) => compareWeightedSquares(weights, counts, live.counts),
    },
  };
}
