// What keepsum power can plan with: the tests of two groups and one event.
import type { TwoGroupTest } from '../../power/design.js';
import type { Topic } from './topic.js';

const testLines: Readonly<Record<TwoGroupTest, readonly string[]>> = {
  conditional: ['given both margins; the test that keepsum test runs unless told otherwise', 'source: Fisher (1935)'],
  mid: ['the same with ties counted by half; it can reject more often than its level says', 'source: Lancaster (1961)'],
  unconditional: [
    'given the group sizes only, the largest p over the common proportion; --order score, wald or conditional-p says what is extreme',
    'source: Barnard (1945), Suissa & Shuster (1985), Boschloo (1970)',
  ],
};

export const plannedTestsTopic: Topic = {
  name: 'planned-tests',
  summary: 'two groups of a planned study: every --test of keepsum power',
  opening:
    'Power is exact: the probabilities of all tables that the test would reject, added up. More groups or outcomes are simulated with the statistics of keepsum test.',
  entries: Object.entries(testLines).map(([name, lines]) => ({ name, lines })),
};
