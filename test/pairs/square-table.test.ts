// The shape of pairs: matched by label, never cut to fit.
import { describe, expect, it } from 'vitest';
import { readInline } from '../../src/input/inline.js';
import { readCrossTable } from '../../src/input/cross-table.js';
import type { ReadTable } from '../../src/input/read-table.js';
import { squareTable } from '../../src/pairs/square-table.js';
import { makeTable } from '../../src/table/table.js';
import { problemOf } from '../cli/problem-of.js';

const file = (text: string): ReadTable => readCrossTable(new TextEncoder().encode(text), { sourceName: 'pairs.csv' });

describe('the square table', () => {
  it('puts columns into the order of the rows, with a note', () => {
    const { table, notes } = squareTable(file(',no,yes\nyes,3,5\nno,7,2\n'));
    expect(table.counts).toEqual([
      [5, 3],
      [2, 7],
    ]);
    expect(table.columnLabels).toEqual(['yes', 'no']);
    expect(notes.map(({ code }) => code)).toContain('levels-reordered');
  });

  it('takes labels given on one side for both, and numbers levels without any', () => {
    expect(squareTable(readInline(['yes=5,3', 'no=2,7'])).table.columnLabels).toEqual(['yes', 'no']);
    expect(squareTable(readInline(['5,3', '2,7'])).table.rowLabels).toEqual(['level 1', 'level 2']);
  });

  it('refuses other shapes and other labels', async () => {
    expect(await problemOf(() => squareTable(readInline(['5,3,1', '2,7,4'])))).toMatchObject({ code: 'not-square' });
    const differ = await problemOf(() => squareTable(file(',yes,maybe\nyes,3,5\nno,7,2\n')));
    expect(differ).toMatchObject({ code: 'levels-differ' });
    expect(differ.message).toContain('"no"');
  });

  it('keeps empty levels, and adds those that one column of raw records lacks', () => {
    const table = makeTable({
      counts: [
        [4, 1, 0],
        [2, 3, 5],
      ],
      rowLabels: ['a', 'b'],
      columnLabels: ['a', 'b', 'c'],
    });
    const read: ReadTable = { table, source: { form: 'records' }, sha256: null, missing: null, notes: [] };
    const { table: square, notes } = squareTable(read);
    expect(square.counts).toEqual([
      [4, 1, 0],
      [2, 3, 5],
      [0, 0, 0],
    ]);
    expect(notes.map(({ code }) => code)).toEqual(['levels-added']);
  });
});
