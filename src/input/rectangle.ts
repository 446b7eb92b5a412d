// Lines of a file made equally long: a spreadsheet's empty trailing columns are left out, a line that is really
// shorter or longer than the first is refused with its place.
import { dataProblem } from '../problem/problem.js';
import type { InputNote } from './read-table.js';

export interface Line {
  readonly fields: readonly string[];
  /** Number of the record in the text, from 0, blank lines and comments not counted. */
  readonly record: number;
  /** Rises where blank lines stand between this line and the one before. */
  readonly part?: number;
}

/** @throws Problem (data): `ragged-row` */
export function makeRectangle(
  lines: readonly Line[],
  place: (record: number, field: number) => string,
): { lines: readonly Line[]; notes: InputNote[] } {
  const first = lines[0]!.fields.length;
  let used = 0;
  for (const { fields } of lines) used = Math.max(used, lastFilled(fields) + 1);
  // Columns past the last one in which anything stands are empty on every line, header included.
  const width = Math.min(first, used);
  for (const { fields, record } of lines) {
    const filled = lastFilled(fields) + 1;
    if (fields.length < width || filled > first)
      throw raggedRow(lines, fields, first, place(record, Math.min(fields.length, first)));
  }
  const empty = first - width;
  return {
    lines: lines.map(({ fields, record }) => ({ fields: fields.slice(0, width), record })),
    notes: empty === 0 ? [] : [emptyColumns(empty)],
  };
}

function lastFilled(fields: readonly string[]): number {
  return fields.findLastIndex((field) => field.trim() !== '');
}

const emptyColumns = (empty: number): InputNote => ({
  code: 'empty-columns-left-out',
  text: `${empty === 1 ? 'one column' : `${empty} columns`} at the right without a name or a value left out`,
});

function raggedRow(lines: readonly Line[], fields: readonly string[], first: number, place: string) {
  const shortHeader = lines.slice(1).every((line) => line.fields.length === first + 1);
  return dataProblem({
    code: 'ragged-row',
    message: `this line has ${fields.length} value${fields.length === 1 ? '' : 's'} where the first line has ${first}`,
    place,
    hint: shortHeader
      ? 'if the rows begin with a label, put an empty cell first in the header'
      : 'every line needs the same number of values; put text that holds the separator in double quotes',
  });
}
