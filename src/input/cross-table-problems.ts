// What a file can be instead of a cross-table of counts, in the words that tell its owner what to do.
import type { Problem } from '../problem/problem.js';
import { dataProblem } from '../problem/problem.js';
import { isMissingText, isNumberLike } from './count-text.js';
import type { Delimiter } from './read-table.js';
import { shownValue } from './shown-value.js';

export const noData = (place: string): Problem =>
  dataProblem({
    code: 'no-data',
    message: 'there are no lines with data (only blank lines or comments)',
    place,
    hint: 'check that this is the right file; lines that begin with # are comments',
  });

export const oneColumn = (place: string, delimiter: Delimiter): Problem =>
  dataProblem({
    code: 'one-column',
    message: `there is one column of values only (fields were split at each ${delimiter})`,
    place,
    hint: 'a table needs two columns of counts; name another separator with --delimiter comma, semicolon, tab or pipe',
  });

export const onlyHeader = (place: string): Problem =>
  dataProblem({
    code: 'only-header',
    message: 'there is one line of names and no counts below it',
    place,
    hint: 'check that this is the right file, and that it was saved whole',
  });

/**
 * The problem of a file whose cells are mostly text: most likely one record a line, to be counted by naming two columns.
 * Undefined when at least half of the cells are numbers, or when there are too few to tell.
 */
export function looksLikeRecords(
  texts: readonly (readonly string[])[],
  firstLine: readonly string[],
  place: string,
): Problem | undefined {
  const cells = texts.flat();
  const words = cells.filter((cell) => !isMissingText(cell) && !isNumberLike(cell)).length;
  if (texts.length < 2 || words * 2 <= cells.length) return undefined;
  const [rows, columns] = firstLine.filter((name) => /^[\p{L}\p{N}_.-]+$/u.test(name));
  return dataProblem({
    code: 'raw-records',
    message: `most cells hold text (first ${shownValue(cells.find((cell) => !isMissingText(cell) && !isNumberLike(cell))!)}), so this is no table of counts`,
    place,
    hint: `for raw records, name the columns to count by: --rows ${rows ?? 'COLUMN'} --columns ${columns ?? 'COLUMN'}`,
  });
}
