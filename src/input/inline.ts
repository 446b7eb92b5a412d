// Rows typed in as operands: `8,2 1,9` or `treated=8,2 control=1,9`, no quoting needed in a shell.
import { dataProblem, usageProblem } from '../problem/problem.js';
import type { BadCell } from './count-faults.js';
import { badCell, countProblem } from './count-faults.js';
import { isImpossibleText, isNumberLike, severalCounts } from './count-text.js';
import type { GridOptions } from './grid.js';
import { tableFromGrid } from './grid.js';
import type { ReadTable } from './read-table.js';
import { shownValue } from './shown-value.js';

export type InlineOptions = GridOptions;

/** A label is everything before the last `=`, so it may hold one itself: `dose<=5=3,4`. */
function splitOperand(operand: string): { label: string | undefined; counts: string[] } {
  const at = operand.lastIndexOf('=');
  return { label: at < 0 ? undefined : operand.slice(0, at), counts: operand.slice(at + 1).split(',') };
}

/**
 * Whether an operand was meant as a row of counts, well written or not, rather than as the path of a file: at least half of its
 * pieces between commas are numbers (empty ones aside), and it neither starts like a path nor ends like a file's name.
 */
export function looksLikeRow(operand: string): boolean {
  if (operand === '-' || /^(\.{0,2}|~)\//.test(operand)) return false;
  const { label, counts } = splitOperand(operand);
  const pieces = counts.filter((piece) => piece.trim() !== '');
  if (pieces.length === 0) return label !== undefined && label !== '';
  const last = pieces[pieces.length - 1]!;
  if (!isNumberLike(last) && /[/\\]|\.[a-z][a-z0-9]*$/i.test(last)) return false;
  const numbers = pieces.filter(
    (piece) => isNumberLike(piece) || isImpossibleText(piece) || severalCounts.test(piece.trim()),
  ).length;
  return numbers * 2 >= pieces.length;
}

/**
 * Reads rows of counts, one an operand, `[label=]count,count,...`.
 * @throws Problem: places are `row "label", position 2`. Data: `ragged-row`, `no-rows`, and those of count-text and grid; usage:
 * `conflicting-labels` when labels are given both before `=` and by option.
 */
export function readInline(operands: readonly string[], options: InlineOptions = {}): ReadTable {
  if (operands.length === 0) {
    throw usageProblem({ code: 'no-rows', message: 'there are no rows', hint: 'type one or more: 8,2 1,9' });
  }
  const rows = operands.map(splitOperand);
  const labelled = rows.some((row) => row.label !== undefined);
  const rowPlace = (row: number): string => {
    const { label } = rows[row]!;
    return label === undefined || label.trim() === '' ? `row ${row + 1}` : `row ${shownValue(label.trim())}`;
  };
  const cellPlace = (row: number, column: number): string => `${rowPlace(row)}, position ${column + 1}`;
  if (labelled && options.rowLabels !== undefined) {
    throw usageProblem({
      code: 'conflicting-labels',
      message: 'row labels are given twice, before = and by --row-labels',
      place: '--row-labels',
      hint: 'keep one of the two',
    });
  }
  checkRows(
    rows.map((row) => row.counts),
    rowPlace,
    cellPlace,
  );
  const { table, totalsLeftOut, notes } = tableFromGrid(
    {
      texts: rows.map((row) => row.counts),
      rowLabels: labelled ? rows.map((row) => row.label) : null,
      columnLabels: null,
      origin: 'typed',
      cellPlace,
      labelPlace: (side, index) => (side === 'row' ? rowPlace(index) : `column ${index + 1}`),
      place: undefined,
    },
    options,
  );
  const source = { form: 'inline' as const, ...(totalsLeftOut.length > 0 ? { totalsLeftOut } : {}) };
  return { table, source, sha256: null, missing: null, notes };
}

/** Rows of one length. A piece that is no count is the likelier slip (`8,,2`), so it is named before the length is. */
function checkRows(
  rows: readonly string[][],
  rowPlace: (row: number) => string,
  cellPlace: (row: number, column: number) => string,
): void {
  const ragged = rows.findIndex((row) => row.length !== rows[0]!.length);
  if (ragged < 0) return;
  const bad = rows.flatMap((row, i) =>
    row
      .map((text, j) => (isImpossibleText(text) ? undefined : badCell(text, 'typed', () => cellPlace(i, j))))
      .filter((cell): cell is BadCell => cell !== undefined),
  );
  if (bad.length > 0) throw countProblem(bad, bad.length);
  throw dataProblem({
    code: 'ragged-row',
    message: `${rows[ragged]!.length} count${rows[ragged]!.length === 1 ? '' : 's'} where the first row has ${rows[0]!.length}`,
    place: rowPlace(ragged),
    hint: 'every row needs the same number of counts; write 0 for a cell nobody fell into',
  });
}
