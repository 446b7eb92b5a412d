// Takes raw records one by one and counts them by two columns. This is the inner loop of reading: a record costs two
// look-ups and an addition. What is wrong is kept as a fault with the number of its record; its place is found later.
import { Problem } from '../problem/problem.js';
import { parseCount } from './count-text.js';
import { notUtf8 } from './file-text.js';
import { Levels, fresh, missing, missingLevel, mostLevels } from './levels.js';
import type { MissingFacts } from './read-table.js';
import type { ColumnNames, RecordColumns } from './record-columns.js';
import { findColumns } from './record-columns.js';
import {
  badCount,
  clusterInTwoRows,
  missingCluster,
  missingValues,
  raggedRecord,
  realMissingLevel,
  tooManyClusters,
  tooManyLevels,
} from './record-problems.js';

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
  readonly strata = new Levels();
  /** The same for each stratum; none where strata were not asked for. */
  readonly layers: number[][][] = [];
  readonly clusters = new Levels();
  /** For each cluster its row, and its counts by column; holes are 0. */
  readonly clusterRows: number[] = [];
  readonly clusterCounts: number[][] = [];
  used: RecordColumns | undefined;
  /** The first thing wrong; nothing is counted after it. */
  fault: RecordFault | undefined;
  /** Records read below the header, lines without any value not counted. */
  records = 0;
  emptyLines = 0;
  missingRow = 0;
  missingColumn = 0;
  missingBoth = 0;
  missingStratum = 0;
  missingCluster = 0;
  dropped = 0;
  private at = -1;
  private width = 0;
  /** Under `fail`: the first record with a missing value. Reading goes on, to say how many there are. */
  private firstMissing: { record: number; field: number; text: string } | undefined;

  constructor(
    private readonly names: ColumnNames,
    protected readonly rule: MissingRule,
    protected readonly sourceName: string,
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
    let stratum = used.strata < 0 ? 0 : this.strata.find(record[used.strata]!);
    const cluster = used.cluster < 0 ? 0 : this.clusters.find(record[used.cluster]!);
    if (row === missing || column === missing || stratum === missing || cluster === missing) {
      this.noteMissing({ row, column, stratum, cluster }, record, count);
      if (this.rule !== 'level') return;
      if (cluster === missing) return this.fail(used.cluster, (place) => missingCluster(used.clusterName!, place));
      if (row === missing) row = this.rows.addMissing();
      if (column === missing) column = this.columns.addMissing();
      if (stratum === missing) stratum = this.strata.addMissing();
    }
    if (this.firstMissing !== undefined) return;
    if (row === fresh) row = this.addLevel(this.rows, rowText, used.rows);
    if (column === fresh) column = this.addLevel(this.columns, columnText, used.columns);
    if (stratum === fresh) stratum = this.addLevel(this.strata, record[used.strata]!, used.strata);
    if (this.fault !== undefined) return;
    this.count(record, { row, column, stratum, cluster }, count);
  }

  /** Adds to a cell; tallies of several tables look at the record to find out which. */
  protected count(record: readonly string[], { row, column, stratum, cluster }: Found, count: number): void {
    const { strata, cluster: field } = this.used!;
    add(this.cells, row, column, count);
    if (strata >= 0) add((this.layers[stratum] ??= []), row, column, count);
    if (field >= 0) this.addToCluster(cluster, row, column, count, record[field]!);
  }

  /** The fault to report once all is read: under `fail`, the missing values come out here. */
  closingFault(): RecordFault | undefined {
    const first = this.firstMissing;
    if (this.fault !== undefined || first === undefined || this.used === undefined) return this.fault;
    const all = this.missingRow + this.missingColumn + this.missingBoth + this.missingStratum + this.missingCluster;
    const { used, records } = this;
    return { ...first, problem: (place) => missingValues(used, all, records, first.text, place) };
  }

  private begin(header: readonly string[]): void {
    this.width = header.length;
    try {
      this.used = findColumns(header, this.names, this.sourceName);
      this.findMore?.(header, this.used);
    } catch (error) {
      // Kept like any other fault: thrown from here it would pass through the parser's stream, which cannot hold it.
      if (!(error instanceof Problem)) throw error;
      return this.fail(0, () => error);
    }
    const { rows, columns, count, strata, cluster } = this.used;
    for (const field of [rows, columns, count, strata, cluster]) {
      if (header[field]?.includes('\ufffd')) this.fail(field, notUtf8);
    }
  }

  /** Further columns that a tally reads. @throws Problem (usage) */
  protected findMore?(header: readonly string[], used: RecordColumns): void;

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

  private noteMissing(found: Found, record: readonly string[], count: number): void {
    const { row, column, stratum } = found;
    if (row === missing && column === missing) this.missingBoth++;
    else if (row === missing) this.missingRow++;
    else if (column === missing) this.missingColumn++;
    else if (stratum === missing) this.missingStratum++;
    else this.missingCluster++;
    if (this.rule === 'drop') this.dropped = Math.min(this.dropped + count, Number.MAX_SAFE_INTEGER);
    if (this.rule !== 'fail' || this.firstMissing !== undefined) return;
    const { rows, columns, strata, cluster } = this.used!;
    const field = row === missing ? rows : column === missing ? columns : stratum === missing ? strata : cluster;
    this.firstMissing = { record: this.at, field, text: record[field]! };
  }

  /** Every record of a cluster has the row of its first one. */
  private addToCluster(found: number, row: number, column: number, count: number, text: string): void {
    const field = this.used!.cluster;
    const cluster = found === fresh ? this.addCluster(text, row, field) : found;
    if (this.fault !== undefined) return;
    const home = this.clusterRows[cluster]!;
    if (home !== row) {
      const labels = [
        this.clusters.labels[cluster]!,
        this.used!.rowsName,
        this.rows.labels[home]!,
        this.rows.labels[row]!,
      ] as const;
      return this.fail(field, (place) => clusterInTwoRows(...labels, place));
    }
    const counts = this.clusterCounts[cluster]!;
    counts[column] = (counts[column] ?? 0) + count;
  }

  private addCluster(text: string, row: number, field: number): number {
    if (text.includes('\ufffd')) this.fail(field, notUtf8);
    if (this.clusters.labels.length === mostClusters) {
      this.fail(field, (place) => tooManyClusters(this.used!.clusterName!, mostClusters, place));
    }
    this.clusterRows.push(row);
    this.clusterCounts.push([]);
    return this.clusters.add(text);
  }

  private addLevel(levels: Levels, text: string, field: number): number {
    if (text.includes('\ufffd')) this.fail(field, notUtf8);
    if (this.rule === 'level' && text.trim() === missingLevel) this.fail(field, realMissingLevel);
    if (levels.labels.length === mostLevels) {
      const { rows, columns, rowsName, columnsName, strataName } = this.used!;
      const name = field === rows ? rowsName : field === columns ? columnsName : strataName!;
      this.fail(field, (place) => tooManyLevels(name, place));
    }
    return this.fault === undefined ? levels.add(text) : missing;
  }

  /** Once missing values are known to end the reading, nothing else is reported. */
  protected fail(field: number, problem: (place: string) => Problem): void {
    if (this.firstMissing === undefined) this.fault ??= { record: this.at, field, problem };
  }
}

/** Indexes of levels; 0 for strata and clusters where there are none. */
export interface Found {
  readonly row: number;
  readonly column: number;
  readonly stratum: number;
  readonly cluster: number;
}

/** More clusters than this are not kept. */
const mostClusters = 1_000_000;

export function add(cells: number[][], row: number, column: number, count: number): void {
  const line = (cells[row] ??= []);
  line[column] = (line[column] ?? 0) + count;
}

const isEmptyLine = (record: readonly string[]): boolean => record.every((field) => field.trim() === '');
