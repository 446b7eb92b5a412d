import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { mostLevels } from '../../src/input/levels.js';
import { RecordTally } from '../../src/input/record-tally.js';
import type { RecordOptions } from '../../src/input/records.js';
import { readRecords } from '../../src/input/records.js';
import { bytesOf, piecesOf, problemOfAsync } from './text-input.js';

type Options = Partial<RecordOptions>;
const defaults = { rows: 'ward', columns: 'outcome', sourceName: 'visits.csv' };
const read = (text: string, options: Options = {}) =>
  readRecords(piecesOf(text), { ...defaults, reread: () => piecesOf(text, 7), ...options });
const refused = (text: string, options: Options = {}) => problemOfAsync(() => read(text, options));

const visits = 'case,ward,outcome\n1,north,healed\n2,south,open\n3,north,open\n4,north,healed\n';

describe('raw records', () => {
  it('are counted by two of their columns, levels in order of appearance', async () => {
    const { table, source, sha256, missing, notes } = await read(visits);
    expect(table).toMatchObject({
      counts: [
        [2, 1],
        [0, 1],
      ],
      rowLabels: ['north', 'south'],
      columnLabels: ['healed', 'open'],
    });
    expect(source).toEqual({
      form: 'records',
      delimiter: 'comma',
      headerRow: true,
      rowsFrom: 'ward',
      columnsFrom: 'outcome',
      countFrom: null,
    });
    expect(sha256).toBe(createHash('sha256').update(bytesOf(visits)).digest('hex'));
    expect(missing).toEqual({ rule: 'fail', records: 4, missingRow: 0, missingColumn: 0, missingBoth: 0, dropped: 0 });
    expect(notes).toEqual([]);
  });

  it.each([1, 2, 3, 5, 1000])('do not depend on how their bytes are cut: pieces of %d', async (size) => {
    const text = '\ufeff# é\r\nward;outcome;n\r\n"nörd;1";healed;2\r\n"a ""b""";open;3\r\nc;"two\r\nlines";4';
    const { table, sha256, source } = await readRecords(piecesOf(text, size), { ...defaults, count: 'n' });
    expect(table).toMatchObject({
      counts: [
        [2, 0, 0],
        [0, 3, 0],
        [0, 0, 4],
      ],
      rowLabels: ['nörd;1', 'a "b"', 'c'],
      columnLabels: ['healed', 'open', 'two\r\nlines'],
    });
    expect(source).toMatchObject({ delimiter: 'semicolon', countFrom: 'n' });
    expect(sha256).toBe(createHash('sha256').update(bytesOf(text)).digest('hex'));
  });

  it.each([977, 64_000, 65_536, 1_000_000])('far beyond the first 64 KB are the same: pieces of %d', async (size) => {
    const lines = Array.from(
      { length: 30_000 },
      (_, i) => `${i},"Ö${i % 3}",${i % 2 === 0 ? 'healed' : '"op""en"'}\r\n`,
    );
    const text = `case,ward,outcome\r\n${lines.join('')}`;
    const { table, sha256 } = await readRecords(piecesOf(text, size), defaults);
    expect(table).toMatchObject({
      counts: Array.from({ length: 3 }, () => [5000, 5000]),
      rowLabels: ['Ö0', 'Ö1', 'Ö2'],
      columnLabels: ['healed', 'op"en'],
    });
    expect(sha256).toBe(createHash('sha256').update(bytesOf(text)).digest('hex'));
    const reread = (): AsyncIterable<Uint8Array> => piecesOf(`${text}x,y\r\n`, size);
    expect(await problemOfAsync(() => readRecords(reread(), { ...defaults, reread }))).toMatchObject({
      code: 'ragged-row',
      place: 'visits.csv:30002:4',
    });
    expect(await problemOfAsync(() => readRecords(piecesOf(`${text}\0`, size), defaults))).toMatchObject({
      code: 'binary-input',
      message: `this is not text: byte ${bytesOf(text).length + 1} is NUL`,
    });
  });

  it('with counts add them up, and a record may count 0', async () => {
    const { table } = await read('ward,outcome,n\nA,x,3\nB,y,0\nA,x,4.0\nB,x,1', { count: 'n' });
    expect(table.counts).toEqual([
      [7, 0],
      [1, 0],
    ]);
  });

  it('that spell a level with blanks around it mean the same level', async () => {
    const { table } = await read('ward,outcome\n"A ",x\n A ,"x "\n"\tA",x');
    expect(table).toMatchObject({ counts: [[3]], rowLabels: ['A'] });
  });

  it('follow the listed order, a level that does not occur being an empty line', async () => {
    const { table } = await read(visits, { rowOrder: 'south,west,north', columnOrder: 'open,healed' });
    expect(table.counts).toEqual([
      [1, 0],
      [0, 0],
      [1, 2],
    ]);
    expect(await refused(visits, { rowOrder: 'south,nort' })).toMatchObject({
      code: 'unlisted-level',
      message: '"north" occurs in the data and is not listed',
      place: '--row-order',
      hint: 'did you mean "north" where "nort" stands? list every level that occurs: north, south',
      exitStatus: 2,
    });
  });

  it('may have comments, blank lines and lines of separators only, which are said', async () => {
    const { table, missing, notes } = await read('# above\nward,outcome\nA,x\n\n# between\n,\nB,y\n  \n');
    expect(table.total).toBe(2);
    expect(missing?.records).toBe(2);
    expect(notes.map(({ code }) => code)).toEqual(['comment-lines', 'empty-lines-skipped']);
  });
});

