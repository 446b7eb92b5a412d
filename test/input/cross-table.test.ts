import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { CrossTableOptions } from '../../src/input/cross-table.js';
import { readCrossTable } from '../../src/input/cross-table.js';
import { bytesOf, problemOf } from './text-input.js';

const read = (text: string, options: Partial<CrossTableOptions> = {}) =>
  readCrossTable(bytesOf(text), { sourceName: 'counts.csv', ...options });
const refused = (text: string, options: Partial<CrossTableOptions> = {}) => problemOf(() => read(text, options));

const counts = [
  [8, 2],
  [1, 9],
];
const labels = { rowLabels: ['treated', 'control'], columnLabels: ['healed', 'open'] };

describe('the same table is read from every dress of a file', () => {
  it.each([
    ['commas', 'group,healed,open\ntreated,8,2\ncontrol,1,9\n', 'comma'],
    ['tabs', 'group\thealed\topen\ntreated\t8\t2\ncontrol\t1\t9\n', 'tab'],
    ['semicolons', 'group;healed;open\ntreated;8;2\ncontrol;1;9\n', 'semicolon'],
    ['pipes', 'group|healed|open\ntreated|8|2\ncontrol|1|9\n', 'pipe'],
    ['a byte order mark', '\ufeffgroup,healed,open\ntreated,8,2\ncontrol,1,9\n', 'comma'],
    ['CRLF', 'group,healed,open\r\ntreated,8,2\r\ncontrol,1,9\r\n', 'comma'],
    ['CR alone', 'group,healed,open\rtreated,8,2\rcontrol,1,9\r', 'comma'],
    ['mixed line ends', 'group,healed,open\r\ntreated,8,2\ncontrol,1,9\r', 'comma'],
    ['no last line break', 'group,healed,open\ntreated,8,2\ncontrol,1,9', 'comma'],
    ['quotes', '"group","healed","open"\n"treated","8","2"\n"control","1","9"\n', 'comma'],
    ['blanks', ' group , healed,"open" \n treated, 8,\t2\n control , "1" , 9\n', 'comma'],
    ['an empty corner', ',healed,open\ntreated,8,2\ncontrol,1,9\n', 'comma'],
    ['decimals of 0', 'group,healed,open\ntreated,8.0,2.0\ncontrol,1.0,9.00\n', 'comma'],
    ['comments above', '# made up\n# "quoted\n\ngroup,healed,open\ntreated,8,2\ncontrol,1,9\n', 'comma'],
    [
      'empty lines and a last column of nothing',
      'group;healed;open;\ntreated;8;2;\n;;;\n\ncontrol;1;9;\n;;;',
      'semicolon',
    ],
    ['trailing separators below only', 'group;healed;open\ntreated;8;2;\ncontrol;1;9;;\n', 'semicolon'],
  ])('%s', (_, text, delimiter) => {
    const { table, source, sha256 } = read(text);
    expect(table).toMatchObject({ counts, ...labels });
    expect(source).toEqual({ form: 'cross-table', delimiter, headerRow: true, labelColumn: true });
    expect(sha256).toBe(createHash('sha256').update(bytesOf(text)).digest('hex'));
  });

  it('a label may hold separators, quotes and line breaks, and begin with #', () => {
    const { table } = read('"a,""b""",x,y\n"#1",1,2\n"two\nlines",3,4\n');
    expect(table.rowLabels).toEqual(['#1', 'two\nlines']);
    expect(table.columnLabels).toEqual(['x', 'y']);
  });

  it('the separator can be told', () => {
    const text = 'g,h|a|\nx,y|8|\nz,w|9|\n';
    expect(read(text, { delimiter: 'pipe' })).toMatchObject({
      source: { delimiter: 'pipe' },
      table: { rowLabels: ['x,y', 'z,w'], columnLabels: ['a'] },
    });
    expect(refused(text, { delimiter: 'semicolon' }).code).toBe('one-column');
  });
});

