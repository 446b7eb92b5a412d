// Difference of two proportions over its pooled standard error; its square is Pearson's statistic.
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Roles, Statistic } from './contract.js';
import { magnitude, order, scaledDeviation, twoGroups } from './two-by-two.js';

export const score: Statistic = {
  name: 'score',
  sided: 'signed',
  shape: '2x2',
  words: 'the score statistic (difference of proportions over its pooled standard error)',
  formula: '(p1 - p2) / sqrt(p (1 - p) (1/n1 + 1/n2)), p the proportion in both groups together',
  range: '-sqrt(n) to sqrt(n); centre 0',
  source: 'pooled form; its square is the statistic of Pearson (1900)',
  limit: 'normal',
  takes: ['roles'],
  bind,
};

function bind(live: LiveTable, roles: Roles): BoundStatistic {
  const groups = twoGroups(live, roles);
  const { first, second, events, total } = groups;
  const scale = Math.sqrt(total / first / second / events / (total - events));
  const observed = magnitude(scaledDeviation(groups, live.counts[groups.corner]!));
  return {
    corner: groups.corner,
    value: (counts) => Number(scaledDeviation(groups, counts[groups.corner]!)) * scale,
    distance: (counts) => order(magnitude(scaledDeviation(groups, counts[groups.corner]!)), observed),
  };
}
