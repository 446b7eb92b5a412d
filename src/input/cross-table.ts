// A cross-table from a file or standard input: delimiter, header row and label column found by stated rules, everything
// found reported. The whole text is in memory (tables are small), so every place is exact.
import { createHash } from 'node:crypto';
import type { CsvError } from 'csv-parse';
import { parse } from 'csv-parse/sync';
import { blocksOf } from './blocks.js';
import { commentsNote, csvOptions, csvProblem, fieldOfError } from './csv-text.js';
import { looksLikeRecords, noData, oneColumn, onlyHeader } from './cross-table-problems.js';
import { delimiterText, detectDelimiter } from './delimiter.js';
import { commentsBelowData, fileAndPlace, placeInText } from './field-place.js';
import { decodeText } from './file-text.js';
import type { GridOptions } from './grid.js';
import { countsFromGrid, placed, type GridCounts } from './grid.js';
import { dataProblem } from '../problem/problem.js';
import type { LayoutOptions } from './layout.js';
import { detectLayout } from './layout.js';
import { orderLevels } from './level-order.js';
import type { Delimiter, InputNote, ReadTable, SourceFacts } from './read-table.js';
import type { Line } from './rectangle.js';
import { makeRectangle } from './rectangle.js';
import { alignedTo, pooled } from './strata.js';

export interface CrossTableOptions extends GridOptions, LayoutOptions {
  /** How places name the input: `counts.csv`, `standard input`. */
  readonly sourceName: string;
  /** Default: detected. */
  readonly delimiter?: Delimiter | undefined;
  /** What the strata are, which also says that there are some: blank lines then part them in any case. */
  readonly strata?: string | undefined;
}

/**
 * Reads a cross-table of counts, or several: strata, in blocks parted by blank lines (see blocks.ts).
 * @throws Problem: of file-text, csv-text, rectangle, layout, grid, blocks; also `no-data`, `one-column`, `only-header`,
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
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  const comments = commentNotes(text, separator);
  const blocks = blocksOf(lines, options.strata !== undefined, sourceName);
  if (blocks === undefined) {
    const { facts, notes, counts, marked } = readBlock(lines, delimiter, options, place);
    const table = placed(marked(orderLevels(counts, options)), sourceName);
    return { table, source: { delimiter, ...facts }, sha256, missing: null, notes: [...comments, ...notes] };
  }
  const parts = blocks.map(({ label, lines: own }) => ({ label, ...readBlock(own, delimiter, options, place) }));
  const barred = parts.find(({ marked, counts }) => marked(counts).impossible !== undefined);
  if (barred !== undefined) throw impossibleInStrata(sourceName, barred.label);
  const strata = parts.map(({ label, counts }) => ({ label, ...counts }));
  const table = placed(orderLevels(pooled(strata), options), sourceName);
  return {
    table,
    strata: alignedTo(table, strata),
    source: { delimiter, ...parts[0]!.facts, strataFrom: options.strata ?? null },
    sha256,
    missing: null,
    notes: [...comments, ...onceEach(parts.flatMap(({ notes }) => notes))],
  };
}

/** The counts of one block of lines. */
function readBlock(
  lines: readonly Line[],
  delimiter: Delimiter,
  options: CrossTableOptions,
  place: (record: number, field: number) => string,
): Pick<GridCounts, 'counts' | 'marked' | 'notes'> & { facts: Omit<SourceFacts, 'delimiter'> } {
  const { sourceName } = options;
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

  const { counts, marked, totalsLeftOut, notes } = countsFromGrid(
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
  const facts = {
    form: 'cross-table' as const,
    headerRow: layout.headerRow,
    labelColumn: layout.labelColumn,
    ...(totalsLeftOut.length > 0 ? { totalsLeftOut } : {}),
  };
  return { counts, marked, facts, notes: [...rectangle.notes, ...layout.notes, ...notes] };
}

const impossibleInStrata = (place: string, label: string): Error =>
  dataProblem({
    code: 'impossible-cells',
    message: `the block "${label}" has cells declared impossible (-), for which strata are not worked out`,
    place,
    hint: 'test each block alone, or write 0 where a cell was merely empty',
  });

const onceEach = (notes: readonly InputNote[]): InputNote[] =>
  notes.filter(({ text }, index) => notes.findIndex((one) => one.text === text) === index);

/** The lines that hold anything; each keeps its number among the parser's records, by which its place is found again. Blank
 *  lines, and lines of separators alone, part the rest. */
function recordsOf(text: string, separator: string, place: (record: number, field: number) => string): Line[] {
  try {
    let part = 0;
    let blanks = 0;
    return parsed(text, separator).flatMap(({ fields, blankLines }, record) => {
      const empty = fields.every((field) => field.trim() === '');
      if (empty || blankLines > blanks) part++;
      blanks = blankLines;
      return empty ? [] : [{ fields, record, part }];
    });
  } catch (error) {
    const { record, field } = fieldOfError(error as CsvError);
    throw csvProblem(error as CsvError, place(record, field));
  }
}

/** Records with the number of blank lines before each; that costs time, so it is asked for only where a blank line is seen. */
function parsed(text: string, separator: string): { fields: string[]; blankLines: number }[] {
  const options = csvOptions(separator);
  if (!/[\r\n][ \t]*(\r\n|\n|\r)/.test(text.replaceAll('\r\n', '\n'))) {
    const records: string[][] = parse(text, options);
    return records.map((fields) => ({ fields, blankLines: 0 }));
  }
  const records = parse(text, { ...options, info: true }) as unknown as {
    record: string[];
    info: { empty_lines: number };
  }[];
  return records.map(({ record, info }) => ({ fields: record, blankLines: info.empty_lines }));
}

function commentNotes(text: string, separator: string): InputNote[] {
  const lines = commentsBelowData(text, separator);
  return lines === 0 ? [] : [commentsNote(lines)];
}
