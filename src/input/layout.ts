// Does the first line of a cross-table name its columns, and does the first column name its rows? The rule:
//   header row    every cell after the first in line 1 is text (empty and NA-like cells aside); or they are numbers, the corner
//                 is empty and line 2 begins with text. Numbers and text mixed, with a corner that is not empty: asked back.
//   label column  the cells of the first column, below the header, are text, or the corner of the header is empty. Numbers and
//                 text mixed: asked back.
// What cannot be told from the text is said in a note, so that no line of names is ever counted unseen.
import { dataProblem } from '../problem/problem.js';
import { isImpossibleText, isMissingText, isNumberLike } from './count-text.js';
import type { InputNote } from './read-table.js';
import { shownValue } from './shown-value.js';

export type YesNo = 'yes' | 'no' | 'detect';

export interface LayoutOptions {
  readonly headerRow?: YesNo | undefined;
  readonly labelColumn?: YesNo | undefined;
}

export interface Layout {
  readonly headerRow: boolean;
  readonly labelColumn: boolean;
  readonly notes: readonly InputNote[];
}

const isText = (cell: string): boolean => !isMissingText(cell) && !isNumberLike(cell) && !isImpossibleText(cell);
const isEmpty = (cell: string | undefined): boolean => cell === undefined || cell.trim() === '';

/** @param rows one or more, none of them all empty; @param place of a field, for the problem */
export function detectLayout(
  rows: readonly (readonly string[])[],
  options: LayoutOptions,
  place: (row: number, column: number) => string,
): Layout {
  const told = { header: options.headerRow ?? 'detect', labels: options.labelColumn ?? 'detect' };
  const headerRow = told.header === 'detect' ? detectHeader(rows, place) : told.header === 'yes';
  const labelColumn = told.labels === 'detect' ? detectLabels(rows, headerRow, place) : told.labels === 'yes';
  const notes: InputNote[] = [];
  if (told.header === 'detect' && !headerRow && labelColumn) {
    notes.push({
      code: 'no-header-row',
      text: `the first line (${shownValue(rows[0]![0]!)}) was read as counts, not as names of columns (--header-row yes reads it as names)`,
    });
  }
  if (told.labels === 'detect' && headerRow && !labelColumn) {
    notes.push({
      code: 'no-label-column',
      text: `the first column (${shownValue(rows[0]![0]!)}) holds numbers only and was read as counts (--label-column yes reads it as row labels)`,
    });
  }
  return { headerRow, labelColumn, notes };
}

function detectHeader(rows: readonly (readonly string[])[], place: (row: number, column: number) => string): boolean {
  const first = rows[0]!;
  const names = first.length === 1 ? first : first.slice(1);
  const texts = names.filter(isText).length;
  const numbers = first.filter(isNumberLike).length;
  const underEmptyCorner = isEmpty(first[0]) && rows.length > 1 && !isEmpty(rows[1]![0]) && isText(rows[1]![0]!);
  if (texts === 0 || underEmptyCorner) return underEmptyCorner;
  if (numbers === 0) return true;
  throw dataProblem({
    code: 'unclear-header',
    message: `the first line mixes numbers and text (${shownValue(names.find(isText)!)}), so it may name the columns or hold counts`,
    place: place(0, first.indexOf(names.find(isText)!, first.length === 1 ? 0 : 1)),
    hint: 'add --header-row yes if it names the columns, or correct the count that is text',
  });
}

function detectLabels(
  rows: readonly (readonly string[])[],
  headerRow: boolean,
  place: (row: number, column: number) => string,
): boolean {
  if (rows[0]!.length === 1) return false;
  if (headerRow && isEmpty(rows[0]![0])) return true;
  const top = headerRow ? 1 : 0;
  const cells = rows.slice(top).map((row) => row[0]!);
  const text = cells.findIndex(isText);
  if (text < 0 || !cells.some(isNumberLike)) return text >= 0;
  throw dataProblem({
    code: 'unclear-labels',
    message: `the first column mixes numbers and text (${shownValue(cells[text]!)}), so it may name the rows or hold counts`,
    place: place(top + text, 0),
    hint: 'add --label-column yes if it names the rows, or correct the count that is text',
  });
}
