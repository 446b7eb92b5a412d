// How p is found, what makes draws repeatable, and what a run ends with.
import { standardEffort } from '../../null/forecast.js';
import type { Method } from '../../plan/plan.js';
import { generatorName } from '../../random/stream.js';
import { statuses } from '../statuses.js';
import type { Topic } from './topic.js';

const shortPower = (value: number): string => value.toExponential().replace('e+', 'e');

const methodLines: Readonly<Record<Method, readonly string[]>> = {
  auto: [
    `exact where a forecast of the work lies within --effort (${shortPower(standardEffort)} units), else sample; the result says which, and why; the default`,
  ],
  exact: [
    'adds up the probabilities of all tables at least as extreme; its only error is rounding, which is stated',
    'ends with status 3 where the work would exceed --effort',
    'source: Fisher (1935), Freeman & Halton (1951), Pagano & Tritchler (1983)',
  ],
  sample: [
    'draws tables at random with the same margins; a fixed number with --draws N, else until p is settled against --alpha',
    'fixed: p = (b + 1) / (m + 1), with b of m draws at least as extreme, and an interval; source: Phipson & Smyth (2010), Clopper & Pearson (1934)',
    'until settled: limits that hold at every look; source: Darling & Robbins (1967), Robbins (1970), Howard et al. (2021)',
    'tables are drawn label by label or cell by cell; source: Patefield (1981)',
  ],
  asymptotic: [
    'the law of the statistic for large counts; its error is not known, and it stands beside an exact or sampled p, never in place of one unasked',
    'when it can be trusted: source: Cochran (1954)',
  ],
};

export const methodsTopic: Topic = {
  name: 'methods',
  summary: 'how p is found: every --method',
  opening: 'The method is never changed in silence.',
  entries: Object.entries(methodLines).map(([name, lines]) => ({ name, lines })),
};

export const seedsTopic: Topic = {
  name: 'seeds',
  summary: 'what makes a sampled p repeatable: --seed',
  opening: 'The same seed gives the same digits on any machine, for any number of threads.',
  entries: [
    {
      name: '--seed TEXT',
      lines: ['any text but the empty one: 42 and 2026-03 are texts; where none is given one is made and shown'],
    },
    {
      name: 'blocks',
      lines: [
        `draws come in numbered blocks; block k is made from the seed, the key of the table and k alone, by the generator ${generatorName}`,
        'source of the generator: Neves & Araujo (2012)',
      ],
    },
    {
      name: 'choosing one',
      lines: ['settle the seed before you see a p; trying several and keeping the best is a way to deceive yourself'],
    },
  ],
};

export const exitStatusTopic: Topic = {
  name: 'exit-status',
  summary: 'what a run ends with, for scripts',
  opening: 'A status never depends on how small p is.',
  entries: statuses.map(([name, words]) => ({ name, lines: [words] })),
};
