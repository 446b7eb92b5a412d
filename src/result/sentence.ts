// One line for a report: the effect first, then the p with its tail, two-sided rule, method, draws, seed and error.
// After the American Statistical Association's statement (Wasserstein & Lazar 2016): the p stands beside what was seen,
// and nothing is called significant.
import {
  degreesWords,
  directionWords,
  errorAside,
  foundWords,
  isOneTableOnly,
  pName,
  pNumber,
  shortStatisticWords,
  tableWords,
  type ResultBeforeWords,
} from './describe.js';
import { quoted } from './label-words.js';
import { effectClause, intervalWords } from './headline-effect.js';
import { countWords, digits, percentWords, pointsWords, statisticValueWords } from './number-words.js';
import { changeSentence, isAboutChange } from './pairs-sentence.js';
import type { PValue, Result } from './result.js';
import { strataSentence } from './strata-words.js';

type Group = NonNullable<Result['statistic']['groups']>[number];

/** The sentence for a report; labels in it are quoted and show no control characters. */
export function sentenceFor(result: ResultBeforeWords): string {
  if (result.strata !== undefined) return strataSentence(result);
  const headline = result.pValues[0]!;
  if (isAboutChange(result)) return changeSentence(result);
  if (isOneTableOnly(result)) return oneTableSentence(result, headline);
  const { groups, event } = result.statistic;
  const seen =
    groups === undefined || event === undefined ? `In a ${tableWords(result)}, ` : sharesSeen(result, groups, event);
  const direction = directionWords(result, headline);
  const name = `${pName(headline)}${direction === undefined ? '' : ` (${direction})`}`;
  // Clusters differ in size, so that dealing them whole moves the row totals.
  const drawn = result.clusters === undefined ? [] : ['random ways to deal the clusters to the rows'];
  const found = foundWords(headline, result.plan.seed, ...drawn);
  const answer = `${pNumber(headline)}${errorAside(headline)}${headline.method === 'asymptotic' ? ' ' : ', '}${found}`;
  if (headline.nullValue !== undefined) return `${seen}${statedClause(result, headline)}the ${name} is ${answer}.`;
  return `${seen}${sizeClause(result)}${valueWords(result)} and its ${name} is ${answer}.`;
}

/** Against a stated odds ratio, the odds ratio seen. */
function statedClause(result: ResultBeforeWords, { nullValue }: PValue): string {
  const clause = nullValue?.of === 'odds-ratio' ? effectClause(result) : undefined;
  return clause === undefined ? '' : `${clause}; `;
}

/** The effect, where the two shares do not stand for it already; kappa is its own. */
function sizeClause(result: ResultBeforeWords): string {
  if (result.statistic.groups !== undefined || result.plan.paired) return '';
  const clause = effectClause(result);
  return clause === undefined ? '' : `${clause}; `;
}

function sharesSeen(result: ResultBeforeWords, groups: readonly [Group, Group], event: string): string {
  const [first, second] = groups;
  const difference =
    first.proportion === null || second.proportion === null
      ? 'an empty group leaves no difference'
      : `first minus second: ${pointsWords(first.proportion - second.proportion)}${pointsLimits(result)}`;
  return (
    `With the ${result.plan.groups ?? 'rows'} as groups, ${shareOf(first)} against ${shareOf(second)} ` +
    `were ${quoted(event)} (${difference}); `
  );
}

/** ", 95% interval 26.6 to 86.5". */
function pointsLimits({ effects = [] }: ResultBeforeWords): string {
  const intervals = effects.find(({ name }) => name === 'risk-difference')?.intervals;
  const words = intervalWords(
    intervals?.find(({ method }) => method === 'newcombe'),
    (limit) => (typeof limit === 'number' ? digits(100 * limit, 3) : limit),
  );
  return words === undefined ? '' : `, ${words}`;
}

const shareOf = (group: Group): string =>
  `${countWords(group.events)} of ${countWords(group.size)}${percentOf(group)} in ${quoted(group.label)}`;

const percentOf = (group: Group): string => (group.proportion === null ? '' : ` (${percentWords(group.proportion)})`);

function valueWords({ statistic, pValues, plan, effects = [] }: ResultBeforeWords): string {
  const words = shortStatisticWords(statistic.name);
  if (statistic.value === null) return `${words} is undefined, because a group is empty`;
  // Degrees of freedom mean something only to a statistic that is compared with a chi-square law.
  const hasLaw = pValues.some((p) => p.statistic === statistic.name && p.degreesOfFreedom !== undefined);
  const { degreesOfFreedom } = statistic;
  const degrees = hasLaw && degreesOfFreedom !== undefined ? ` (${degreesWords(degreesOfFreedom)})` : '';
  const limits = plan.paired ? intervalWords(effects.find(({ name }) => name === 'kappa')?.intervals[0]) : undefined;
  return `${words} is ${statisticValueWords(statistic.value)}${degrees}${limits === undefined ? '' : ` (${limits})`}`;
}

function oneTableSentence(result: ResultBeforeWords, p: PValue): string {
  return (
    `The margins of this ${tableWords(result)} allow no other table, so the ${pName(p)} of ` +
    `${shortStatisticWords(p.statistic)} is ${pNumber(p)} whatever the counts: it speaks neither for nor against an association.`
  );
}
