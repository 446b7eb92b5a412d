// Rows that were meant and typed with a blank, a comma or quotes too many. Nothing is changed: the hint says what to type.
import { usageProblem } from '../../problem/problem.js';

interface Slip {
  readonly message: string;
  readonly rows: readonly string[];
  /** Where the rows alone do not say enough. */
  readonly hint?: string;
}

const row = /^([^\s=,]+=)?\d+(,\d+)+$/;

const rowsAreWords = 'each row is one word, its counts separated by commas alone:';

/** Whether these words are a table: two rows or more, all of one width. */
const isTable = (words: readonly string[]): boolean =>
  words.length > 1 &&
  words.every((word) => row.test(word)) &&
  new Set(words.map((word) => word.split(',').length)).size === 1;

/** @throws Problem (usage) `row-slip`, only for words that could not be read as a table in any case. */
export function refuseRowSlips(operands: readonly string[]): void {
  if (operands.length === 0 || isTable(operands)) return;
  const slip = [commasAtEnds, blanksWithin, quotesAround, brackets, otherSeparators, singleCounts]
    .map((find) => find(operands))
    .find((found) => found !== undefined && isTable(found.rows));
  if (slip === undefined) return;
  throw usageProblem({
    code: 'row-slip',
    message: slip.message,
    hint: slip.hint ?? `${rowsAreWords} ${slip.rows.join(' ')}`,
  });
}

/** `8 2 1 9`: the counts of several rows, read off one by one. A table of one column says nothing about association. */
function singleCounts(words: readonly string[]): Slip | undefined {
  if (!words.every((word) => /^([^\s=,]+=)?,?\d+,?$/.test(word))) return undefined;
  const counts = words.map((word) => /\d+(?=,?$)/.exec(word)![0]);
  const isEven = counts.length % 2 === 0 && counts.length > 2 && words.every((word) => !word.includes('='));
  const half = counts.length / 2;
  const rows = isEven ? [counts.slice(0, half).join(','), counts.slice(half).join(',')] : ['8,2', '1,9'];
  return {
    message: words.length === 1 ? 'one count alone is no table' : 'each word is one count, which makes a single column',
    rows,
    hint: `${rowsAreWords} ${isEven ? `for two rows ${rows.join(' ')}` : `for example ${rows.join(' ')}`}`,
  };
}

/** `8/10 1/10`, `8-2 1-9`, `8:2 1:9`, `8;2 1;9` */
function otherSeparators(words: readonly string[]): Slip | undefined {
  const [, separator] = /^\d+([/:;|-])\d/.exec(words[0]!) ?? [];
  if (separator === undefined || words.length < 2) return undefined;
  const parts = words.map((word) => word.split(separator));
  if (!parts.every((counts) => counts.every((count) => /^\d+$/.test(count)))) return undefined;
  const rows = parts.map((counts) => counts.join(','));
  const message = `the counts of a row are separated by "${separator}"`;
  const ofTotals = parts.every(([events, total, ...more]) => more.length === 0 && Number(events) <= Number(total));
  if (separator !== '/' || !ofTotals) return { message, rows };
  const split = parts.map(([events, total]) => `${events!},${Number(total) - Number(events)}`);
  return { message, rows, hint: `write ${split.join(' ')} if these are events of totals, else ${rows.join(' ')}` };
}

/** `8,2, 1,9,` */
const commasAtEnds = (words: readonly string[]): Slip | undefined =>
  words.some((word) => word.endsWith(','))
    ? { message: 'a row ends with a comma', rows: words.map((word) => word.replace(/,$/, '')) }
    : undefined;

/** `8, 2 1, 9`, and `treated = 8,2`. */
const blanksWithin = (words: readonly string[]): Slip | undefined =>
  words.some((word) => /^[,=]|[,=]$/.test(word))
    ? {
        message: 'a row has a blank in it',
        rows: words
          .join(' ')
          .replace(/ *([,=]) */g, '$1')
          .split(' '),
      }
    : undefined;

/** `"8,2 1,9"`: the shell hands it on as one word. */
const quotesAround = ([word, ...more]: readonly string[]): Slip | undefined =>
  more.length === 0 && word!.trim().includes(' ')
    ? { message: 'all rows stand in one pair of quotes', rows: word!.trim().split(/ +/) }
    : undefined;

/** `[[8,2],[1,9]]` */
function brackets(words: readonly string[]): Slip | undefined {
  const text = words.join('');
  if (!/^\[\[[\d,[\]]*\]\]$/.test(text)) return undefined;
  return { message: 'rows are typed without brackets', rows: text.slice(2, -2).split('],[') };
}
