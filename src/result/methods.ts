// The paragraph for a methods section: statistic, conditioning, tail and rule, method with its draws and seed, error,
// software - and the sources (author, year) of exactly what was used for this result.
import {
  approximationName,
  bracketOf,
  citedStatistic,
  isAbout,
  isOneTableOnly,
  pName,
  drawingErrorOf,
  samplingErrorOf,
  shortStatisticWords,
  tableWords,
  type ResultBeforeWords,
} from './describe.js';
import { comparisonMethods, orderMethods } from './beside-methods.js';
import { cellsMethods } from './cell-words.js';
import { levelSentences } from './level-words.js';
import { bootstrapWords, isBootstrap, unconditionalSentence } from './design-words.js';
import { quoted } from './label-words.js';
import { shownEffects } from './shown-effects.js';
import { bracketWords, countWords, levelWords } from './number-words.js';
import { quasiMethod, quasiSentence } from './quasi-methods.js';
import { agreementInterval, agreementOpening, changeMethods } from './pairs-methods.js';
import { isAboutChange } from './pairs-sentence.js';
import { statedMethod, statedOpening } from './stated-words.js';
import type { PValue } from './result.js';
import { strataMethods } from './strata-words.js';

/** A paragraph that lets a reader judge and repeat the analysis. Labels in it are quoted and show no control characters. */
export function methodsFor(result: ResultBeforeWords): string {
  if (result.strata !== undefined) return strataMethods(result);
  const headline = result.pValues[0]!;
  if (isAboutChange(result)) return [...levelSentences(result.input), changeMethods(result)].join(' ');
  const agreement = isAbout(result.statistic.name) === 'agreement';
  return [
    ...levelSentences(result.input),
    agreement ? agreementOpening(result) : testSentence(result),
    clustersSentence(result),
    rolesSentence(result),
    quasiSentence(result),
    settingsSentence(result),
    methodSentence(result, headline),
    ...(isOneTableOnly(result)
      ? ['The margins allow one table only, so p is 1.']
      : [ruleSentence(headline), tiesSentence(result, headline), besideSentence(result, headline)]),
    agreement ? agreementInterval(result) : undefined,
    cellsMethods(result),
    comparisonMethods(result),
    effectsSentence(result),
    orderMethods(result),
    `Computed with ${result.tool.name} ${result.tool.version}.`,
  ]
    .filter((sentence) => sentence !== undefined)
    .join(' ');
}

function effectsSentence(result: ResultBeforeWords): string | undefined {
  const said = shownEffects(result).map(({ words, source, interval, methodSource }) => {
    const limits =
      interval === undefined || methodSource === undefined
        ? ''
        : `, with a ${levelWords(interval.confidence)} interval ${methodSource}`;
    return `${words}${source === undefined ? '' : ` (${source})`}${limits}`;
  });
  return said.length === 0 ? undefined : `Effects: ${said.join('; ')}.`;
}

function testSentence(result: ResultBeforeWords): string {
  const stated = statedOpening(result.pValues[0]!);
  if (stated !== undefined) return stated;
  return `Association between the rows and the columns of a ${tableWords(result)} was tested with ${citedStatistic(result.statistic.name)}.`;
}

function clustersSentence({ clusters }: ResultBeforeWords): string | undefined {
  if (clusters === undefined) return undefined;
  const by = clusters.from === null ? '' : ` (${quoted(clusters.from)})`;
  return `The units came in ${countWords(clusters.number)} clusters${by} of ${countWords(clusters.smallest)} to ${countWords(clusters.largest)}; rows were permuted over whole clusters, so that no independence within a cluster was assumed.`;
}

function rolesSentence({ plan, statistic }: ResultBeforeWords): string | undefined {
  if (statistic.groups === undefined || statistic.event === undefined) return undefined;
  const [first, second] = statistic.groups;
  return (
    `The groups were the ${plan.groups ?? 'rows'} and the event was ${quoted(statistic.event)}; ` +
    `differences are ${quoted(first.label)} minus ${quoted(second.label)}.`
  );
}

function settingsSentence({ plan }: ResultBeforeWords): string | undefined {
  if (plan.lambda !== undefined) return `Its exponent lambda was ${plan.lambda}.`;
  if (plan.rowScores === undefined || plan.columnScores === undefined) return undefined;
  return `Row scores were ${plan.rowScores.join(', ')}; column scores ${plan.columnScores.join(', ')}.`;
}

function methodSentence(result: ResultBeforeWords, p: PValue): string {
  const name = `The ${pName(p)}`;
  const stated = statedMethod(name, p);
  if (stated !== undefined) return stated;
  if (p.method === 'exact' && result.clusters !== undefined) {
    return `${name} is exact: it adds up the probabilities of all ways to deal the clusters to the rows, as many to each as it has, that are at least as extreme as the observed one.`;
  }
  if (result.quasiIndependence !== undefined) return quasiMethod(result, name, p);
  if (p.method === 'exact') {
    const isTwoByTwo = result.input.rowLabels.length === 2 && result.input.columnLabels.length === 2;
    const linear = result.plan.forecast.engine === 'linear';
    const source = isTwoByTwo ? 'Fisher 1935' : linear ? 'Pagano & Tritchler 1983' : 'Freeman & Halton 1951';
    const bracket = bracketOf(p);
    if (bracket !== undefined) {
      return (
        `${name} is the upper limit of a certified bracket: the probabilities, given both margins, of all tables at least as extreme ` +
        `as the observed one (${source}) were added up twice, with partial sums of the statistic rounded down to a grid and rounded ` +
        `up, so that the exact value lies from ${bracketWords(bracket.lower, bracket.upper)}.`
      );
    }
    return `${name} is exact: it adds up the probabilities, given both margins, of all tables at least as extreme as the observed one (${source}).`;
  }
  if (p.method === 'unconditional') return unconditionalSentence(name, p, result.plan);
  if (p.method === 'asymptotic') return `${name} comes from ${approximationWords(p)}, which holds for large counts.`;
  return `${name} ${samplingWords(result, p)}`;
}

