// Each form of input gives the same table: a table written out in any of them is read back as itself.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readCrossTable } from '../../src/input/cross-table.js';
import { isMissingText, isNumberLike } from '../../src/input/count-text.js';
import { delimiterText } from '../../src/input/delimiter.js';
import { looksLikeRow, readInline } from '../../src/input/inline.js';
import type { Delimiter } from '../../src/input/read-table.js';
import { readRecords } from '../../src/input/records.js';
import type { Table } from '../../src/table/table.js';
import { makeTable } from '../../src/table/table.js';
import { bytesOf, piecesOf, quoted } from './text-input.js';

/** Any text that is a label: blanks around it would be trimmed, missing words are no level, numbers make no label column. */
const label = fc
  .string({ unit: 'grapheme', minLength: 1, maxLength: 8 })
  .map((text) => text.trim())
  .filter((text) => !isMissingText(text) && !isNumberLike(text) && !text.includes('\0') && !text.includes('\ufffd'));
const side = fc.uniqueArray(label, { minLength: 2, maxLength: 5 });

const anyTable = fc
  .tuple(side, side)
  .chain(([rowLabels, columnLabels]) =>
    fc
      .array(fc.array(fc.nat(1000), { minLength: columnLabels.length, maxLength: columnLabels.length }), {
        minLength: rowLabels.length,
        maxLength: rowLabels.length,
      })
      .map((counts) => ({ counts, rowLabels, columnLabels })),
  )
  .filter(({ counts }) => counts.flat().some((count) => count > 0))
  .map(makeTable);

const delimiter = fc.constantFrom<Delimiter>('comma', 'semicolon', 'tab', 'pipe');
const lineEnd = fc.constantFrom('\n', '\r\n', '\r');
const list = (labels: readonly string[]): string => labels.map(quoted).join(',');

/** Totals by chance or by label would be refused, rightly; the laws are about everything else. */
const totals = 'keep';
const sourceName = 'counts.csv';

const typed = (table: Table) =>
  readInline(
    table.counts.map((row, i) => `${table.rowLabels[i]!}=${row.join(',')}`),
    { columnLabels: list(table.columnLabels), totals },
  ).table;

const typedWithOptions = (table: Table) =>
  readInline(
    table.counts.map((row) => row.join(',')),
    { rowLabels: list(table.rowLabels), columnLabels: list(table.columnLabels), totals },
  ).table;

const crossText = (table: Table, separator: string, end: string): string =>
  [['', ...table.columnLabels], ...table.counts.map((row, i) => [table.rowLabels[i]!, ...row.map(String)])]
    .map((line) => line.map((text) => (/^\d+$/.test(text) ? text : quoted(text))).join(separator) + end)
    .join('');

const orders = (table: Table) => ({ rowOrder: list(table.rowLabels), columnOrder: list(table.columnLabels) });

function recordsText(table: Table, separator: string, end: string): string {
  const lines = table.counts.flatMap((row, i) =>
    row.map((count, j) => [quoted(table.rowLabels[i]!), quoted(table.columnLabels[j]!), String(count)]),
  );
  return [['rows', 'columns', 'n'], ...lines].map((line) => line.join(separator) + end).join('');
}

describe('a table written out is read back as itself', () => {
  it('typed in as rows, labels before = or in options', () => {
    fc.assert(
      fc.property(anyTable, (table) => {
        expect(typed(table)).toEqual(table);
        expect(typedWithOptions(table)).toEqual(table);
      }),
    );
  });

  it('every row of it is recognised as a row', () => {
    fc.assert(
      fc.property(anyTable, (table) => {
        for (const row of table.counts) {
          expect(looksLikeRow(row.join(','))).toBe(true);
          expect(looksLikeRow(`label=${row.join(',')}`)).toBe(true);
        }
      }),
    );
  });

  it('as a cross-table, whatever its labels, separator and line ends, the separator told or detected', () => {
    fc.assert(
      fc.property(anyTable, delimiter, lineEnd, fc.boolean(), (table, name, end, told) => {
        const bytes = bytesOf(crossText(table, delimiterText[name], end));
        const read = readCrossTable(bytes, { sourceName, totals, ...(told ? { delimiter: name } : {}) });
        expect(read.table).toEqual(table);
        expect(read.source).toMatchObject({ delimiter: name, headerRow: true, labelColumn: true });
      }),
      { numRuns: 300 },
    );
  });

  it('as records with counts, and as one record for each one counted', async () => {
    await fc.assert(
      fc.asyncProperty(anyTable, delimiter, lineEnd, fc.integer({ min: 1, max: 40 }), async (table, name, end, cut) => {
        const text = recordsText(table, delimiterText[name], end);
        const columns = { rows: 'rows', columns: 'columns', sourceName };
        const counted = await readRecords(piecesOf(text, cut), { ...columns, count: 'n', totals });
        expect(counted.table).toEqual(table);

        const small = makeTable({
          ...table,
          counts: table.counts.map((row) => row.map((count) => (count > 0 ? 1 + (count % 3) : 0))),
        });
        const single = small.counts.flatMap((row, i) =>
          row.flatMap((count, j) =>
            Array.from(
              { length: count },
              () => `${quoted(small.rowLabels[i]!)}${delimiterText[name]}${quoted(small.columnLabels[j]!)}${end}`,
            ),
          ),
        );
        const raw = await readRecords(piecesOf(`rows${delimiterText[name]}columns${end}${single.join('')}`, cut), {
          ...columns,
          ...orders(small),
        });
        expect(raw.table).toEqual(small);
      }),
    );
  });
});
