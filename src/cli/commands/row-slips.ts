// Rows that were meant and typed with a blank, a comma or quotes too many. Nothing is changed: the hint says what to type.
import { usageProblem } from '../../problem/problem.js';

interface Slip {
  readonly message: string;
  readonly rows: readonly string[];
}

const row = /^([^\s=,]+=)?\d+(,\d+)+$/;

/** Whether these words are a table: two rows or more, all of one width. */
const isTable = (words: readonly string[]): boolean =>
  words.length > 1 &&
  words.every((word) => row.test(word)) &&
  new Set(words.map((word) => word.split(',').length)).size === 1;

/** @throws Problem (usage) `row-slip`, only for words that could not be read as a table in any case. */
export function refuseRowSlips(operands: readonly string[]): void {
  if (operands.length === 0 || isTable(operands)) return;
  const slip = [commasAtEnds, blanksWithin, quotesAround, brackets]
    .map((find) => find(operands))
    .find((found) => found !== undefined && isTable(found.rows));
  if (slip === undefined) return;
  throw usageProblem({
    code: 'row-slip',
    message: slip.message,
    hint: `each row is one word, its counts separated by commas alone: ${slip.rows.join(' ')}`,
  });
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