describe('columns are named by header, exactly, or else by number', () => {
  it.each([
    ['ward', 'outcome', [[2, 1], [0, 1]]], // prettier-ignore
    ['2', '3', [[2, 1], [0, 1]]], // prettier-ignore
    ['outcome', 'ward', [[2, 0], [1, 1]]], // prettier-ignore
  ])('%s and %s', async (rows, columns, counts) => {
    expect((await read(visits, { rows, columns })).table.counts).toEqual(counts);
  });

  it('a header that is a number wins over the number of a column', async () => {
    const { table } = await read('2,x,1\na,p,s\nb,q,s\n', { rows: '2', columns: '1' });
    expect(table).toMatchObject({ rowLabels: ['a', 'b'], columnLabels: ['s'] });
  });

  it.each([
    [{ rows: 'Ward' }, 'unknown-column', '--rows', 'did you mean ward? columns: case, ward, outcome'],
    [{ columns: 'outcom' }, 'unknown-column', '--columns', 'did you mean outcome? columns: case, ward, outcome'],
    [{ count: 'n' }, 'unknown-column', '--count', 'columns: case, ward, outcome'],
    [{ rows: '4' }, 'unknown-column', '--rows', 'columns: case, ward, outcome'],
    [{ rows: '0' }, 'unknown-column', '--rows', 'columns: case, ward, outcome'],
    [{ rows: 'outcome' }, 'same-column', '--columns', 'name two different columns'],
    [{ count: 'ward' }, 'same-column', '--count', 'name two different columns'],
  ])('%j: %s', async (options, code, place, hint) => {
    expect(await refused(visits, options)).toMatchObject({ code, place, hint, exitStatus: 2 });
  });

  it('a name that stands twice in the header is asked back', async () => {
    expect(await refused('ward,ward,outcome\nA,B,x')).toMatchObject({
      code: 'ambiguous-column',
      hint: 'give its number instead: --rows 1 or --rows 2',
    });
  });

  it('a first line whose names come back as values leaves a note', async () => {
    const { notes } = await read('north,healed\nnorth,healed\nsouth,open\n', { rows: '1', columns: '2' });
    expect(notes).toMatchObject([{ code: 'header-may-be-data' }]);
  });
});

