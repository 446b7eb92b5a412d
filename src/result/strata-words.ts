// The sentence and the methods paragraph over strata: the same order as for one table, with what strata add.
import {
  approximationName,
  citedStatistic,
  directionWords,
  drawingErrorOf,
  errorAside,
  foundWords,
  isOneTableOnly,
  pName,
  pNumber,
  samplingErrorOf,
  shortStatisticWords,
  type ResultBeforeWords,
} from './describe.js';
import { quoted } from './label-words.js';
import { countWords, digits, levelWords, statisticValueWords } from './number-words.js';
import type { PValue, Result } from './result.js';

type Effect = NonNullable<Result['effects']>[number];

/** "3 strata of 2 x 2 tables, 287 counts in all". */
export const strataInWords = ({ input, strata }: ResultBeforeWords): string =>
  `${strata!.labels.length} ${strata!.labels.length === 1 ? 'stratum' : 'strata'} of ${input.rowLabels.length} x ${input.columnLabels.length} tables (${countWords(input.total)} counts in all)`;

export const effectOf = ({ effects }: Pick<Result, 'effects'>, name: string): Effect | undefined =>
  effects?.find((effect) => effect.name === name);

export const numberWords = (value: number | 'infinity' | '-infinity' | null): string =>
  value === null ? 'undefined' : typeof value === 'number' ? digits(value, 3) : statisticValueWords(value);

/** "95% limits 0.29 to 1.43". */
export const limitsInWords = ({ confidence, lower, upper }: Effect['intervals'][number]): string =>
  `${levelWords(confidence)} limits ${numberWords(lower)} to ${numberWords(upper)}`;

export function strataSentence(result: ResultBeforeWords): string {
  const headline = result.pValues[0]!;
  if (isOneTableOnly(result)) {
    return `The margins of these ${strataInWords(result)} allow no other tables, so p is 1 whatever the counts: they speak neither for nor against an association.`;
  }
  const direction = directionWords(result, headline);
  const name = `${pName(headline)}${direction === undefined ? '' : ` (${direction})`}`;
  const found = foundWords(headline, result.plan.seed, 'random sets of tables with the same margins');
  const answer = `${pNumber(headline)}${errorAside(headline)}${headline.method === 'asymptotic' ? ' ' : ', '}${found}`;
  return `Over ${strataInWords(result)}, ${sizeWords(result)} and its ${name} is ${answer}.`;
}

function sizeWords(result: ResultBeforeWords): string {
  const common = effectOf(result, 'conditional-odds-ratio') ?? effectOf(result, 'mantel-haenszel-odds-ratio');
  const { groups, event } = result.statistic;
  if (common !== undefined && groups !== undefined && event !== undefined) {
    const [interval] = common.intervals;
    const limits = interval === undefined || interval.lower === null ? '' : ` (${limitsInWords(interval)})`;
    return `the common odds ratio of ${quoted(event)} in ${quoted(groups[0].label)} against ${quoted(groups[1].label)} is ${numberWords(common.estimate)}${limits}`;
  }
  const { value, degreesOfFreedom } = result.statistic;
  const degrees =
    degreesOfFreedom === undefined
      ? ''
      : ` (${degreesOfFreedom} degree${degreesOfFreedom === 1 ? '' : 's'} of freedom)`;
  return `${shortStatisticWords(result.statistic.name)} is ${statisticValueWords(value!)}${degrees}`;
}

export function strataMethods(result: ResultBeforeWords): string {
  const headline = result.pValues[0]!;
  const { plan, strata } = result;
  const by = strata!.from === null ? '' : ` by ${quoted(strata!.from)}`;
  return [
    `Association between rows and columns within ${strataInWords(result)}${by} was tested with ${citedStatistic(result.statistic.name)}.`,
    scoresWords(result),
    isOneTableOnly(result) ? 'The margins allow one set of tables only, so p is 1.' : methodWords(result, headline),
    effectsWords(result),
    besideWords(result, headline),
    plan.method === 'asymptotic'
      ? undefined
      : 'Near ties were settled by exact arithmetic; ties count as at least as extreme.',
    `Computed with ${result.tool.name} ${result.tool.version}.`,
  ]
    .filter((sentence) => sentence !== undefined)
    .join(' ');
}

/** Scores of the sides that have them, as a sentence; undefined where none are used. */
export function scoresWords({ plan }: ResultBeforeWords): string | undefined {
  const words = (ranks: string | undefined, scores: readonly number[] | undefined): string | undefined =>
    ranks === 'midranks'
      ? 'midranks within each stratum over its total plus 1 (van Elteren 1960)'
      : ranks === 'pooled-midranks'
        ? 'midranks of all strata pooled'
        : scores?.join(', ');
  const rows = words(plan.rowRanks, plan.rowScores);
  const columns = words(plan.columnRanks, plan.columnScores);
  const parts = [
    rows === undefined ? [] : [`Row scores: ${rows}`],
    columns === undefined ? [] : [`column scores: ${columns}`],
  ].flat();
  return parts.length === 0 ? undefined : `${parts.join('; ').replace(/^c/, 'C')}.`;
}

function methodWords(result: ResultBeforeWords, p: PValue): string {
  const name = `The ${pName(p)}`;
  const held = 'with the margins of every stratum held';
  if (p.method === 'asymptotic') {
    return `${name} comes from the ${approximationName(p)} approximation to ${shortStatisticWords(p.statistic)}, which holds for large sums over strata.`;
  }
  if (p.method === 'exact')
    return `${name} is exact: it is taken from the law of the statistic ${held}, the laws of the strata combined by convolution.`;
  const { plan } = result;
  const error = samplingErrorOf(p);
  const drawn = `was estimated from ${countWords(drawingErrorOf(p)?.draws ?? 0)} random sets of tables ${held} (generator ${plan.generator ?? ''}, seed ${quoted(plan.seed ?? '')})`;
  return error === undefined
    ? `${name} ${drawn}, drawn until p was settled against ${plan.alpha} by limits that hold at every look (Darling & Robbins 1967; Robbins 1970; Howard et al. 2021).`
    : `${name} ${drawn} and is (b + 1) / (m + 1) (Phipson & Smyth 2010), with a ${levelWords(error.confidence)} interval (Clopper & Pearson 1934).`;
}

function effectsWords(result: ResultBeforeWords): string | undefined {
  if (effectOf(result, 'mantel-haenszel-odds-ratio') === undefined) return undefined;
  const exact =
    effectOf(result, 'conditional-odds-ratio') === undefined
      ? ''
      : 'The common odds ratio is the conditional maximum likelihood estimate; its limits invert the exact test (Cornfield 1956; Gart 1970; Mehta, Patel & Gray 1985). ';
  return (
    `${exact}Mantel-Haenszel (1959) estimates have limits after Robins, Breslow & Greenland (1986; odds ratio), ` +
    'Greenland & Robins (1985; risk ratio) and Sato (1989; risk difference).'
  );
}

function besideWords(result: ResultBeforeWords, headline: PValue): string | undefined {
  const others = [
    ...new Set(
      result.pValues.filter((p) => p !== headline && p.statistic !== headline.statistic).map((p) => p.statistic),
    ),
  ];
  return others.length === 0 ? undefined : `Beside it stand ${others.map(citedStatistic).join('; ')}.`;
}