describe('header row and label column are found by rule, and can be told', () => {
  it.each([
    ['8,2\n1,9\n', false, false],
    ['healed,open\n8,2\n1,9\n', true, false],
    ['treated,8,2\ncontrol,1,9\n', false, true],
    [',2019,2020\ntreated,8,2\ncontrol,1,9\n', true, true],
    [',healed,open\n0,8,2\n10,1,9\n', true, true],
    ['g,healed,open\n0-9,8,2\n10-19,1,9\n', true, true],
  ])('%j: header %s, labels %s', (text, headerRow, labelColumn) => {
    const { table, source } = read(text);
    expect(source).toMatchObject({ headerRow, labelColumn });
    expect(table.counts).toEqual(counts);
  });

  it('numbers that might be labels are counted, and a note says so', () => {
    expect(read('site,2019,2020\nnorth,3,4\nsouth,5,6').notes).toMatchObject([{ code: 'no-header-row' }]);
    expect(read('dose,healed,open\n0,8,2\n10,1,9').notes).toMatchObject([{ code: 'no-label-column' }]);
  });

  it('a told layout is obeyed without a note', () => {
    const years = read('site,2019,2020\nnorth,3,4\nsouth,5,6', { headerRow: 'yes' });
    expect(years.table.columnLabels).toEqual(['2019', '2020']);
    const doses = read('dose,healed,open\n0,8,2\n10,1,9', { labelColumn: 'yes' });
    expect(doses.table.rowLabels).toEqual(['0', '10']);
    const told = read('g,healed,open\ntreated,8,2', { headerRow: 'yes', labelColumn: 'yes' });
    expect([...years.notes, ...doses.notes, ...told.notes]).toEqual([]);
  });

  it('numbers and text mixed where names might stand are asked back, never guessed', () => {
    expect(refused('g,0,1,2+\nx,1,2,3\ny,3,4,5')).toMatchObject({ code: 'unclear-header', place: 'counts.csv:1:7' });
    expect(refused('8,x\n1,9')).toMatchObject({ code: 'unclear-header', place: 'counts.csv:1:3' });
    expect(refused('x,2\n1,9')).toMatchObject({ code: 'unclear-labels', place: 'counts.csv:1:1' });
    expect(refused('g,a,b\n0,1,2\n1,3,4\n2+,5,6')).toMatchObject({ code: 'unclear-labels', place: 'counts.csv:4:1' });
    expect(read('g,0,1,2+\nx,1,2,3\ny,3,4,5', { headerRow: 'yes' }).table.columnLabels).toEqual(['0', '1', '2+']);
  });

  it('labels given by option are for files without labels of their own', () => {
    expect(read('8,2\n1,9', { rowLabels: 'treated,control', columnLabels: 'healed,open' }).table).toMatchObject(labels);
    expect(refused('g,a,b\nx,1,2\ny,3,4', { rowLabels: 'p,q' })).toMatchObject({
      code: 'conflicting-labels',
      exitStatus: 2,
    });
  });

  it('the listed order holds for files too', () => {
    const { table } = read('g,a,b\nx,8,2\ny,1,9', { rowOrder: 'y,x', columnOrder: 'b,a,c' });
    expect(table.counts).toEqual([
      [9, 1, 0],
      [2, 8, 0],
    ]);
  });
});

describe('a cell that holds no count is refused at its line and column', () => {
  it.each([
    ['g,a,b\nx,1,2\ny,z,4', 'not-a-count', '3:3'],
    ['g,a,b\nx,1,2\ny,3,-4', 'negative-count', '3:5'],
    ['g,a,b\nx,1,12.5\ny,3,4', 'fractional-count', '2:5'],
    ['g,a,b\nx,1,1e3\ny,3,4', 'exponent-count', '2:5'],
    ['g,a,b\n"long, label",1,"1,234"\ny,3,4', 'grouped-count', '2:17'],
    ['g,a,b\nx,NA,2\ny,3,4', 'missing-count', '2:3'],
    ['g,a,b\nx,,2\ny,3,4', 'empty-count', '2:3'],
    ['g,a,b\nx,1,\ny,3,4', 'empty-count', '2:5'],
    ['g,a,b\n"two\nlines",1,2\ny,3,  x', 'not-a-count', '4:7'],
    ['g,a,b\r\n# note\r\n\r\n"é😀",1,x\r\ny,3,4', 'not-a-count', '4:8'],
    ['\ufeffg;a;b\nx;1;x\ny;3;4', 'not-a-count', '2:5'],
  ])('%j: %s at %s', (text, code, place) => {
    expect(refused(text)).toMatchObject({ code, place: `counts.csv:${place}`, exitStatus: 1 });
  });

  it('standard input has places too', () => {
    expect(refused('g,a,b\nx,1,x\ny,3,4', { sourceName: 'standard input' }).place).toBe('standard input:2:5');
  });

  it('control characters in a value are shown escaped', () => {
    expect(refused('g,a,b\nx,1,2\ny,"\u001b[31m8\u202e",4').message).toBe(
      '"\\u{1b}[31m8\\u{202e}" is not a whole number',
    );
  });
});

