import { describe, expect, it } from 'vitest';
import { readCrossTable } from '../../src/input/cross-table.js';
import { readInline } from '../../src/input/inline.js';
import { isTotalLabel } from '../../src/input/total-lines.js';
import type { TotalsRule } from '../../src/input/total-lines.js';
import { bytesOf, problemOf } from './text-input.js';

const read = (text: string, totals?: TotalsRule) => readCrossTable(bytesOf(text), { sourceName: 'counts.csv', totals });

const labelled = 'g,a,b,Total\nx,1,2,3\ny,3,5,8\nTotal,4,7,11\n';
const bySums = '1,2,3\n3,5,8\n4,7,11\n';

describe('a line of totals is never counted in silence', () => {
  it.each([
    ['its label says so', labelled, 'counts.csv:4:1', 'row "Total" and column "Total" are totals by their labels'],
    ['one row only', 'g,a,b\nx,1,2\nTotal,1,2\n', 'counts.csv:3:1', 'row "Total" is a total by its label'],
    ['one column only', 'g,a,sum:\nx,1,2\ny,1,2\n', 'counts.csv:1:5', 'column "sum:" is a total by its label'],
    ['even where its cells hold no counts', 'g,a,b\nx,1,2\ny,3,4\nTotal,,n/a\n', 'counts.csv:4:1', 'row "Total"'],
    ['last row and last column hold the sums', bySums, 'counts.csv:3:1', 'hold the sums of the other rows and columns'],
    [
      'one side by label, the other by sums',
      'g,a,b,n\nx,1,2,3\ny,3,5,8\nTotal,4,7,11\n',
      'counts.csv:4:1',
      'row "Total" and column "n" are totals, by label or because they hold the sums of the others',
    ],
    [
      'its label speaks of a total and its cells hold the sums',
      'g,a,b\nx,1,2\ny,3,5\nAll wards,4,7\n',
      'counts.csv:4:1',
      'row "All wards" is a total by its label',
    ],
    [
      'a column likewise',
      'g,a,b,Total cases (n)\nx,1,2,3\ny,3,5,8\n',
      'counts.csv:1:7',
      'column "Total cases (n)" is a total by its label',
    ],
    [
      'both likewise',
      'g,a,b,All\nx,1,2,3\ny,3,5,8\nBoth sexes,4,7,11\n',
      'counts.csv:4:1',
      'row "Both sexes" and column "All" are totals by their labels',
    ],
  ])('%s', (_, text, place, message) => {
    const problem = problemOf(() => read(text));
    expect(problem).toMatchObject({
      code: 'total-line',
      place,
      message: expect.stringContaining(message),
      hint: 'add --drop-totals to leave totals out, or --keep-totals if these are counts like the others',
    });
  });

  it('one line beside a labelled total is too little to call another line its sums', () => {
    const { message } = problemOf(() => read('g,a,b,n\nx,1,2,3\nTotal,1,2,3\n'));
    expect(message).toBe('row "Total" is a total by its label');
  });

  it('a label that speaks of a total, over counts that are no sums, is a label', () => {
    expect(read('g,a,b\nsome teeth,1,2\nmost teeth,3,5\nall teeth,4,8\n').table.rowLabels).toHaveLength(3);
    expect(read('g,a,b\nx,1,2\nall teeth,1,2\n').table.rowLabels).toHaveLength(2);
    expect(read('g,a,b\nx,1,2\ny,3,5\noverallergic,4,7\n').table.rowLabels).toHaveLength(3);
  });

  it('sums that are all 0 are no sign of totals', () => {
    expect(problemOf(() => read('0,0,0\n0,0,0\n0,0,0\n'))).toMatchObject({ code: 'no-counts' });
  });

  it.each([
    ['the last row alone holds sums', '1,2\n3,5\n4,7\n'],
    ['the last column alone holds sums', '1,2,3\n3,5,8\n4,7,12\n'],
    ['a table below 3x3', '1,1\n1,1\n'],
    ['sums that are all 0 but one', '0,0,0\n0,1,0\n0,0,0\n'],
    ['a label that holds the word among others', 'g,total loss,partial loss\nx,1,2\ny,3,4\n'],
  ])('no total: %s', (_, text) => {
    expect(read(text).notes).toEqual([]);
  });
});

