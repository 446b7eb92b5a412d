// A cross-table from a file or standard input: delimiter, header row and label column found by stated rules, everything
// found reported. The whole text is in memory (tables are small), so every place is exact.
import { createHash } from 'node:crypto';
import type { CsvError } from 'csv-parse';
import { parse } from 'csv-parse/sync';
import { commentsNote, csvOptions, csvProblem, fieldOfError } from './csv-text.js';
import { looksLikeRecords, noData, oneColumn, onlyHeader } from './cross-table-problems.js';
import { delimiterText, detectDelimiter } from './delimiter.js';
import { commentsBelowData, fileAndPlace, placeInText } from './field-place.js';
import { decodeText } from './file-text.js';
import type { GridOptions } from './grid.js';
import { tableFromGrid } from './grid.js';
import type { LayoutOptions } from './layout.js';
import { detectLayout } from './layout.js';
import type { Delimiter, InputNote, ReadTable } from './read-table.js';
import type { Line } from './rectangle.js';
import { makeRectangle } from './rectangle.js';

export interface CrossTableOptions extends GridOptions, LayoutOptions {
  /** How places name the input: `counts.csv`, `standard input`. */
  readonly sourceName: string;
  /** Default: detected. */
  readonly delimiter?: Delimiter | undefined;
}

/**
 * Reads a cross-table of counts.
 * @throws Problem: of file-text, csv-text, rectangle, layout, grid; also `no-data`, `one-column`, `only-header`,
 * `raw-records`. Places are `file:line:column`.
 */
export function readCrossTable(bytes: Uint8Array, options: CrossTableOptions): ReadTable {
  const { sourceName } = options;
  const text = decodeText(bytes, sourceName);
  const delimiter = options.delimiter ?? detectDelimiter(text, true);
  const separator = delimiterText[delimiter];
  const place = (record: number, field: number): string =>
    fileAndPlace(sourceName, placeInText(text, separator, { record, field }));

  const lines = recordsOf(text, separator, place);
  if (lines.length === 0) throw noData(sourceName);
  const rectangle = makeRectangle(lines, place);
  const rows = rectangle.lines;
  const width = rows[0]!.fields.length;
  if (width === 1) throw oneColumn(sourceName, delimiter);

  const fields = rows.map((row) => row.fields);
  const fieldPlace = (row: number, column: number): string => place(rows[row]!.record, column);
  const layout = detectLayout(fields, options, fieldPlace);
  const top = layout.headerRow ? 1 : 0;
  const side = layout.labelColumn ? 1 : 0;
  if (rows.length === top) throw onlyHeader(sourceName);
  if (width === side) throw oneColumn(sourceName, delimiter);
  const texts = fields.slice(top).map((row) => row.slice(side));
  const raw = looksLikeRecords(fields, top, side, fieldPlace);
  if (raw !== undefined) throw raw;

  const { table, totalsLeftOut, notes } = tableFromGrid(
    {
      texts,
      rowLabels: layout.labelColumn ? fields.slice(top).map((row) => row[0]!) : null,
      columnLabels: layout.headerRow ? fields[0]!.slice(side) : null,
      origin: 'file',
      cellPlace: (row, column) => fieldPlace(top + row, side + column),
      labelPlace: (of, index) => (of === 'row' ? fieldPlace(top + index, 0) : fieldPlace(0, side + index)),
      place: sourceName,
    },
    options,
  );
  return {
    table,
    source: {
      form: 'cross-table',
      delimiter,
      headerRow: layout.headerRow,
      labelColumn: layout.labelColumn,
      ...(totalsLeftOut.length > 0 ? { totalsLeftOut } : {}),
    },
    sha256: createHash('sha256').update(bytes).digest('hex'),
    missing: null,
    notes: [...commentNotes(text, separator), ...rectangle.notes, ...layout.notes, ...notes],
  };
}

/** The lines that hold anything; each keeps its number among the parser's records, by which its place is found again. */
function recordsOf(text: string, separator: string, place: (record: number, field: number) => string): Line[] {
  try {
    const records: string[][] = parse(text, csvOptions(separator));
    return records
      .map((fields, record) => ({ fields, record }))
      .filter(({ fields }) => fields.some((field) => field.trim() !== ''));
  } catch (error) {
    const { record, field } = fieldOfError(error as CsvError);
    throw csvProblem(error as CsvError, place(record, field));
  }
}

function commentNotes(text: string, separator: string): InputNote[] {
  const lines = commentsBelowData(text, separator);
  return lines === 0 ? [] : [commentsNote(lines)];
}