describe('missing values', () => {
  const text = 'ward,outcome,n\nA,x,1\n,x,2\nNA,y,4\nB,null,8\nn/a,NaN,16\nB,y,32\n';

  it('are an error unless a rule is given, with the first place and how many there are', async () => {
    expect(await refused(text)).toMatchObject({
      code: 'missing-values',
      message: 'the value of ward or outcome is missing in 4 of 6 records (first an empty one)',
      place: 'visits.csv:3:1',
      hint: 'add --missing drop to leave such records out, or --missing level to count missing as a level of its own',
      exitStatus: 1,
    });
    expect((await refused('ward,outcome\nA,x\nB, NA\n')).place).toBe('visits.csv:3:4');
  });

  it('are left out and counted by drop', async () => {
    const { table, missing } = await read(text, { missing: 'drop', count: 'n' });
    expect(table).toMatchObject({
      counts: [
        [1, 0],
        [0, 32],
      ],
      rowLabels: ['A', 'B'],
    });
    expect(missing).toEqual({
      rule: 'drop',
      records: 6,
      missingRow: 2,
      missingColumn: 1,
      missingBoth: 1,
      dropped: 30,
    });
  });

  it('a level that occurs only in records left out is no level', async () => {
    const { table } = await read('ward,outcome\nC,\nA,x\nB,y\n', { missing: 'drop' });
    expect(table.rowLabels).toEqual(['A', 'B']);
  });

  it('become a level of their own by level', async () => {
    const { table, missing } = await read(text, { missing: 'level', count: 'n' });
    expect(table).toMatchObject({
      counts: [
        [1, 0, 0],
        [2, 4, 16],
        [0, 32, 8],
      ],
      rowLabels: ['A', '(missing)', 'B'],
      columnLabels: ['x', 'y', '(missing)'],
    });
    expect(missing).toMatchObject({ rule: 'level', missingRow: 2, missingColumn: 1, missingBoth: 1, dropped: 0 });
  });

  it('cannot become a level whose name is in the data already', async () => {
    const named = 'ward,outcome\nA,x\n,y\n(missing),y\n';
    expect(await refused(named, { missing: 'level' })).toMatchObject({
      code: 'missing-level-name',
      place: 'visits.csv:4:1',
    });
    expect((await read(named, { missing: 'drop' })).table.rowLabels).toEqual(['A', '(missing)']);
  });

  it.each(['drop', 'level', 'fail'] as const)('in the count are an error whatever the rule: %s', async (missing) => {
    expect(await refused('ward,outcome,n\nA,x,1\nB,y,NA\n', { missing, count: 'n' })).toMatchObject({
      code: 'missing-count',
      place: 'visits.csv:3:5',
    });
  });

  it('in every record leave nothing to count', async () => {
    expect(await refused('ward,outcome\nA,\n,y\n', { missing: 'drop' })).toMatchObject({ code: 'no-records-left' });
  });
});

