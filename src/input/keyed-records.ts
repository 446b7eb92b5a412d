// One long file of raw records to many tables: one for each combination of values in its key columns, in the order in which those
// appear. All have the same rows and columns, those of the whole file, so that scores and places mean the same in each.
import { Problem } from '../problem/problem.js';
import { noData } from './cross-table-problems.js';
import { placed } from './grid.js';
import { KeyedTally, type KeyedCells } from './keyed-tally.js';
import { orderLevels } from './level-order.js';
import type { Table } from '../table/table.js';
import type { InputNote, ReadTable } from './read-table.js';
import { clustersOver, refuseTotalStratum, strataOver } from './record-groups.js';
import { noRecords, noRecordsLeft } from './record-problems.js';
import { settleRecordTotals } from './record-totals.js';
import { walk, type RecordOptions } from './records.js';

export interface KeyedOptions extends RecordOptions {
  /** The columns that tell tables apart: header names or numbers, one CSV record of them. */
  readonly by: string;
  /** The column that names the family of each table. */
  readonly family?: string | undefined;
}

interface Named {
  readonly key: string;
  readonly family?: string | undefined;
}

export interface KeyedTables {
  /** Of every table. */
  readonly rowLabels: readonly string[];
  readonly columnLabels: readonly string[];
  readonly number: number;
  /** A table, or what kept its counts from being one. Made one at a time. */
  readonly tables: Iterable<Named & ({ readonly read: ReadTable } | { readonly problem: Problem })>;
  /** Of the whole file. */
  readonly notes: readonly InputNote[];
}

/** @throws Problem: those of readRecords, and `missing-key` (data). */
export async function readKeyedRecords(chunks: AsyncIterable<Uint8Array>, options: KeyedOptions): Promise<KeyedTables> {
  const { sourceName } = options;
  const tally = new KeyedTally(options, options.by, options.family, options.missing ?? 'fail', sourceName);
  const { delimiter, sha256, notes } = await walk(chunks, options, tally);
  const { used, rows, columns, records } = tally;
  if (used === undefined) throw noData(sourceName);
  if (records === 0) throw noRecords(sourceName);
  if (tally.number === 0) throw noRecordsLeft(records, sourceName);
  const labelled = (cells: readonly (readonly number[])[]) => ({
    counts: rows.labels.map((_, row) => columns.labels.map((__, column) => cells[row]?.[column] ?? 0)),
    rowLabels: rows.labels,
    columnLabels: columns.labels,
  });
  if (used.strataName !== null) refuseTotalStratum(tally, options.totals ?? 'refuse', sourceName);
  // Totals and the order of levels are settled once, on the sum of all tables.
  const settled = settleRecordTotals(
    labelled(tally.cells),
    used.countName !== null,
    options.totals ?? 'refuse',
    sourceName,
  );
  orderLevels(settled.counts, options);
  const keptRows = settled.counts.rowLabels.map((label) => rows.labels.indexOf(label));
  const keptColumns = settled.counts.columnLabels.map((label) => columns.labels.indexOf(label));
  const source: ReadTable['source'] = {
    form: 'records',
    delimiter,
    headerRow: true,
    ...(settled.leftOut.length > 0 ? { totalsLeftOut: settled.leftOut } : {}),
    rowsFrom: used.rowsName,
    columnsFrom: used.columnsName,
    countFrom: used.countName,
    ...(used.strataName === null ? {} : { strataFrom: used.strataName }),
    ...(used.clusterName === null ? {} : { clusterFrom: used.clusterName }),
  };
  const lines = { rowLabels: rows.labels, columnLabels: columns.labels };
  /** Strata and clusters that a table has records of. */
  function groupsOf({ layers, clusters }: KeyedCells, table: Table): Partial<ReadTable> {
    const labels = tally.strata.labels.filter((_, s) => layers?.[s]);
    const members = [...(clusters ?? [])].map(([label, { row, counts }]) => ({ label, row, counts }));
    return {
      ...(layers && { strata: strataOver(labels, layers.filter(Boolean), lines, table) }),
      ...(clusters && { clusters: clustersOver(members, lines, table) }),
    };
  }
  function* made(): Generator<Named & ({ read: ReadTable } | { problem: Problem })> {
    for (const [key, { family, cells, ...groups }] of tally.tables()) {
      const counts = keptRows.map((row) => keptColumns.map((column) => cells[row]?.[column] ?? 0));
      try {
        const table = placed(orderLevels({ ...settled.counts, counts }, options), undefined);
        const read = {
          table,
          ...groupsOf({ cells, family, ...groups }, table),
          source,
          sha256,
          missing: null,
          notes: [],
        };
        yield { key, family, read };
      } catch (thrown) {
        if (!(thrown instanceof Problem)) throw thrown;
        yield { key, problem: thrown };
      }
    }
  }
  const { rowLabels, columnLabels } = settled.counts;
  return {
    rowLabels,
    columnLabels,
    number: tally.number,
    tables: made(),
    notes: [...notes, ...settled.notes, ...leftOut(tally)],
  };
}

/** Records left out are never a silent matter. */
function leftOut(tally: KeyedTally): InputNote[] {
  const { missingRow, missingColumn, missingBoth, missingStratum, missingCluster, withoutKey, records, dropped } =
    tally;
  const lacking = missingRow + missingColumn + missingBoth + missingStratum + missingCluster + withoutKey;
  if (lacking === 0) return [];
  const treated = dropped + withoutKey > 0 ? 'were left out' : 'were counted under (missing)';
  return [{ code: 'missing-values', text: `${lacking} of ${records} records lack a value and ${treated}` }];
}
