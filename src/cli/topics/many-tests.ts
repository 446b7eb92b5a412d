// When there are many p-values: every adjustment of `keepsum adjust`, and those that `keepsum together` draws.
import type { Adjustment } from '../../family/adjust.js';
import type { Topic } from './topic.js';

const adjustmentLines: Readonly<Record<Adjustment, readonly string[]>> = {
  bonferroni: ['each p times their number', 'keeps: the probability of any false finding', 'source: Dunn (1961)'],
  holm: [
    'from the smallest up, times how many are left',
    'keeps: the same, never with less power',
    'source: Holm (1979)',
  ],
  hochberg: [
    'from the largest down; for p-values that are independent or rise together',
    'keeps: the probability of any false finding',
    'source: Hochberg (1988)',
  ],
  tarone: [
    'as bonferroni, but tables whose margins could not have reached the level are not counted',
    'keeps: the probability of any false finding',
    'source: Tarone (1990)',
  ],
  'benjamini-hochberg': [
    'keeps: the expected share of false findings among the findings, for p-values that are independent or rise together',
    'source: Benjamini & Hochberg (1995)',
  ],
  'benjamini-yekutieli': [
    'keeps: the same, however the p-values hang together',
    'source: Benjamini & Yekutieli (2001)',
  ],
  gilbert: ['benjamini-hochberg over the tables that could have reached --alpha', 'source: Gilbert (2005)'],
};

export const adjustmentsTopic: Topic = {
  name: 'adjustments',
  summary: 'p-values of many tests: every --by of keepsum adjust, and keepsum together',
  opening:
    'An adjusted p is the smallest level at which the procedure would reject (Wright 1992). Settle the family and the procedure before you see the answers.',
  entries: [
    ...Object.entries(adjustmentLines).map(([name, lines]) => ({ name, lines })),
    {
      name: 'maxT',
      lines: [
        'keepsum together: how often the largest statistic of all outcomes, dealt anew, is as large',
        'keeps: the probability of any false finding',
        'source: Westfall & Young (1993), Ge, Dudoit & Speed (2003)',
      ],
    },
    {
      name: 'minP',
      lines: [
        'the same with the smallest p of all outcomes',
        'source: Westfall & Young (1993), Ge, Dudoit & Speed (2003)',
      ],
    },
  ],
};
