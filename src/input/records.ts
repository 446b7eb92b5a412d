// Raw records, one a line under a header, counted by two of their columns. Streamed: memory does not depend on the
// number of records. Places are found by reading a second time, and only when something is wrong.
import { createHash } from 'node:crypto';
import { CsvError } from 'csv-parse';
import { noData } from './cross-table-problems.js';
import { commentsNote, csvOptions, csvProblem, fieldOfError } from './csv-text.js';
import { delimiterText, detectDelimiter } from './delimiter.js';
import { FieldPlace, fileAndPlace } from './field-place.js';
import { placed } from './grid.js';
import type { OrderOptions } from './level-order.js';
import { orderLevels } from './level-order.js';
import type { Delimiter, InputNote, ReadTable } from './read-table.js';
import type { ColumnNames } from './record-columns.js';
import { noRecords, noRecordsLeft } from './record-problems.js';
import { RecordParser, checkedBytes, headSize } from './record-stream.js';
import { clustersOf, strataOf } from './record-groups.js';
import type { MissingRule } from './record-tally.js';
import { RecordTally } from './record-tally.js';
import { settleRecordTotals } from './record-totals.js';
import type { TotalsRule } from './total-lines.js';

export interface RecordOptions extends ColumnNames, OrderOptions {
  /** Missing values: an empty field, NA, N/A, NaN, null in any case. Default `fail`. */
  readonly missing?: MissingRule | undefined;
  /** Default: detected in the first 64 KB. */
  readonly delimiter?: Delimiter | undefined;
  /** Levels named as totals, in records that bring counts; default `refuse`. */
  readonly totals?: TotalsRule | undefined;
  /** How places name the input: `visits.csv`, `standard input`. */
  readonly sourceName: string;
  /** Reads the same bytes once more, to find the line of a fault. Without it a place is `standard input, record 17`. */
  readonly reread?: (() => AsyncIterable<Uint8Array>) | undefined;
}

export interface Walked {
  readonly delimiter: Delimiter;
  readonly sha256: string;
  readonly notes: readonly InputNote[];
}

/**
 * Reads raw records, or records with counts.
 * @throws Problem. Data: of file-text and csv-text, count-text, `ragged-row`, `missing-values`, `missing-level-name`,
 * `too-many-levels`, `no-data`, `only-header`, `no-records-left`; usage: `unknown-column`, `ambiguous-column`, `same-column`, `unlisted-level`.
 */
export async function readRecords(chunks: AsyncIterable<Uint8Array>, options: RecordOptions): Promise<ReadTable> {
  const { sourceName } = options;
  const rule = options.missing ?? 'fail';
  const tally = new RecordTally(options, rule, sourceName);
  const { delimiter, sha256, notes } = await walk(chunks, options, tally);
  const { used, rows, columns, records } = tally;
  if (used === undefined) throw noData(sourceName);
  if (records === 0) throw noRecords(sourceName);
  if (rows.labels.length === 0) throw noRecordsLeft(records, sourceName);
  const whole = {
    counts: rows.labels.map((_, row) => columns.labels.map((__, column) => tally.cells[row]?.[column] ?? 0)),
    rowLabels: rows.labels,
    columnLabels: columns.labels,
  };
  const settled = settleRecordTotals(whole, used.countName !== null, options.totals ?? 'refuse', sourceName);
  const { missingRow, missingColumn, missingBoth, missingStratum, missingCluster, dropped } = tally;
  const table = placed(orderLevels(settled.counts, options), sourceName);
  const strata = strataOf(tally, whole, table, options.totals ?? 'refuse', sourceName);
  return {
    table,
    ...(strata === undefined ? {} : { strata }),
    ...(used.clusterName === null ? {} : { clusters: clustersOf(tally, whole, table) }),
    source: {
      form: 'records',
      delimiter,
      headerRow: true,
      ...(settled.leftOut.length > 0 ? { totalsLeftOut: settled.leftOut } : {}),
      rowsFrom: used.rowsName,
      columnsFrom: used.columnsName,
      countFrom: used.countName,
      ...(used.strataName === null ? {} : { strataFrom: used.strataName }),
      ...(used.clusterName === null ? {} : { clusterFrom: used.clusterName }),
    },
    sha256,
    missing: {
      rule,
      records,
      missingRow,
      missingColumn,
      missingBoth,
      ...(used.strataName === null ? {} : { missingStratum }),
      ...(used.clusterName === null ? {} : { missingCluster }),
      dropped,
    },
    notes: [...notes, ...headerNotes(tally), ...settled.notes],
  };
}

