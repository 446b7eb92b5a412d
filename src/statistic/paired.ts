// The statistics of square tables of pairs, by name: change and agreement. They need the same levels in rows and columns, so they
// stand beside the registry, not in it.
import { nameHint } from '../problem/suggest.js';
import { usageProblem } from '../problem/problem.js';

export interface PairedStatistic {
  readonly name: string;
  readonly words: string;
  readonly formula: string;
  readonly source: string;
  /** change: do pairs go one way more than the other? agreement: do two raters agree beyond chance? */
  readonly about: 'change' | 'agreement';
}

export const pairedStatistics: readonly PairedStatistic[] = [
  {
    name: 'mcnemar',
    words: "McNemar's statistic",
    formula: '(b - c) / sqrt(b + c), with b pairs that went one way and c the other; its square is the chi-square form',
    source: 'McNemar (1947)',
    about: 'change',
  },
  {
    name: 'bowker',
    words: "Bowker's statistic of symmetry",
    formula: 'sum over two levels of (n_ij - n_ji)^2 / (n_ij + n_ji), those without changes left out',
    source: 'Bowker (1948)',
    about: 'change',
  },
  {
    name: 'marginal-homogeneity',
    words: "Stuart's statistic of marginal homogeneity",
    formula: "d' V^- d, with d row totals minus column totals and V their covariance under symmetry",
    source: 'Stuart (1955)',
    about: 'change',
  },
  {
    name: 'kappa',
    words: "Cohen's kappa",
    formula: '(observed - expected agreement) / (1 - expected agreement)',
    source: 'Cohen (1960)',
    about: 'agreement',
  },
  {
    name: 'kappa-linear',
    words: 'linearly weighted kappa',
    formula: 'kappa with agreement 1 - |i - j| / (k - 1) between levels i and j of k',
    source: 'Cohen (1968)',
    about: 'agreement',
  },
  {
    name: 'kappa-quadratic',
    words: 'quadratically weighted kappa',
    formula: 'kappa with agreement 1 - (i - j)^2 / (k - 1)^2 between levels i and j of k',
    source: 'Cohen (1968)',
    about: 'agreement',
  },
];

/** Forms that stand beside one of those. */
export const pairedForms = [
  {
    name: 'mcnemar-corrected',
    words: "McNemar's statistic with continuity correction",
    source: 'Edwards (1948)',
  },
] as const;

export const pairedNames: readonly string[] = pairedStatistics.map(({ name }) => name);

export const isAgreement = (name: unknown): boolean =>
  pairedStatistics.some((one) => one.name === name && one.about === 'agreement');

/** @throws Problem (usage) `unknown-statistic`, with a suggestion. */
export function pairedNamed(name: string): PairedStatistic {
  const found = pairedStatistics.find((one) => one.name === name);
  if (found !== undefined) return found;
  throw usageProblem({
    code: 'unknown-statistic',
    message: `there is no statistic named "${name}" for pairs`,
    place: '--statistic',
    hint: nameHint(name, pairedNames),
  });
}
