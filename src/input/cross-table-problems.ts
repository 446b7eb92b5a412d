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
 * The problem of a file in which a column of counts would hold text only: most likely one record a line, to be counted by
 * naming two columns. Undefined when every such column holds a number, or when there are too few lines to tell.
 * @param lines all of them, header included; @param top, side  how many lines and columns hold names
 */
export function looksLikeRecords(
  lines: readonly (readonly string[])[],
  top: number,
  side: number,
  place: (line: number, column: number) => string,
): Problem | undefined {
  const body = lines.slice(top);
  const columns = lines[0]!.map((_, column) => body.map((line) => line[column]!));
  const texts = columns.flatMap((cells, column) => (isTextOnly(cells) ? [column] : []));
  const first = texts.find((column) => column >= side);
  if (body.length < 2 || first === undefined) return undefined;
  const nameOf = (column: number): string => (top === 0 ? `${column + 1}` : lines[0]![column]!);
  const usable = texts.map(nameOf).filter((name) => /^[\p{L}\p{N}_.-]+$/u.test(name));
  const line = body.findIndex((cells) => !isMissingText(cells[first]!));
  return dataProblem({
    code: 'raw-records',
    message: `column ${shownValue(nameOf(first))} holds text only (first ${shownValue(body[line]![first]!)}), so this is no table of counts`,
    place: place(top + line, first),
    hint: `if these are raw records, name the columns to count by: --rows ${usable[0] ?? 'COLUMN'} --columns ${usable[1] ?? 'COLUMN'}`,
  });
}

const isTextOnly = (cells: readonly string[]): boolean =>
  !cells.some(isNumberLike) && cells.some((cell) => !isMissingText(cell));
