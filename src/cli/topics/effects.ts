// How strong an association is: every measure that a result can hold, with its definition and source.
import type { Topic } from './topic.js';

type Lines = Readonly<Record<string, readonly string[]>>;

const ofTwoGroups: Lines = {
  'risk-difference': [
    'formula: p1 - p2, first group minus second; -1 to 1, 0 for none',
    'intervals: Newcombe (1998), method 10; Miettinen & Nurminen (1985); with group sizes fixed also Chan & Zhang (1999)',
  ],
  'risk-ratio': [
    'formula: p1 / p2; 0 to infinity, 1 for none',
    'intervals: on the logarithm, Katz et al. (1978); Koopman (1984); Miettinen & Nurminen (1985)',
  ],
  'odds-ratio': ['formula: a d / (b c); 0 to infinity, 1 for none', 'interval: Woolf (1955)'],
  'conditional-odds-ratio': [
    'the odds ratio that makes the counts most likely given all margins; over strata the common one',
    'intervals invert the exact test: central, Cornfield (1956); by probability, Baptista & Pike (1977); by the smaller tail, Blaker (2000)',
  ],
  'number-needed-to-treat': [
    'formula: 1 / (p1 - p2); negative: one event fewer',
    'source: Laupacis et al. (1988); interval through infinity: Altman (1998)',
  ],
  'attributable-fraction': ['formula: 1 - p2 / p1', 'source: Levin (1953)'],
};

const ofLargerTables: Lines = {
  'cramer-v': ['formula: sqrt(chi-square / (n (min(rows, columns) - 1))); 0 to 1', 'source: Cramer (1946)'],
  'cramer-v-corrected': ['the same without most of its bias', 'source: Bergsma (2013); interval: Efron (1979)'],
  'goodman-kruskal-lambda': [
    'by how much knowing one side cuts the errors of guessing the most frequent level of the other; 0 to 1',
    'source: Goodman & Kruskal (1954); interval: Goodman & Kruskal (1963)',
  ],
  'goodman-kruskal-tau': [
    'the same for guesses made in proportion to the counts',
    'source: Goodman & Kruskal (1954); interval: Goodman & Kruskal (1972)',
  ],
  'theil-u': ['the share of the entropy of one side that the other side takes away; 0 to 1', 'source: Theil (1970)'],
};

const ofOrderedSides: Lines = {
  gamma: ['formula: (C - D) / (C + D), C pairs of units in order, D out of order', 'source: Goodman & Kruskal (1954)'],
  'tau-b': ['formula: 2 (C - D) / sqrt(w_r w_c), w twice the pairs that differ on a side', 'source: Kendall (1945)'],
  'tau-c': ['formula: 2 m (C - D) / (n^2 (m - 1)), m the smaller number of levels', 'source: Stuart (1953)'],
  'somers-d-columns': ['formula: 2 (C - D) / w_r: columns given rows', 'source: Somers (1962)'],
  'somers-d-rows': ['formula: 2 (C - D) / w_c: rows given columns', 'source: Somers (1962)'],
};

const ofStrata: Lines = {
  'mantel-haenszel-odds-ratio': [
    'formula: sum(a d / n) / sum(b c / n)',
    'source: Mantel & Haenszel (1959); interval: Robins, Breslow & Greenland (1986)',
  ],
  'mantel-haenszel-risk-ratio': [
    'formula: sum(a n2 / n) / sum(c n1 / n)',
    'source: Mantel & Haenszel (1959); interval: Greenland & Robins (1985)',
  ],
  'mantel-haenszel-risk-difference': [
    'formula: sum((a n2 - c n1) / n) / sum(n1 n2 / n)',
    'source: Mantel & Haenszel (1959); interval: Sato (1989)',
  ],
};

const ofPairs: Lines = {
  'matched-difference': [
    'formula: (b - c) / n, b and c the pairs that changed one way and the other',
    'intervals: Tango (1998), Newcombe (1998)',
  ],
  'matched-odds-ratio': ['formula: b / c', 'interval: from that of b / (b + c), Clopper & Pearson (1934)'],
};

export const effectsTopic: Topic = {
  name: 'effects',
  summary: 'how strong it is: every measure, its definition and intervals',
  opening:
    'A p-value is not the size of an effect. A 2x2 table has the counts a, b of the first group and c, d of the second. Intervals of 95% unless --confidence says otherwise; nothing is added to empty cells. Agreement of pairs (kappa) is under keepsum help statistics.',
  entries: Object.entries({ ...ofTwoGroups, ...ofLargerTables, ...ofOrderedSides, ...ofStrata, ...ofPairs }).map(
    ([name, lines]) => ({ name, lines }),
  ),
};
