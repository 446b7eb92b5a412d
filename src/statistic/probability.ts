// The probability of the table itself, given its margins, as a statistic (Freeman & Halton 1951): the rarer, the larger.
import { beyondEntropy, devianceTerm } from '../numeric/saddle-point.js';
import type { LiveTable } from '../table/live-table.js';
import { compareFactorialProducts } from './comparison/factorial-products.js';
import type { BoundStatistic, Statistic } from './contract.js';
import { expectedCounts, slackOfSum, sumOverCells } from './expected.js';

export const probability: Statistic = {
  name: 'probability',
  sided: 'upper',
  shape: 'any',
  words: 'the improbability of the table given its margins, -ln P',
  formula: '-ln P, with P = (prod R_i!) (prod C_j!) / (n! prod n_ij!)',
  range: '0 (the only possible table) upwards',
  source: 'Freeman & Halton (1951)',
  limit: 'none',
  bind,
};

/**
 * -ln P = sum over cells of [n ln(n/e) - (n - e) + h(n)] + h(total) - sum h(R) - sum h(C), h as in beyondEntropy: every
 * cell's part stays small and positive, so that nothing cancels at large totals.
 */
function bind(live: LiveTable): BoundStatistic {
  const expected = expectedCounts(live);
  const width = live.columns;
  const cell = (row: number, column: number, count: number): number =>
    devianceTerm(count, expected[row * width + column]!) + beyondEntropy(count);
  let margins = beyondEntropy(live.total);
  for (const total of live.rowTotals) margins -= beyondEntropy(total);
  for (const total of live.columnTotals) margins -= beyondEntropy(total);
  const observed = sumOverCells(live, live.counts, cell);
  return {
    value: (counts) => Math.max(0, sumOverCells(live, counts, cell) + margins),
    sum: {
      cell,
      observed,
      // 64 more units a cell for Stirling's error, which is absolute.
      slack: slackOfSum(expected.length, 64, observed + expected.length, Math.sqrt(2 * live.total * observed)),
      decide: (counts) => compareFactorialProducts(counts, live.counts),
    },
  };
}