/** One pass over the bytes. */
export async function walk(
  chunks: AsyncIterable<Uint8Array>,
  options: RecordOptions,
  tally: RecordTally,
): Promise<Walked> {
  const { sourceName } = options;
  const hash = createHash('sha256');
  let delimiter: Delimiter = options.delimiter ?? 'comma';
  let parser: RecordParser | undefined;
  let commentsAbove = 0;
  const take = (record: readonly string[]): void => {
    if (tally.used === undefined) commentsAbove = parser!.info.comment_lines;
    tally.take(record);
  };
  try {
    for await (const { bytes, whole } of checkedBytes(chunks, sourceName, hash)) {
      if (parser === undefined) {
        delimiter =
          options.delimiter ?? detectDelimiter(bytes.toString('utf8', 0, headSize), whole && bytes.length <= headSize);
        parser = new RecordParser(csvOptions(delimiterText[delimiter]), take);
      }
      await parser.feed(bytes);
      if (tally.fault !== undefined) break;
    }
    if (tally.fault === undefined) await parser?.close();
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const { record, field } = fieldOfError(error);
    throw csvProblem(error, await placeOf(record, field, delimiter, options));
  }
  const fault = tally.closingFault();
  if (fault !== undefined) throw fault.problem(await placeOf(fault.record, fault.field, delimiter, options));
  const comments = (parser?.info.comment_lines ?? 0) - commentsAbove;
  return { delimiter, sha256: hash.digest('hex'), notes: readingNotes(tally, comments) };
}

/** `visits.csv:18:7`, by reading again; else the number of the record below the header. */
async function placeOf(record: number, field: number, delimiter: Delimiter, options: RecordOptions): Promise<string> {
  const { sourceName } = options;
  const byNumber = record === 0 ? `${sourceName}, header` : `${sourceName}, record ${record}`;
  if (options.reread === undefined) return byNumber;
  const finder = new FieldPlace(delimiterText[delimiter], { record, field });
  const decoder = new TextDecoder('utf-8');
  try {
    for await (const chunk of options.reread()) {
      const place = finder.feed(decoder.decode(chunk, { stream: true }));
      if (place !== undefined) return fileAndPlace(sourceName, place);
    }
  } catch {
    // The source cannot be read a second time; the number of the record still says where.
    return byNumber;
  }
  const place = finder.feed(decoder.decode()) ?? finder.end();
  return place === undefined ? byNumber : fileAndPlace(sourceName, place);
}

function readingNotes(tally: RecordTally, comments: number): InputNote[] {
  const notes: InputNote[] = [];
  if (comments > 0) notes.push(commentsNote(comments));
  if (tally.emptyLines > 0) {
    const lines = tally.emptyLines === 1 ? 'one line' : `${tally.emptyLines} lines`;
    notes.push({ code: 'empty-lines-skipped', text: `${lines} without any value skipped` });
  }
  return notes;
}

/** A first line whose names come back as values was most likely a record. */
function headerNotes({ used, rows, columns }: RecordTally): InputNote[] {
  if (!rows.labels.includes(used!.rowsName) || !columns.labels.includes(used!.columnsName)) return [];
  const text = `the first line (${used!.rowsName}, ${used!.columnsName}) was read as names of columns, yet both occur as values`;
  return [{ code: 'header-may-be-data', text }];
}
