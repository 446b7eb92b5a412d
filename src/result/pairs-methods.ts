// The paragraph for a methods section on pairs: change, or what agreement adds to the usual one.
import {
  citedStatistic,
  drawingErrorOf,
  pName,
  samplingErrorOf,
  shortStatisticWords,
  type ResultBeforeWords,
} from './describe.js';
import { quoted } from './label-words.js';
import { countWords, levelWords } from './number-words.js';
import type { PValue } from './result.js';

/** For change in pairs. Labels in it are quoted and show no control characters. */
export function changeMethods(result: ResultBeforeWords): string {
  const { input, statistic, pValues, plan, tool } = result;
  const headline = pValues[0]!;
  const levels = input.rowLabels.length;
  return [
    `Change between two answers of the same ${countWords(input.total)} units (${levels} levels) was tested with ${citedStatistic(statistic.name)}.`,
    answerSentence(result, headline),
    ...(headline.method === 'asymptotic'
      ? []
      : [
          'Ties were settled by exact arithmetic and count as at least as extreme; a mid-p counts them by half (Lancaster 1961).',
        ]),
    ...besideSentences(pValues, headline),
    effectSentence(levels, plan.confidence),
    `Computed with ${tool.name} ${tool.version}.`,
  ].join(' ');
}

function answerSentence(result: ResultBeforeWords, p: PValue): string {
  const name = `The ${pName(p)}`;
  if (p.method === 'asymptotic')
    return `${name} comes from the limiting law of the statistic, which holds for large counts.`;
  const null_ =
    'given how many pairs lie in either of two cells that mirror each other, each lies in one or the other like a fair coin';
  if (p.method === 'exact') return `${name} is exact: ${null_}.`;
  const { plan } = result;
  const draws = countWords(drawingErrorOf(p)?.draws ?? 0);
  const seed = `${plan.generator === null ? '' : `; generator ${plan.generator}`}${plan.seed === null ? '' : `, seed ${quoted(plan.seed)}`}`;
  const error = samplingErrorOf(p);
  const rule =
    error === undefined
      ? `Drawing went on in whole blocks until p was settled against ${plan.alpha}, by limits that hold at every look at once (Robbins 1970)`
      : `With b of m draws at least as extreme it is reported as (b + 1) / (m + 1) (Phipson & Smyth 2010), with a ${levelWords(error.confidence)} interval for b / m (Clopper & Pearson 1934)`;
  return `${name} was estimated from ${draws} random tables: ${null_}${seed}. ${rule}.`;
}

function besideSentences(pValues: readonly PValue[], headline: PValue): string[] {
  const has = (test: (p: PValue) => boolean): boolean => pValues.some(test);
  const others = [
    ...new Set(pValues.filter((p) => p !== headline && p.statistic !== headline.statistic).map((p) => p.statistic)),
  ];
  return [
    ...(has((p) => p.method === 'unconditional')
      ? [
          'The unconditional p holds the number of pairs alone: the largest probability over the unknown proportion of changes, its maximum certified (Suissa & Shuster 1991).',
        ]
      : []),
    ...(others.length > 0 ? [`Beside it stands ${others.map(citedStatistic).join(' and ')}.`] : []),
    ...(has((p) => p.statistic === 'marginal-homogeneity' && p.method !== 'asymptotic')
      ? ['Turning pairs round tests exchangeability of the two answers.']
      : []),
    ...(has((p) => p !== headline && p.method === 'asymptotic')
      ? [`For comparison only, the limiting law of ${shortStatisticWords(headline.statistic)} stands beside.`]
      : []),
  ];
}

function effectSentence(levels: number, confidence: number): string {
  const difference = `differences of the two shares of a level with ${levelWords(confidence)} intervals by the score method (Tango 1998), from Wilson limits (Newcombe 1998, method 10) and by Wald's method`;
  return levels > 2
    ? `Effects: ${difference}, one level at a time.`
    : `Effects: the matched odds ratio b/c with exact limits (Clopper & Pearson 1934) and mid-p limits (Lancaster 1961); ${difference}.`;
}

/** What a paragraph on agreement says first and adds. */
export const agreementOpening = ({ input, statistic }: ResultBeforeWords): string =>
  `Agreement of two raters on ${countWords(input.total)} units (${input.rowLabels.length} levels) was tested with ${citedStatistic(statistic.name)}, against independent ratings with the habits of both raters held.`;

export const agreementInterval = (result: ResultBeforeWords): string =>
  `The ${levelWords(result.plan.confidence)} interval of kappa rests on its standard error for large counts (Fleiss, Cohen & Everitt 1969).`;
