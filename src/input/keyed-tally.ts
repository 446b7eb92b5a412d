// Counts raw records into many tables at once, told apart by the values of further columns. Keys may be scattered: every table is held
// until the end, some hundred bytes and a number for each cell that was met; memory does not depend on the number of records.
import { isMissingText } from './count-text.js';
import { notUtf8 } from './file-text.js';
import { parseLabelList } from './label-list.js';
import { missingLevel } from './levels.js';
import { columnIndex, sameColumn, type ColumnNames, type RecordColumns } from './record-columns.js';
import { missingKey } from './record-problems.js';
import { RecordTally, type MissingRule } from './record-tally.js';

export class KeyedTally extends RecordTally {
  /** Key -> cells[row][column], in the order in which keys appear; rows and columns are those of all tables. */
  readonly tables = new Map<string, number[][]>();
  /** Records left out because a key's value was missing. */
  withoutKey = 0;
  private by: readonly number[] = [];
  private readonly wanted: readonly string[];

  /** @param by header names or numbers, one CSV record of them. @throws Problem (usage) when it is no list. */
  constructor(names: ColumnNames, by: string, rule: MissingRule, sourceName: string) {
    super(names, rule, sourceName);
    this.wanted = parseLabelList(by, '--by');
  }

  protected override findMore(header: readonly string[], used: RecordColumns): void {
    const titles = header.map((name) => name.trim());
    this.by = this.wanted.map((name) => columnIndex(titles, name, '--by', this.sourceName));
    const others = [
      ['--rows', used.rows],
      ['--columns', used.columns],
      ['--count', used.count],
    ] as const;
    for (const [option, index] of others) {
      if (this.by.includes(index)) throw sameColumn('--by', option, titles[index]!);
    }
  }

  protected override count(record: readonly string[], row: number, column: number, count: number): void {
    const key = this.keyOf(record);
    if (key === undefined) return;
    let cells = this.tables.get(key);
    if (cells === undefined) this.tables.set(key, (cells = []));
    const line = (cells[row] ??= []);
    line[column] = (line[column] ?? 0) + count;
    super.count(record, row, column, count);
  }

  private keyOf(record: readonly string[]): string | undefined {
    const values: string[] = [];
    for (const field of this.by) {
      let value = record[field]!.trim();
      if (isMissingText(value)) {
        if (this.rule === 'fail') this.fail(field, missingKey);
        if (this.rule === 'drop') this.withoutKey++;
        if (this.rule !== 'level') return undefined;
        value = missingLevel;
      }
      if (value.includes('\ufffd')) {
        this.fail(field, notUtf8);
        return undefined;
      }
      values.push(value);
    }
    return keyOf(values);
  }
}

/** One CSV record (RFC 4180), so that no two lists of values have the same key; a single value is its own. */
const keyOf = (values: readonly string[]): string =>
  values.length === 1
    ? values[0]!
    : values.map((value) => (/[",\r\n]/.test(value) ? `"${value.replaceAll('"', '""')}"` : value)).join(',');
