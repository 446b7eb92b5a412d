// The demo data are read as the README's examples read them, and say of themselves that they are invented.
import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readCrossTable, readRecords } from '../../src/input/index.js';
import { piecesOf } from './text-input.js';

const folder = new URL('../../fixtures/demo/', import.meta.url);
const bytesIn = (file: string): Uint8Array => readFileSync(new URL(file, folder));

describe('demo data', () => {
  // Lines of JSON have no comments, and a picture is of data beside it; fixtures/README.md says it of them.
  it.each(readdirSync(folder).filter((file) => !/\.(ndjson|svg)$/.test(file)))(
    '%s begins by saying that it is invented',
    (file) => {
      expect(new TextDecoder().decode(bytesIn(file))).toMatch(/^# Invented data: /);
    },
  );

  it.each([
    ['lung-lesions.csv', 4, 4, 100, 'comma'],
    ['cracked-tiles.csv', 2, 5, 36434, 'semicolon'],
    ['orchid-forms.tsv', 4, 5, 19, 'tab'],
  ])('%s is a cross-table of %d by %d with a total of %d', (file, rows, columns, total, delimiter) => {
    const { table, source, notes } = readCrossTable(bytesIn(file), { sourceName: file });
    expect([table.counts.length, table.columnLabels.length, table.total]).toEqual([rows, columns, total]);
    expect(source).toMatchObject({ delimiter, headerRow: true, labelColumn: true });
    expect(notes).toEqual([]);
  });

  it('the survey export has totals that agree and are left out on request', () => {
    const file = 'night-bus-survey.csv';
    const { table, source, notes } = readCrossTable(bytesIn(file), { sourceName: file, totals: 'drop' });
    expect(table).toMatchObject({ total: 253, columnLabels: ['every week', 'now and then', 'never'] });
    expect(source.totalsLeftOut).toEqual(['row', 'column']);
    expect(notes.map(({ code }) => code)).toEqual(['empty-columns-left-out', 'totals-left-out']);
  });

  it('the line list has missing values on either side', async () => {
    const options = { rows: 'custard', columns: 'outcome', missing: 'drop', sourceName: 'ward-line-list.csv' } as const;
    const { table, missing } = await readRecords(piecesOf(bytesIn('ward-line-list.csv')), options);
    expect(table.counts).toEqual([
      [139, 11],
      [136, 30],
    ]);
    expect(missing).toMatchObject({ records: 342, missingRow: 15, missingColumn: 11, dropped: 26 });
  });

  it('the seed lots are records with counts', async () => {
    const options = { rows: 'coating', columns: 'result', count: 'trays', sourceName: 'seed-lots.txt' };
    const { table } = await readRecords(piecesOf(bytesIn('seed-lots.txt')), options);
    expect(table.rowTotals).toEqual([20, 20, 20, 20]);
  });
});
