// Every statistic, from the registries that the program itself reads.
import { pairedForms, pairedStatistics } from '../../statistic/paired.js';
import { statistics } from '../../statistic/registry.js';
import { stratifiedStatistics } from '../../statistic/stratified.js';
import type { Topic, TopicEntry } from './topic.js';

const sided = (kind: 'upper' | 'signed'): string =>
  kind === 'upper'
    ? 'tails: upper (default) or lower; it has no sign'
    : 'tails: both (default), upper or lower; it has a sign';

const limits = {
  'chi-square': 'for large counts: chi-square',
  normal: 'for large counts: standard normal',
  none: 'for large counts: no law of its own in common use',
} as const;

const ofOneTable: readonly TopicEntry[] = statistics.map((statistic) => ({
  name: statistic.name,
  lines: [
    `${statistic.words}${statistic.shape === '2x2' ? '; for a 2x2 table' : ''}`,
    `formula: ${statistic.formula}`,
    `range: ${statistic.range}`,
    sided(statistic.sided),
    limits[statistic.limit],
    `source: ${statistic.source}`,
    ...(statistic.forms ?? []).map(({ name, words, source }) => `beside it ${name}: ${words}; source: ${source}`),
  ],
}));

const ofPairs: readonly TopicEntry[] = [
  ...pairedStatistics.map(({ name, words, formula, source, about }) => ({
    name,
    lines: [`${words}; with --paired, about ${about}`, `formula: ${formula}`, `source: ${source}`],
  })),
  ...pairedForms.map(({ name, words, source }) => ({ name, lines: [`${words}; shown beside`, `source: ${source}`] })),
];

const ofStrata: readonly TopicEntry[] = stratifiedStatistics.map(({ name, words, formula, range, source, beside }) => ({
  name,
  lines: [
    `${words}; over strata${beside === undefined ? '' : ', shown beside'}`,
    `formula: ${formula}`,
    `range: ${range}`,
    `source: ${source}`,
  ],
}));

export const statisticsTopic: Topic = {
  name: 'statistics',
  summary: 'how far a table lies from independence: every --statistic',
  opening:
    'n_ij is a count, R_i and C_j its row and column total, n their sum, e_ij = R_i C_j / n the expected count. keepsum help NAME shows one alone.',
  entries: [...ofOneTable, ...ofPairs, ...ofStrata],
};
