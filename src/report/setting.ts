// The setting of a test in sentences: where the counts came from, what was missing, what chance was taken to be, and
// which method was picked and why.
import { quoted } from '../result/label-words.js';
import { countWords } from '../result/number-words.js';
import { coinSentence } from './sections/pairs.js';
import type { InputSource, Result } from '../result/result.js';

/** How the table was read, as the end of a sentence that names it. */
export function sourceWords({ input: { source } }: Result): string {
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
      ])}`;
    case 'records':
      return `made from records${listed([
        ...delimiterWords(source),
        `rows from ${quoted(source.rowsFrom ?? '')}`,
        `columns from ${quoted(source.columnsFrom ?? '')}`,
        ...(source.countFrom === undefined || source.countFrom === null
          ? []
          : [`counts from ${quoted(source.countFrom)}`]),
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
export function missingSentences({ input: { missing } }: Result): string[] {
  if (missing === null) return [];
  const read = `${countWords(missing.records)} records were read`;
  const lacking = [
    ...lackingWords('the row value', missing.missingRow),
    ...lackingWords('the column value', missing.missingColumn),
    ...lackingWords('both values', missing.missingBoth),
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

/** What chance was taken to be, and the method with the reason for it. */
export function methodSentences({ plan }: Result): string[] {
  const picked = plan.methodAsked === plan.method ? '' : `picked by ${plan.methodAsked}: `;
  return [
    ...(plan.rowScores === undefined ? [] : [`Row scores: ${plan.rowScores.join(', ')}.`]),
    ...(plan.columnScores === undefined ? [] : [`Column scores: ${plan.columnScores.join(', ')}.`]),
    ...(plan.lambda === undefined ? [] : [`Lambda: ${plan.lambda}.`]),
    ...(plan.statisticDigest === undefined
      ? []
      : [`The module of the statistic has the SHA-256 ${plan.statisticDigest}.`]),
    ...(plan.fixed === 'pairs' && plan.method !== 'asymptotic' ? [coinSentence] : []),
    ...(plan.method === 'asymptotic' || plan.fixed === 'pairs'
      ? []
      : ['Chance deals the counts anew with every row and column total held.']),
    `Method: ${plan.method}, ${picked}${plan.methodReason.replace(/\.$/, '')}.`,
  ];
}