describe('what is no table says what it is instead', () => {
  it.each([
    ['', 'empty-input', 'counts.csv'],
    [' \n\r\n', 'no-data', 'counts.csv'],
    ['# only\n# comments\n', 'no-data', 'counts.csv'],
    [';;\n;;\n', 'no-data', 'counts.csv'],
    ['g,a,b\n', 'only-header', 'counts.csv'],
    ['8\n2\n', 'one-column', 'counts.csv'],
    ['g\nx\ny\n', 'one-column', 'counts.csv'],
    ['g,a,b\nx,1\ny,3,4', 'ragged-row', 'counts.csv:2:4'],
    ['g,a,b\nx,1,2,3\ny,3,4', 'ragged-row', 'counts.csv:2:7'],
    ['g,a,b\nx,1,2\ny,"3,4', 'open-quote', 'counts.csv:3:3'],
    ['g,a,b\nx,1,2\ny,3",4', 'stray-quote', 'counts.csv:3:3'],
    ['g,a,b\nx,1,2\ny,"3"4,4', 'stray-quote', 'counts.csv:3:3'],
    ['g,a,a\nx,1,2\ny,3,4', 'duplicate-label', 'counts.csv:1:5'],
    ['g,a,b\nx,1,2\n"x ",3,4', 'duplicate-label', 'counts.csv:3:1'],
    ['g,a,\nx,1,2\ny,3,4', 'empty-label', 'counts.csv:1:5'],
    ['g,a,b\nx,1,2\n,3,4', 'empty-label', 'counts.csv:3:1'],
    ['ward,outcome\nA,healed\nB,open\n', 'raw-records', 'counts.csv:2:3'],
    ['g,a,b\nx,0,0\ny,0,0', 'no-counts', 'counts.csv'],
    ['g,a,b\nx,9007199254740991,0\ny,0,1', 'count-overflow', 'counts.csv'],
    ['g,a\0,b\nx,1,2', 'binary-input', 'counts.csv'],
  ])('%j: %s', (text, code, place) => {
    expect(refused(text)).toMatchObject({ code, place });
  });

  it.each([
    ['UTF-16', [0xff, 0xfe, 0x61, 0x00], 'utf-16-text'],
    ['UTF-16, big end first', [0xfe, 0xff, 0x00, 0x61], 'utf-16-text'],
    ['a workbook', [0x50, 0x4b, 0x03, 0x04, 0x14, 0x00], 'workbook-file'],
    ['Latin-1', [0x67, 0x2c, 0x61, 0x0a, 0x78, 0xfc, 0x2c, 0x31], 'not-utf-8'],
  ])('%s', (_, bytes, code) => {
    const problem = problemOf(() => readCrossTable(Uint8Array.from(bytes), { sourceName: 'counts.csv' }));
    expect(problem).toMatchObject({ code, exitStatus: 1 });
    expect(problem.place).toBe(code === 'not-utf-8' ? 'counts.csv:2' : 'counts.csv');
  });

  it('a header one name short of the rows gets the advice for it', () => {
    expect(refused('a,b\nx,1,2\ny,3,4').hint).toBe(
      'if the rows begin with a label, put an empty cell first in the header',
    );
  });

  it('a file of very many records is refused like a short one', () => {
    const { code, place } = refused(`ward,outcome\n${'A,healed\n'.repeat(300_000)}`);
    expect({ code, place }).toEqual({ code: 'raw-records', place: 'counts.csv:2:3' });
  });

  it('raw records get the options to type', () => {
    expect(refused('ward,outcome\nA,healed\nB,open\n').hint).toContain('--rows ward --columns outcome');
  });
});

it('a label that begins with # and is lost as a comment leaves a note', () => {
  const { table, notes } = read('# above\ng,a,b\n#1,8,2\nx,1,9\ny,2,3\n');
  expect(table.rowLabels).toEqual(['x', 'y']);
  expect(notes).toMatchObject([{ code: 'comment-lines' }]);
});