describe('what is wrong with a record has its line and column, or its number', () => {
  it.each([
    ['an exponent in a count', 'ward,outcome,n\nA,x,1\nB,y,1e3', { count: 'n' }, 'exponent-count', '3:5'],
    [
      'a negative count below a label of two lines, a comment and a blank line',
      'ward,outcome,n\n"A\nB",x,1\n# c\n\nB,y,-1',
      { count: 'n' },
      'negative-count',
      '6:5',
    ],
    ['a record too short', 'ward,outcome\nA,x\nB\n', {}, 'ragged-row', '3:2'],
    ['a record too long', 'ward,outcome\nA,x\nB,y,z\n', {}, 'ragged-row', '3:5'],
    ['a quote never closed', 'ward,outcome\nA,x\nB,"y', {}, 'open-quote', '3:3'],
    ['a quote within a field', 'ward,outcome\nA,x\nB,y"z\n', {}, 'stray-quote', '3:3'],
    ['text after a closing quote', 'ward,outcome\n"A"b,x\n', {}, 'stray-quote', '2:1'],
    ['a quote never closed in a long file', 'ward,outcome\nA,x\nB,"' + 'y'.repeat(1_100_000), {}, 'long-record', '3:3'],
  ])('%s', async (_, text, options, code, place) => {
    expect(await refused(text, options)).toMatchObject({ code, place: `visits.csv:${place}` });
    const once = { ...options, reread: undefined, sourceName: 'standard input' };
    expect(await refused(text, once)).toMatchObject({
      code,
      place: expect.stringMatching(/^standard input, record \d$/),
    });
  });

  it('a source that cannot be read again gives the number of the record', async () => {
    const reread = (): AsyncIterable<Uint8Array> => {
      throw new Error('gone');
    };
    expect((await refused('ward,outcome\nA,x\nB\n', { reread })).place).toBe('visits.csv, record 2');
    expect((await refused('ward,outcome\nA,x\nB\n', { reread: () => piecesOf('a,b\n') })).place).toBe(
      'visits.csv, record 2',
    );
  });

  it('records may be longer than the header by empty fields', async () => {
    expect((await read('ward,outcome\nA,x,\nB,y,,\n')).table.total).toBe(2);
  });

  it.each([
    ['', 'empty-input'],
    ['\n# nothing\n', 'no-data'],
    ['ward,outcome', 'only-header'],
    ['ward,outcome\n\n,\n', 'only-header'],
    ['ward,outcome\nA\0,x', 'binary-input'],
    ['\ufeff', 'no-data'],
  ])('%j: %s', async (text, code) => {
    expect(await refused(text)).toMatchObject({ code, place: 'visits.csv' });
  });

  it('text that is not UTF-8 is refused where it would be a label, and only there', async () => {
    const latin = (text: string) => Uint8Array.from(text, (character) => character.charCodeAt(0));
    const from = (text: string) => () =>
      readRecords(piecesOf(latin(text)), { ...defaults, reread: () => piecesOf(latin(text)) });
    expect(await problemOfAsync(from('ward,outcome\nB\xfcro,x\n'))).toMatchObject({
      code: 'not-utf-8',
      place: 'visits.csv:2:1',
    });
    expect((await from('ward,outcome,remark\nA,x,f\xfcr\n')()).table.total).toBe(1);
  });

  it('a column of identifiers is refused before it fills the memory', async () => {
    const ids = Array.from({ length: mostLevels + 1 }, (_, i) => `${i},x`);
    expect(await refused(`ward,outcome\n${ids.join('\n')}`)).toMatchObject({
      code: 'too-many-levels',
      message: 'column "ward" holds more than 1000 different values',
      place: 'visits.csv:1002:1',
    });
    expect((await read(`ward,outcome\n${ids.slice(1).join('\n')}`)).table.total).toBe(mostLevels);
  });

  it('levels are not gathered any more once missing values are known to end the reading', () => {
    const tally = new RecordTally({ rows: 'ward', columns: 'outcome' }, 'fail', 'visits.csv');
    tally.take(['ward', 'outcome']);
    tally.take(['', 'x']);
    for (let i = 0; i < 2 * mostLevels; i++) tally.take([`${i}`, `${i}`]);
    expect([tally.rows.labels.length, tally.columns.labels.length]).toEqual([0, 0]);
    expect(tally.closingFault()?.problem('here').message).toContain('missing in 1 of 2001 records');
  });

  it('an error of the source itself is passed on', async () => {
    async function* broken(): AsyncGenerator<Uint8Array> {
      yield bytesOf('ward,outcome\n');
      throw new Error('disk gone');
    }
    await expect(readRecords(broken(), defaults)).rejects.toThrow('disk gone');
  });
});

describe('totals in records with counts', () => {
  const long = 'g,o,n\nx,a,1\nx,b,2\nx,Total,3\ny,a,3\ny,b,5\ny,Total,8\n';
  const columns = { rows: 'g', columns: 'o', count: 'n' };

  it('are refused, dropped or kept by the rule of cross-tables', async () => {
    expect(await refused(long, columns)).toMatchObject({ code: 'total-line', place: 'visits.csv' });
    const dropped = await read(long, { ...columns, totals: 'drop' });
    expect(dropped.table.counts).toEqual([
      [1, 2],
      [3, 5],
    ]);
    expect(dropped.source.totalsLeftOut).toEqual(['column']);
    expect((await read(long, { ...columns, totals: 'keep' })).table.total).toBe(22);
  });

  it('a value named total is a value like any other where each record counts once', async () => {
    const { table } = await read('g,o\nx,total\ny,partial\n', { rows: 'g', columns: 'o' });
    expect(table.columnLabels).toEqual(['total', 'partial']);
  });
});
