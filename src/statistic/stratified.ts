// Statistics of several strata together, by name: their words, what they are and where they come from. The strata stage works them out;
// help, checks and reports read this list.

export interface StratifiedStatistic {
  readonly name: string;
  readonly sided: 'upper' | 'signed';
  readonly words: string;
  readonly formula: string;
  readonly range: string;
  readonly source: string;
  /** Reported beside another one; not to be asked for by name. */
  readonly beside?: true;
}

export const stratifiedStatistics: readonly StratifiedStatistic[] = [
  {
    name: 'common-odds-ratio',
    sided: 'signed',
    words: 'the sum over strata of the counts of events in the first group (the test of a common odds ratio of 1)',
    formula: 'S = sum over strata of the corner count, given every margin; centre sum R1 C1 / n',
    range: 'a whole number',
    source: 'Cornfield (1956), Gart (1970), Mehta, Patel & Gray (1985)',
  },
  {
    name: 'any-association',
    sided: 'upper',
    words: 'the stratified chi-square statistic for association of any kind (after Cochran, Mantel and Haenszel)',
    formula: "(T - E)' V^-1 (T - E), T the counts summed over strata",
    range: '0 and above',
    source: 'Landis, Heyman & Koch (1978)',
  },
  {
    name: 'mean-scores',
    sided: 'upper',
    words: 'the stratified chi-square statistic for mean scores of the groups (after Cochran, Mantel and Haenszel)',
    formula: "(T - E)' V^-1 (T - E), T the sums of scores of the groups, summed over strata",
    range: '0 and above',
    source: 'Landis, Heyman & Koch (1978)',
  },
  {
    name: 'score-correlation',
    sided: 'signed',
    words: 'the stratified statistic for correlation of scores (the signed root of its chi-square form)',
    formula: '(T - E) / sqrt V, T = sum u v n over strata',
    range: 'any number; centre 0',
    source: 'Mantel (1963), Landis, Heyman & Koch (1978)',
  },
  {
    name: 'mantel-haenszel',
    sided: 'signed',
    words: 'the Mantel-Haenszel chi-square statistic',
    formula: '(sum (a - E))^2 / sum V',
    range: '0 and above',
    source: 'Mantel & Haenszel (1959)',
    beside: true,
  },
  {
    name: 'mantel-haenszel-corrected',
    sided: 'signed',
    words: 'the Mantel-Haenszel chi-square statistic with continuity correction',
    formula: '(|sum (a - E)| - 1/2)^2 / sum V, 0 where that distance is below 1/2',
    range: '0 and above',
    source: 'Mantel & Haenszel (1959)',
    beside: true,
  },
  {
    name: 'breslow-day',
    sided: 'upper',
    words: 'the Breslow-Day statistic of homogeneity of the odds ratios',
    formula: 'sum (a - e)^2 / v, e the corner expected under the Mantel-Haenszel odds ratio',
    range: '0 and above',
    source: 'Breslow & Day (1980)',
    beside: true,
  },
  {
    name: 'tarone',
    sided: 'upper',
    words: "the Breslow-Day statistic with Tarone's correction",
    formula: 'the same less (sum (a - e))^2 / sum v',
    range: '0 and above',
    source: 'Tarone (1985)',
    beside: true,
  },
  {
    name: 'zelen',
    sided: 'upper',
    words: "Zelen's exact test of homogeneity of the odds ratios",
    formula: 'probability of the tables given every margin and the sum of the corners',
    range: '0 to 1',
    source: 'Zelen (1971)',
    beside: true,
  },
];

/** Those that homogeneity is judged by. */
export const homogeneityStatistics: readonly string[] = ['breslow-day', 'tarone', 'zelen'];

/** Those that may be asked for. */
export const stratifiedNames: readonly string[] = stratifiedStatistics
  .filter(({ beside }) => beside === undefined)
  .map(({ name }) => name);
