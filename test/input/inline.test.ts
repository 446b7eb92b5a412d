import { describe, expect, it } from 'vitest';
import { looksLikeRow, readInline } from '../../src/input/inline.js';
import { problemOf } from './text-input.js';

describe('rows typed in', () => {
  it('become a table with labels of our own', () => {
    const { table, source, sha256, missing, notes } = readInline(['8,2', '1,9']);
    expect(table).toMatchObject({
      counts: [
        [8, 2],
        [1, 9],
      ],
      rowLabels: ['row 1', 'row 2'],
      columnLabels: ['column 1', 'column 2'],
      total: 20,
    });
    expect({ source, sha256, missing, notes }).toEqual({
      source: { form: 'inline' },
      sha256: null,
      missing: null,
      notes: [],
    });
  });

  it('carry their label before the last =, which may hold = and commas itself', () => {
    const { table } = readInline(['dose<=5=3,4', 'lost, moved=1,2', '5,6']);
    expect(table.rowLabels).toEqual(['dose<=5', 'lost, moved', 'row 3']);
  });

  it('take labels from options, each one CSV record', () => {
    const { table } = readInline(['8,2', '1,9'], {
      rowLabels: 'treated, control ',
      columnLabels: '"healed, late",open',
    });
    expect(table.rowLabels).toEqual(['treated', 'control']);
    expect(table.columnLabels).toEqual(['healed, late', 'open']);
  });

  it('follow the order that is listed, a level that does not occur being an empty line', () => {
    const { table } = readInline(['a=8,2', 'b=1,9'], { rowOrder: 'b,c,a', columnOrder: 'column 2,column 1' });
    expect(table.counts).toEqual([
      [9, 1],
      [0, 0],
      [2, 8],
    ]);
    expect(table.rowLabels).toEqual(['b', 'c', 'a']);
  });

  it('are refused with their label and position where a count is none', () => {
    expect(problemOf(() => readInline(['a=8,2', '1,,9']))).toMatchObject({
      code: 'empty-count',
      place: 'row 2, position 2',
    });
    expect(problemOf(() => readInline(['a=8,2', 'b=1,-9']))).toMatchObject({
      code: 'negative-count',
      place: 'row "b", position 2',
      exitStatus: 1,
    });
  });

  it('list five bad cells and say how many more there are', () => {
    const { message, code, place } = problemOf(() => readInline(['x,y,z', '1,-2,3.5', 'NA,1e3,4']));
    expect(code).toBe('bad-counts');
    expect(place).toBe('row 1, position 1');
    expect(message).toBe(
      '7 cells hold no count: "x" is not a whole number (row 1, position 1); "y" is not a whole number (row 1, position 2); ' +
        '"z" is not a whole number (row 1, position 3); "-2" is negative (row 2, position 2); ' +
        '"3.5" is not a whole number (row 2, position 3) and 2 more',
    );
  });

  it('say which row is longer or shorter than the first', () => {
    expect(problemOf(() => readInline(['8,2', 'b=1,9,3']))).toMatchObject({
      code: 'ragged-row',
      message: '3 counts where the first row has 2',
      place: 'row "b"',
    });
  });

  it.each([
    [['a=8,2', 'b=1,9'], { rowLabels: 'c,d' }, 'conflicting-labels', 2],
    [['8,2', '1,9'], { rowLabels: 'a,b,c' }, 'label-count', 2],
    [['8,2', '1,9'], { columnLabels: 'a,"b' }, 'label-list', 2],
    [['8,2', '1,9'], { columnLabels: 'a,,b' }, 'empty-label', 2],
    [['8,2', '1,9'], { columnLabels: 'a,a' }, 'duplicate-label', 2],
    [['a=8,2', 'a=1,9'], {}, 'duplicate-label', 1],
    [['=8,2', 'a=1,9'], {}, 'empty-label', 1],
    [['0,0', '0,0'], {}, 'no-counts', 1],
    [['9007199254740991,1', '0,0'], {}, 'count-overflow', 1],
    [[], {}, 'no-rows', 2],
  ])('%j with %j: %s, exit status %d', (operands, options, code, exitStatus) => {
    expect(problemOf(() => readInline(operands, options))).toMatchObject({ code, exitStatus });
  });
});

describe('an operand meant as a row is told from the path of a file', () => {
  it.each([
    '8,2',
    '8',
    'a=8,2',
    '12.5,3',
    '-1,2',
    '−1,2',
    '8,x',
    '8,,2',
    '8,',
    '1e3,2',
    'a=',
    'dose<=5=3,4',
    'a/b=8,2',
    'q=8,x,3',
    '8;2',
    '8 2',
    '12%,88%',
    ' 8 , 2 ',
  ])('%j is a row', (operand) => {
    expect(looksLikeRow(operand)).toBe(true);
  });

  it.each([
    'counts.csv',
    './8,2',
    '../3',
    '/data/8,2',
    '~/8',
    '-',
    '',
    '=',
    'a=x.csv',
    'year=2024/5.csv',
    '8,2.csv',
    '2024-05-01',
    'data,2024.csv',
    'x,y',
    '8,x.csv',
    'C:\\data\\8.csv',
  ])('%j is not', (operand) => {
    expect(looksLikeRow(operand)).toBe(false);
  });
});