describe('--drop-totals', () => {
  it.each([
    ['by label', labelled, ['row', 'column']],
    ['by sums', bySums, ['row', 'column']],
    ['row alone', 'g,a,b\nx,1,2\ny,3,5\ntotal,4,7\n', ['row']],
    ['column alone', 'g,a,b,Summe\nx,1,2,3\ny,3,5,8\n', ['column']],
    ['two of them', 'g,a,b\nx,1,2\nSubtotal,1,2\ny,3,5\nSubtotal,3,5\nGrand total,4,7\n', ['row']],
  ])('leaves them out and says so: %s', (_, text, leftOut) => {
    const { table, source, notes } = read(text, 'drop');
    expect(table.counts).toEqual([
      [1, 2],
      [3, 5],
    ]);
    expect(source.totalsLeftOut).toEqual(leftOut);
    expect(notes.map((note) => note.code).filter((code) => code.startsWith('totals'))).toEqual(['totals-left-out']);
  });

  it('says where a total left out is not the sum', () => {
    const { notes } = read('g,a,b,Total\nx,1,2,3\ny,3,5,9\nTotal,4,8,11\n', 'drop');
    expect(notes).toContainEqual({
      code: 'totals-disagree',
      text:
        'a total left out is not the sum of the counts: row "Total", column "b" says 8 where the counts add up to 7; ' +
        'row "y", column "Total" says 9 where the counts add up to 8',
    });
  });

  it('checks the corner, and lets a total be empty', () => {
    expect(read('g,a,b,Total\nx,1,2,3\ny,3,5,8\nTotal,4,7,12\n', 'drop').notes).toMatchObject([
      { code: 'totals-left-out' },
      { code: 'totals-disagree', text: expect.stringContaining('row "Total", column "Total" says 12') },
    ]);
    expect(read('g,a,b,Total\nx,1,2,3\ny,3,5,8\nTotal,4,,\n', 'drop').notes).toHaveLength(1);
  });

  it('says when there was none, and when nothing else is left', () => {
    expect(read('8,2\n1,9\n', 'drop').notes).toMatchObject([{ code: 'no-totals-found' }]);
    expect(problemOf(() => read('g,a,b\nTotal,1,2\n', 'drop'))).toMatchObject({ code: 'only-totals' });
  });
});

it('--keep-totals counts them as data and says so', () => {
  const { table, source, notes } = read(labelled, 'keep');
  expect(table.total).toBe(44);
  expect(source.totalsLeftOut).toBeUndefined();
  expect(notes).toMatchObject([{ code: 'totals-kept' }]);
});

it('rows typed in are checked in the same way', () => {
  const rows = ['x=1,2,3', 'y=3,5,8', 'Total=4,7,11'];
  expect(problemOf(() => readInline(rows))).toMatchObject({ code: 'total-line', place: 'row "Total"' });
  expect(problemOf(() => readInline(['1,2,3', '3,5,8', '4,7,11']))).toMatchObject({
    code: 'total-line',
    place: 'row 3',
  });
  expect(problemOf(() => readInline(['1,2', '3,5'], { columnLabels: 'a,total' }))).toMatchObject({
    code: 'total-line',
    place: 'column 2',
  });
  const { table, source } = readInline(rows, { totals: 'drop' });
  expect(table.counts).toEqual([
    [1, 2],
    [3, 5],
  ]);
  expect(source).toEqual({ form: 'inline', totalsLeftOut: ['row', 'column'] });
});

describe('labels that say total', () => {
  it.each([
    'Total',
    'TOTALS',
    ' total: ',
    'Grand Total',
    'Subtotal',
    'sub-total',
    'Sum',
    'Row total',
    'Column Totals',
    'Total (n)',
    'Gesamt',
    'Gesamtsumme',
    'Summe',
    'Insgesamt',
    'Totale',
    'Somme',
    'Σ',
  ])('%j', (label) => {
    expect(isTotalLabel(label)).toBe(true);
  });
  it.each(['total loss', 'Summer', 'none', 'all', 'n', 'sums up', 'totally'])('not %j', (label) => {
    expect(isTotalLabel(label)).toBe(false);
  });
});