function samplingWords({ plan, clusters }: ResultBeforeWords, p: PValue): string {
  const what =
    clusters === undefined ? 'random tables with both margins held' : 'random ways to deal the clusters to the rows';
  const error = samplingErrorOf(p);
  const draws = countWords(drawingErrorOf(p)?.draws ?? 0);
  const generator = plan.generator === null ? '' : `; generator ${plan.generator}`;
  const seed = plan.seed === null ? '' : `, seed ${quoted(plan.seed)}`;
  const [more, reported, share] =
    p.rule === 'doubled'
      ? ['at least as extreme in the smaller tail', '2 (b + 1) / (m + 1), at most 1', '2 b / m']
      : ['at least as extreme', '(b + 1) / (m + 1)', 'b / m'];
  const interval =
    error === undefined
      ? ''
      : `, with a ${levelWords(error.confidence)} interval for ${share} (Clopper & Pearson 1934)`;
  if (plan.draws === 'auto') {
    return (
      `was estimated from ${draws} ${what}, drawn by dealing out labels or cell by cell ` +
      `(Patefield 1981), whichever costs less for these margins${generator}${seed}. Drawing went on in whole blocks until p was ` +
      `settled against ${plan.alpha}, by limits that hold at every look at once, from a mixture of beta-binomial laws (Darling & ` +
      `Robbins 1967; Robbins 1970; Howard et al. 2021); p is their upper limit plus the risk ${plan.samplingRisk ?? ''} that they ever err.`
    );
  }
  if (isBootstrap(p)) {
    return `was estimated from m = ${draws} ${bootstrapWords}${generator}${seed}. With b of them ${more} it is reported as ${reported}; it is an approximation${interval}.`;
  }
  return (
    `was estimated from m = ${draws} ${what}, drawn by dealing out labels or cell by cell ` +
    `(Patefield 1981), whichever costs less for these margins${generator}${seed}. ` +
    `With b of them ${more} it is reported as ${reported} (Phipson & Smyth 2010)${interval}.`
  );
}

const approximationWords = (p: PValue, words: (name: string) => string = shortStatisticWords): string =>
  `the ${approximationName(p)} approximation to ${words(p.statistic)}`;

function ruleSentence(p: PValue): string | undefined {
  if (p.nullValue !== undefined || (p.method === 'unconditional' && p.rule === 'probability')) return undefined;
  switch (p.rule) {
    case 'distance':
      return 'Two-tailed, a table is as extreme when its statistic lies at least as far from the centre.';
    case 'probability':
      return 'Two-tailed, a table is as extreme when its statistic takes a value no more probable than the observed one (Irwin 1935).';
    case 'blaker':
      return 'Two-tailed, a table is as extreme when the smaller of the two tails that its statistic ends is no larger than that of the observed one (Blaker 2000).';
    case 'doubled':
      return p.method === 'sample' ? undefined : 'Two-tailed, the smaller one-tailed p is doubled, up to 1.';
    case undefined:
      return undefined;
  }
}

function tiesSentence({ quasiIndependence }: ResultBeforeWords, p: PValue): string | undefined {
  if (p.method === 'asymptotic' || (p.nullValue !== undefined && p.method === 'unconditional')) return undefined;
  if (quasiIndependence !== undefined && p.statistic === 'pearson') return undefined;
  const mid = p.mid === null ? '' : ', a mid-p counts them by half (Lancaster 1961)';
  if (bracketOf(p) !== undefined) return `Ties count as at least as extreme${mid}; strict and mid-p are estimates.`;
  return `Near ties with the observed table were settled by exact arithmetic; ties count as at least as extreme${mid}.`;
}

function besideSentence({ pValues, diagnostics, clusters }: ResultBeforeWords, headline: PValue): string | undefined {
  const beside = pValues.filter((p) => p !== headline && p.method === 'asymptotic');
  if (clusters !== undefined) return undefined;
  if (beside.length === 0 && headline.method !== 'asymptotic') return undefined;
  const verdict = diagnostics.cochranAdvice === 'met' ? 'met' : 'not met';
  const advice = `the advice on expected counts of Cochran (1954) was ${verdict}`;
  if (beside.length === 0) return `For that approximation ${advice}.`;
  const words = [
    ...new Set(
      beside.map((p) =>
        approximationWords(p, p.statistic === headline.statistic ? shortStatisticWords : citedStatistic),
      ),
    ),
  ].join(' and ');
  return `For comparison only, ${words} stands beside; ${advice}.`;
}
