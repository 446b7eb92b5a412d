// Takes raw records one by one and counts them by two columns. This is the inner loop of reading: a record costs two
// look-ups and an addition. What is wrong is kept as a fault with the number of its record; its place is found later.
import { Problem } from '../problem/problem.js';
import { parseCount } from './count-text.js';
import { notUtf8 } from './file-text.js';
import { Levels, fresh, missing, missingLevel, mostLevels } from './levels.js';
import type { MissingFacts } from './read-table.js';
import type { ColumnNames, RecordColumns } from './record-columns.js';
import { findColumns } from './record-columns.js';
import { badCount, missingValues, raggedRecord, realMissingLevel, tooManyLevels } from './record-problems.js';

export type MissingRule = MissingFacts['rule'];

/** Something wrong with one field: indexes from 0, the header being record 0. */
export interface RecordFault {
  readonly record: number;
  readonly field: number;
  problem(place: string): Problem;
}

export class RecordTally {
  readonly rows = new Levels();
  readonly columns = new Levels();
  /** cells[row][column]; holes are 0. */
  readonly cells: number[][] = [];
  used: RecordColumns | undefined;
  /** The first thing wrong; nothing is counted after it. */
  fault: RecordFault | undefined;
  /** Records read below the header, lines without any value not counted. */
  records = 0;
  emptyLines = 0;
  missingRow = 0;
  missingColumn = 0;
  missingBoth = 0;
  dropped = 0;
  private at = -1;
  private width = 0;
  /** Under `fail`: the first record with a missing value. Reading goes on, to say how many there are. */
  private firstMissing: { record: number; field: number; text: string } | undefined;

  constructor(
    private readonly names: ColumnNames,
    private readonly rule: MissingRule,
    private readonly sourceName: string,
  ) {}

  take(record: readonly string[]): void {
    if (this.fault !== undefined) return;
    this.at++;
    const used = this.used;
    if (used === undefined) return this.begin(record);
    if (record.length !== this.width && !this.fits(record)) return;
    const rowText = record[used.rows]!;
    const columnText = record[used.columns]!;
    let row = this.rows.find(rowText);
    let column = this.columns.find(columnText);
    if (row === missing && column === missing && isEmptyLine(record)) {
      this.emptyLines++;
      return;
    }
    this.records++;
    const count = used.count < 0 ? 1 : this.countOf(record[used.count]!, used.count);
    if (count < 0) return;
    if (row === missing || column === missing) {
      this.noteMissing(row, column, record, count);
      if (this.rule !== 'level') return;
      if (row === missing) row = this.rows.addMissing();
      if (column === missing) column = this.columns.addMissing();
    }
    if (this.firstMissing !== undefined) return;
    if (row === fresh) row = this.addLevel(this.rows, rowText, used.rows);
    if (column === fresh) column = this.addLevel(this.columns, columnText, used.columns);
    if (this.fault !== undefined) return;
    const cells = (this.cells[row] ??= []);
    cells[column] = (cells[column] ?? 0) + count;
  }

  /** The fault to report once all is read: under `fail`, the missing values come out here. */
  closingFault(): RecordFault | undefined {
    const first = this.firstMissing;
    if (this.fault !== undefined || first === undefined || this.used === undefined) return this.fault;
    const all = this.missingRow + this.missingColumn + this.missingBoth;
    const { used, records } = this;
    return { ...first, problem: (place) => missingValues(used, all, records, first.text, place) };
  }

  private begin(header: readonly string[]): void {
    this.width = header.length;
    try {
      this.used = findColumns(header, this.names, this.sourceName);
    } catch (error) {
      // Kept like any other fault: thrown from here it would pass through the parser's stream, which cannot hold it.
      if (!(error instanceof Problem)) throw error;
      return this.fail(0, () => error);
    }
    for (const field of [this.used.rows, this.used.columns, this.used.count]) {
      if (header[field]?.includes('\ufffd')) this.fail(field, notUtf8);
    }
  }

  /** Whether a record of another length than the header may stay: it is only longer, by empty fields. */
  private fits(record: readonly string[]): boolean {
    if (isEmptyLine(record)) {
      this.emptyLines++;
      return false;
    }
    if (record.length > this.width && isEmptyLine(record.slice(this.width))) return true;
    const { width } = this;
    this.fail(Math.min(record.length, width), (place) => raggedRecord(record.length, width, place));
    return false;
  }

  /** -1 after a fault. */
  private countOf(text: string, field: number): number {
    const count = parseCount(text, 'file');
    if (typeof count === 'number') return count;
    this.fail(field, (place) => badCount(text, place));
    return -1;
  }

  private noteMissing(row: number, column: number, record: readonly string[], count: number): void {
    if (row !== missing) this.missingColumn++;
    else if (column !== missing) this.missingRow++;
    else this.missingBoth++;
    if (this.rule === 'drop') this.dropped = Math.min(this.dropped + count, Number.MAX_SAFE_INTEGER);
    if (this.rule !== 'fail' || this.firstMissing !== undefined) return;
    const field = row === missing ? this.used!.rows : this.used!.columns;
    this.firstMissing = { record: this.at, field, text: record[field]! };
  }

  private addLevel(levels: Levels, text: string, field: number): number {
    if (text.includes('\ufffd')) this.fail(field, notUtf8);
    if (this.rule === 'level' && text.trim() === missingLevel) this.fail(field, realMissingLevel);
    if (levels.labels.length === mostLevels) {
      const name = field === this.used!.rows ? this.used!.rowsName : this.used!.columnsName;
      this.fail(field, (place) => tooManyLevels(name, place));
    }
    return this.fault === undefined ? levels.add(text) : missing;
  }

  /** Once missing values are known to end the reading, nothing else is reported. */
  private fail(field: number, problem: (place: string) => Problem): void {
    if (this.firstMissing === undefined) this.fault ??= { record: this.at, field, problem };
  }
}

const isEmptyLine = (record: readonly string[]): boolean => record.every((field) => field.trim() === '');
