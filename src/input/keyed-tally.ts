// Counts raw records into many tables at once, told apart by the values of further columns. Keys may be scattered: every table is held
// until the end, as text of a few characters for each cell; memory does not depend on the number of records.
import { isMissingText } from './count-text.js';
import { notUtf8 } from './file-text.js';
import { parseLabelList } from './label-list.js';
import { missingLevel } from './levels.js';
import { columnIndex, sameColumn, type ColumnNames, type RecordColumns } from './record-columns.js';
import { clusterInTwoRows, missingFamily, missingKey, twoFamilies } from './record-problems.js';
import { add, RecordTally, type Found, type MissingRule } from './record-tally.js';

/** The counts of one table: cells[row][column], of each stratum, and by cluster; holes are 0. */
export interface KeyedCells {
  readonly cells: number[][];
  layers?: number[][][];
  clusters?: Map<string, { readonly row: number; readonly counts: number[] }>;
  readonly family: string | undefined;
}

export class KeyedTally extends RecordTally {
  /** By key, in the order in which keys appear: tables that were put away; rows, columns and strata are those of all tables. */
  private readonly away = new Map<string, string>();
  /** Those that records came for of late. */
  private readonly open = new Map<string, KeyedCells>();
  /** Records left out because a key's value was missing. */
  withoutKey = 0;
  private by: readonly number[] = [];
  /** The column that names the family of a table; -1 where there is none. */
  private familyAt = -1;
  private readonly wanted: readonly string[];

  /** @param by header names or numbers, one CSV record of them. @throws Problem (usage) when it is no list. */
  constructor(
    names: ColumnNames,
    by: string,
    private readonly family: string | undefined,
    rule: MissingRule,
    sourceName: string,
  ) {
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
      ['--strata', used.strata],
      ['--cluster', used.cluster],
    ] as const;
    for (const [option, index] of others) {
      if (this.by.includes(index)) throw sameColumn('--by', option, titles[index]!);
    }
    if (this.family !== undefined) this.familyAt = columnIndex(titles, this.family, '--family', this.sourceName);
  }

  protected override count(record: readonly string[], found: Found, count: number): void {
    const key = this.keyOf(record);
    if (key === undefined) return;
    const { row, column, stratum } = found;
    let table = this.tableOf(key);
    if (table === undefined) {
      const family = this.familyAt < 0 ? undefined : this.familyIn(record);
      if (this.fault !== undefined) return;
      table = { cells: [], family };
      this.away.set(key, '');
      this.hold(key, table);
    } else if (this.familyAt >= 0 && this.familyIn(record) !== table.family) {
      const families = [table.family!, record[this.familyAt]!.trim()] as const;
      return this.fail(this.familyAt, (place) => twoFamilies(key, ...families, place));
    }
    const { strata, cluster } = this.used!;
    add(this.cells, row, column, count);
    add(table.cells, row, column, count);
    if (strata >= 0) add(((table.layers ??= [])[stratum] ??= []), row, column, count);
    if (cluster >= 0) this.addMember((table.clusters ??= new Map()), record[cluster]!.trim(), found, count);
  }

  /** How many tables there are. */
  get number(): number {
    return this.away.size;
  }

  /** All tables, once: each is let go of when the next one is asked for. */
  *tables(): Generator<[key: string, table: KeyedCells]> {
    for (const [key, text] of this.away) {
      yield [key, this.open.get(key) ?? fromText(text)];
      this.away.delete(key);
      this.open.delete(key);
    }
  }

  private tableOf(key: string): KeyedCells | undefined {
    const table = this.open.get(key);
    if (table !== undefined) return table;
    const text = this.away.get(key);
    return text === undefined ? undefined : this.hold(key, fromText(text));
  }

  private hold(key: string, table: KeyedCells): KeyedCells {
    if (this.open.size >= mostOpen) {
      for (const [other, one] of this.open) this.away.set(other, toText(one));
      this.open.clear();
    }
    this.open.set(key, table);
    return table;
  }

  /** A cluster belongs to its table: another table may have one of the same name. */
  private addMember(
    clusters: NonNullable<KeyedCells['clusters']>,
    label: string,
    { row, column }: Found,
    count: number,
  ): void {
    const field = this.used!.cluster;
    if (label.includes('\ufffd')) return this.fail(field, notUtf8);
    let home = clusters.get(label);
    if (home === undefined) clusters.set(label, (home = { row, counts: [] }));
    const labels = [label, this.used!.rowsName, this.rows.labels[home.row]!, this.rows.labels[row]!] as const;
    if (home.row !== row) return this.fail(field, (place) => clusterInTwoRows(...labels, place));
    home.counts[column] = (home.counts[column] ?? 0) + count;
  }

  private familyIn(record: readonly string[]): string {
    const value = record[this.familyAt]!.trim();
    if (isMissingText(value)) this.fail(this.familyAt, missingFamily);
    if (value.includes('\ufffd')) this.fail(this.familyAt, notUtf8);
    return value;
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

/** Tables beyond these are put away as text, a tenth of the memory, until another record of theirs comes. */
const mostOpen = 4096;

const toText = ({ cells, layers, clusters, family }: KeyedCells): string =>
  JSON.stringify([cells, family ?? null, layers ?? null, clusters === undefined ? null : [...clusters]]);

/** Holes come back as null. */
function fromText(text: string): KeyedCells {
  const [cells, family, layers, clusters] = JSON.parse(text) as [
    number[][],
    string | null,
    number[][][] | null,
    [string, { row: number; counts: number[] }][] | null,
  ];
  return {
    cells,
    family: family ?? undefined,
    ...(layers === null ? {} : { layers }),
    ...(clusters === null ? {} : { clusters: new Map(clusters) }),
  };
}

/** One CSV record (RFC 4180), so that no two lists of values have the same key; a single value is its own. */
const keyOf = (values: readonly string[]): string =>
  values.length === 1
    ? values[0]!
    : values.map((value) => (/[",\r\n]/.test(value) ? `"${value.replaceAll('"', '""')}"` : value)).join(',');
