// A square table of pairs: the same levels in the rows (first answer, first rater) and in the columns (second). Empty levels are
// kept. The shape is checked and labels are matched; nothing is ever cut to fit.
import type { InputNote, ReadTable } from '../input/read-table.js';
import { dataProblem, type Problem } from '../problem/problem.js';
import { defaultLabels, makeTable, type Table } from '../table/table.js';

/** The pairs that changed between two levels, either way. */
export interface DiscordantPair {
  readonly first: number;
  readonly second: number;
  /** Pairs that went from `first` (row) to `second` (column), and those that went the other way. */
  readonly there: number;
  readonly back: number;
}

/** Every two levels between which some pair changed, in the order of the table. */
export function discordantPairs({ counts }: Table): DiscordantPair[] {
  const found: DiscordantPair[] = [];
  for (let first = 0; first < counts.length; first++) {
    for (let second = first + 1; second < counts.length; second++) {
      const there = counts[first]![second]!;
      const back = counts[second]![first]!;
      if (there + back > 0) found.push({ first, second, there, back });
    }
  }
  return found;
}

/**
 * The table with the same labels in rows and columns, in the order of the rows. Labels given on one side only count for both. Raw
 * records: a level that only one of the two columns has is an empty line of the other side.
 * @throws Problem (data): `not-square`, `levels-differ`, `one-level-only`.
 */
export function squareTable(read: ReadTable): ReadTable {
  const { table, source } = read;
  const rows = table.rowLabels.length;
  const columns = table.columnLabels.length;
  const rowsAreOurs = isOurs(table.rowLabels, 'row');
  const columnsAreOurs = isOurs(table.columnLabels, 'column');
  const fromRecords = source.form === 'records';
  if (rows !== columns && (!fromRecords || rowsAreOurs || columnsAreOurs)) throw notSquare(rows, columns);
  if (rowsAreOurs || columnsAreOurs) return withTable(read, sharingLabels(table, rowsAreOurs, columnsAreOurs), []);
  const missingColumns = table.rowLabels.filter((label) => !table.columnLabels.includes(label));
  const missingRows = table.columnLabels.filter((label) => !table.rowLabels.includes(label));
  if (missingColumns.length + missingRows.length > 0 && !fromRecords) throw levelsDiffer(missingColumns, missingRows);
  return withTable(read, arranged(table, missingRows), notesOn(table, missingColumns, missingRows));
}

const isOurs = (labels: readonly string[], side: 'row' | 'column'): boolean =>
  defaultLabels(side, labels.length).every((label, k) => label === labels[k]);

function withTable(read: ReadTable, table: Table, notes: readonly InputNote[]): ReadTable {
  if (table.rowLabels.length < 2) {
    throw dataProblem({
      code: 'one-level-only',
      message: 'there is one level only, so no pair can differ',
      hint: 'a paired table needs two levels or more, the same in rows and columns',
    });
  }
  return { ...read, table, notes: [...read.notes, ...notes] };
}

function sharingLabels(table: Table, rowsAreOurs: boolean, columnsAreOurs: boolean): Table {
  const { counts } = table;
  const labels = !rowsAreOurs
    ? table.rowLabels
    : !columnsAreOurs
      ? table.columnLabels
      : counts.map((_, k) => `level ${k + 1}`);
  return makeTable({ counts, rowLabels: labels, columnLabels: labels });
}

/** Rows as they stand, levels that only the columns have after them; columns in the same order. */
function arranged(table: Table, missingRows: readonly string[]): Table {
  const labels = [...table.rowLabels, ...missingRows];
  const counts = labels.map((row) => {
    const i = table.rowLabels.indexOf(row);
    return labels.map((column) => {
      const j = table.columnLabels.indexOf(column);
      return i < 0 || j < 0 ? 0 : table.counts[i]![j]!;
    });
  });
  return makeTable({ counts, rowLabels: labels, columnLabels: labels });
}

function notesOn(table: Table, missingColumns: readonly string[], missingRows: readonly string[]): InputNote[] {
  const shared = table.columnLabels.filter((label) => table.rowLabels.includes(label));
  const inRowOrder = table.rowLabels.filter((label) => table.columnLabels.includes(label));
  const reordered = shared.some((label, k) => label !== inRowOrder[k]);
  const added = [...missingColumns, ...missingRows];
  return [
    ...(reordered
      ? [{ code: 'levels-reordered', text: 'the columns were put into the order of the rows, label by label' }]
      : []),
    ...(added.length > 0
      ? [
          {
            code: 'levels-added',
            text: `levels that only one of the two columns holds were added to the other, empty: ${quotedList(added)}`,
          },
        ]
      : []),
  ];
}

const quotedList = (labels: readonly string[]): string => labels.map((label) => `"${label}"`).join(', ');

const notSquare = (rows: number, columns: number): Problem =>
  dataProblem({
    code: 'not-square',
    message: `pairs need the same levels in rows and columns; this table is ${rows} x ${columns}`,
    hint: 'write a row and a column for every level, with 0 where nobody fell into it; or leave --paired out',
  });

const levelsDiffer = (missingColumns: readonly string[], missingRows: readonly string[]): Problem =>
  dataProblem({
    code: 'levels-differ',
    message: `the levels of rows and columns differ: ${[
      ...(missingColumns.length > 0 ? [`no column is labelled ${quotedList(missingColumns)}`] : []),
      ...(missingRows.length > 0 ? [`no row is labelled ${quotedList(missingRows)}`] : []),
    ].join('; ')}`,
    hint: 'give rows and columns the same labels, in any order, with 0 where nobody fell into a level',
  });
