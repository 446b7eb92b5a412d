// The setting of a test in sentences: where the counts came from, what was missing, what chance was taken to be, and
// which method was picked and why.
import { citedStatistic, tableWords } from '../result/describe.js';
import { chanceSentence } from '../result/design-words.js';
import { levelSentences } from '../result/level-words.js';
import { statedOpening } from '../result/stated-words.js';
import { quoted } from '../result/label-words.js';
import { countWords } from '../result/number-words.js';
import { coinSentence } from './sections/pairs.js';
import { scoresWords, strataInWords } from '../result/strata-words.js';
import type { InputSource, Result } from '../result/result.js';

/** How the table was read, as the end of a sentence that names it. */
function sourceWords({ input: { source } }: Result): string {
  switch (source.form) {
    case 'inline':
      return 'typed in';
    case 'library':
      return 'passed in by a program';
    case 'cross-table':
      return `read from a cross-table${listed([
        ...delimiterWords(source),
        ...partWords(source.headerRow, 'a header row'),
        ...partWords(source.labelColumn, 'a label column'),
        ...(source.totalsLeftOut ?? []).map((line) => `its total ${line} left out`),
        ...(source.strataFrom === undefined ? [] : ['a block for each stratum']),
      ])}`;
    case 'records':
      return `made from records${listed([
        ...delimiterWords(source),
        `rows from ${quoted(source.rowsFrom ?? '')}`,
        `columns from ${quoted(source.columnsFrom ?? '')}`,
        ...(source.countFrom === undefined || source.countFrom === null
          ? []
          : [`counts from ${quoted(source.countFrom)}`]),
        ...(typeof source.strataFrom === 'string' ? [`strata from ${quoted(source.strataFrom)}`] : []),
      ])}`;
  }
}

const listed = (parts: readonly string[]): string => (parts.length === 0 ? '' : ` (${parts.join(', ')})`);

const delimiterNames = { comma: 'commas', semicolon: 'semicolons', tab: 'tabs', pipe: 'pipes' } as const;

const delimiterWords = ({ delimiter }: InputSource): string[] =>
  delimiter === undefined ? [] : [`${delimiterNames[delimiter]} between fields`];

const partWords = (has: boolean | undefined, words: string): string[] =>
  has === undefined ? [] : [has ? words : words.replace('a ', 'no ')];

/** Raw records: how many were read, and what became of those with a value missing. */
function missingSentences({ input: { missing } }: Result): string[] {
  if (missing === null) return [];
  const read = `${countWords(missing.records)} records were read`;
  const lacking = [
    ...lackingWords('the row value', missing.missingRow),
    ...lackingWords('the column value', missing.missingColumn),
    ...lackingWords('both values', missing.missingBoth),
    ...lackingWords('the stratum', missing.missingStratum ?? 0),
    ...lackingWords('the cluster', missing.missingCluster ?? 0),
  ];
  if (lacking.length === 0) return [`${read}, none with a value missing.`];
  const fate =
    missing.rule === 'level'
      ? 'missing was kept as a level of its own'
      : `these were left out (${countWords(missing.dropped)} count${missing.dropped === 1 ? '' : 's'})`;
  return [`${read}. Missing: ${lacking.join(', ')}; ${fate}.`];
}

const lackingWords = (what: string, records: number): string[] =>
  records === 0 ? [] : [`${what} in ${countWords(records)}`];

const chanceWords: Readonly<Record<'strata' | 'pairs' | 'clusters', string>> = {
  strata: 'Chance deals the counts anew within each stratum, with every row and column total of it held.',
  pairs: coinSentence,
  clusters: 'Chance deals whole clusters to the rows anew, as many to each row as it has.',
};

function chanceOf({ plan, pValues }: Result): string {
  const { fixed } = plan;
  if (fixed === 'strata' || fixed === 'pairs' || fixed === 'clusters') return chanceWords[fixed];
  return chanceSentence(plan, pValues[0]!);
}

function scoreSentences(result: Result): string[] {
  const { plan, strata } = result;
  if (strata !== undefined) return [scoresWords(result)].filter((words) => words !== undefined);
  return [
    ...(plan.rowScores === undefined ? [] : [`Row scores: ${plan.rowScores.join(', ')}.`]),
    ...(plan.columnScores === undefined ? [] : [`Column scores: ${plan.columnScores.join(', ')}.`]),
  ];
}

/** Units that belong together, in a sentence. */
function clusterSentences({ clusters, input }: Result): string[] {
  if (clusters === undefined) return [];
  const by = clusters.from === null ? '' : ` from ${quoted(clusters.from)}`;
  const rows = input.rowLabels.map((label, i) => `${countWords(clusters.byRow[i]!)} in ${quoted(label)}`).join(', ');
  const sizes =
    clusters.smallest === clusters.largest
      ? `${countWords(clusters.smallest)} each`
      : `${countWords(clusters.smallest)} to ${countWords(clusters.largest)} each`;
  return [`The counts come in ${countWords(clusters.number)} clusters${by} of ${sizes}: ${rows}.`];
}

/** What was tested, on what, and what chance was taken to do. */
export const testedSentences = (result: Result): string[] => {
  const { plan, input, statistic, pValues } = result;
  const table = result.strata === undefined ? `A ${tableWords(result)}` : strataInWords(result);
  return [
    `${table}, ${sourceWords(result)}.`,
    ...missingSentences(result),
    ...levelSentences(input),
    ...clusterSentences(result),
    plan.nullValue === undefined ? `Measured by ${citedStatistic(statistic.name)}.` : statedOpening(pValues[0]!)!,
    ...scoreSentences(result),
    ...(plan.lambda === undefined ? [] : [`Lambda: ${plan.lambda}.`]),
    ...(plan.statisticDigest === undefined
      ? []
      : [`The module of the statistic has the SHA-256 ${plan.statisticDigest}.`]),
    ...(plan.method === 'asymptotic' ? [] : [chanceOf(result)]),
  ];
};

/** The method with the reason for it. */
export function methodSentence({ plan }: Result): string {
  const picked = plan.methodAsked === plan.method ? '' : `picked by ${plan.methodAsked}: `;
  return `Method: ${plan.method}, ${picked}${plan.methodReason.replace(/\.$/, '')}.`;
}
