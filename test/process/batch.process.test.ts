// keepsum batch as it is run: forms of input and output, threads, faults, streams.
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { checkedLines, isPartEnd } from '../helpers/checked-lines.js';
import { inShell, keepsum } from './run-command.js';

const folder = mkdtempSync(join(tmpdir(), 'keepsum-batch-'));
afterAll(() => rmSync(folder, { recursive: true }));

const demo = 'fixtures/demo/shift-checks.ndjson';
const records = ['fixtures/demo/orchard-blight.csv', '--by', 'orchard,blight', '--rows', 'spray', '--columns', 'state'];

/** Enough counted work that threads are started: each table is drawn from 20,000 times. */
const many = Array.from({ length: 90 }, (_, k) =>
  JSON.stringify({
    key: `t${k % 80}`,
    counts: [
      [k, 9, 4],
      [7, 1 + (k % 7), 3],
      [2, 5, 30 - (k % 30)],
    ],
  }),
);
const drawn = ['batch', '-', '--method', 'sample', '--draws', '20000', '--seed', 'm'];

describe('threads', () => {
  it('1, 2 and 3 give the same bytes, and so does each line alone and in another order', async () => {
    const input = `${many.join('\n')}\n`;
    const one = await keepsum([...drawn, '--threads', '1'], { input });
    expect([one.status, one.err]).toEqual([0, '']);
    const lines = one.out.trimEnd().split('\n');
    expect(checkedLines(one.out).map(({ key }) => key)).toEqual(many.map((line) => JSON.parse(line).key));
    for (const threads of ['2', '3']) {
      expect((await keepsum([...drawn, '--threads', threads], { input })).out).toBe(one.out);
    }
    const some = [77, 5, 41];
    const alone = await keepsum(drawn, { input: some.map((k) => many[k]).join('\n') });
    expect(alone.out.trimEnd().split('\n')).toEqual(some.map((k) => lines[k]));
  });
});

describe('results', () => {
  it('are compact lines, whole results or rows of CSV, in input order', async () => {
    const compact = await keepsum(['batch', demo, '--seed', 'x']);
    const full = await keepsum(['batch', demo, '--seed', 'x', '--full']);
    const csv = await keepsum(['batch', demo, '--seed', 'x', '--format', 'csv']);
    const keys = ['press', 'glaze', 'kiln', 'crates'];
    for (const { out, err } of [compact, full]) {
      expect(err).toBe('');
      expect(checkedLines(out).map(({ key }) => key)).toEqual(keys);
    }
    expect(full.out).toContain('"schema":"keepsum/result/1"');
    const [header, ...rows] = csv.out.trimEnd().split('\n');
    expect(header).toMatch(/^key,headline,statistic,.*,error$/);
    expect([...new Set(rows.map((row) => row.split(',')[0]))]).toEqual(keys);
    const ps = checkedLines(compact.out).flatMap((line) =>
      'pValues' in line ? line.pValues.map(({ p }) => String(p)) : [],
    );
    const at = header!.split(',').indexOf('p');
    expect(rows.map((row) => row.split(',')[at])).toEqual(ps);
  });

  it('come from one long file of records, a table for each key', async () => {
    const { out, status } = await keepsum(['batch', ...records, '--count', 'trees']);
    expect(status).toBe(0);
    const lines = checkedLines(out);
    expect(lines.map(({ key }) => key)).toEqual(['hill,scab', 'hill,canker', 'river,scab', 'river,canker']);
    expect(lines[3]).toMatchObject({
      counts: [
        [26, 0],
        [25, 3],
      ],
      rowLabels: ['none', 'sulphur'],
    });
  });

  it('come from a list of tables, a file that cannot be used among them', async () => {
    const files = [
      'fixtures/demo/cracked-tiles.csv',
      'fixtures/malformed/negative.csv',
      'fixtures/demo/orchid-forms.tsv',
    ];
    const { out, err, status } = await keepsum(['batch', ...files]);
    expect(status).toBe(1);
    expect(err).toBe('note: 1 of 3 tables could not be used; its line says why\n');
    expect(checkedLines(out).map((line) => [line.key, 'error' in line])).toEqual(
      files.map((file, k) => [file, k === 1]),
    );
  });
});

describe('a table that cannot be used', () => {
  const input =
    '{"key":"a","counts":[[8,2],[1,9]]}\n\n{"key":"b","counts":[[8,2],[1,-9]]}\n\xff{\n{"counts":[[1,0],[0,1]]}';

  it('has a line or row that says why; status 1, or 0 with --allow-errors', async () => {
    const bytes = Buffer.from(input, 'latin1');
    const { out, err, status } = await keepsum(['batch', '-'], { input: bytes });
    expect(status).toBe(1);
    expect(err).toBe('note: 2 of 4 tables could not be used; their lines say why\n');
    const lines = checkedLines(out);
    expect(lines.map(({ key }) => key)).toEqual(['a', 'b', '4', '5']);
    expect(lines[1]).toMatchObject({ error: { code: 'negative-count', place: 'standard input:3' } });
    expect(lines[2]).toMatchObject({ error: { code: 'not-utf-8', place: 'standard input:4' } });
    const allowed = await keepsum(['batch', '-', '--allow-errors', '--quiet', '--format', 'csv'], { input: bytes });
    expect([allowed.status, allowed.err]).toEqual([0, '']);
    expect(allowed.out).toMatch(/^b,,.*standard input:3: counts\[1\]\[1\] is -9 \(negative-count\)$/m);
  });
});

describe('a line that is no JSON', () => {
  it.each([
    ['{"key":"a","counts":[[8,2],[1,9]]', { key: 'a', error: { message: 'this line is not JSON (it ends too early)', place: 'standard input:2' } }], // prettier-ignore
    ['{"key":"a","counts":[[8,2],[1 9]]}', { key: 'a', error: { code: 'not-json', place: 'standard input:2:31' } }],
    ['{counts:[[8,2],[1,9]]}', { key: '2', error: { code: 'not-json', place: 'standard input:2:2' } }],
    ['{"key":"a","counts":[[8,2e999],[1,9]]}', { key: 'a', error: { message: 'counts[0][1] is Infinity' } }],
  ])('is named by its key where that can be read, with its place: %s', async (line, expected) => {
    const { out } = await keepsum(['batch', '-'], { input: `{"counts":[[8,2],[1,9]]}\n${line}` });
    expect(checkedLines(out)[1]).toMatchObject(expected);
  });

  it('and not even text ends the run, after those before it', async () => {
    const input = '{"counts":[[8,2],[1,9]]}\n{"counts":[[8,\0],[1,9]]}\n';
    const { out, err, status } = await keepsum(['batch', '-'], { input });
    expect(checkedLines(out).map(({ key }) => key)).toEqual(['1']);
    expect([status, err.split('\n')[0]]).toEqual([1, 'error: standard input: this is not text: byte 40 is NUL']);
  });

  it('or holds bytes that are not UTF-8 in a label is refused rather than read with another label', async () => {
    const input = Buffer.from('{"key":"a","counts":[[8,2],[1,9]],"rowLabels":["\xff","b"]}', 'latin1');
    expect(checkedLines((await keepsum(['batch', '-'], { input })).out)[0]).toMatchObject({ key: 'a', error: { code: 'not-utf-8' } }); // prettier-ignore
  });
});

describe('streams', () => {
  const endless = `yes '{"counts":[[8,2],[1,9]]}' | keepsum batch -`;

  it('each table is answered when it is there', async () => {
    const line = '{"counts":[[8,2],[1,9]]}';
    // The second line is sent only when the answer to the first has come.
    const { out } = await inShell(
      `coproc K { keepsum batch -; }; echo '${line}' >&"\${K[1]}"; read -r -t 60 first <&"\${K[0]}"; echo "\${first:0:9}"; echo '${line}' >&"\${K[1]}"; read -r -t 60 second <&"\${K[0]}"; echo "\${second:0:9}"`,
    );
    expect(out).toBe('{"key":"1\n{"key":"2\n');
  });

  it('a reader that has seen enough ends the run quietly with 0', async () => {
    const { out, err } = await inShell(`${endless} | head -2; echo "\${PIPESTATUS[1]}"`);
    expect(err).toBe('');
    expect(out.split('\n').map((line) => line.slice(0, 9))).toEqual(['{"key":"1', '{"key":"2', '0', '']);
  });

  it('a full disk is said, with 1', async () => {
    const { out, err } = await inShell(`${endless} > /dev/full; echo "$?"`);
    expect(out).toBe('1\n');
    expect(err).toMatch(/^error: standard output: .*ENOSPC.*\nhint: .*\n$/);
  });

  it('what is no text at all is refused', async () => {
    expect(await keepsum(['batch', '-'], { input: '' })).toMatchObject({ status: 1, out: '' });
    const zip = await keepsum(['batch', '-'], { input: Buffer.from('PK\u0003\u0004xx') });
    expect(zip.err).toMatch(/^error: standard input: this is a spreadsheet workbook/);
  });
});

describe('wrong usage', () => {
  it.each([
    [['batch', demo, '--rows', 'x', '--columns', 'y'], '--by is not given'],
    [['batch', demo, '--resume'], '--resume goes on with a file'],
    [['batch', demo, '--full', '--format', 'csv'], '--full is for lines of JSON only'],
    [['batch', demo, '--raw-csv'], '--raw-csv is for CSV output only'],
    [['batch', demo, '--drop-totals'], '--drop-totals does not go with'],
    [['batch', demo, '--output', demo], 'is the file the counts come from'],
    [['batch', demo, '--output', 'no/such/x'], '"no/such/x" cannot be written'],
    [['batch', demo, '--seed='], 'the value is empty'],
    [['batch', demo, '--shard', '1/2'], 'a part needs the seed'],
    [['batch', ...records, '--require-keys'], '--require-keys does not go with'],
  ])('%j ends with 2 and two lines', async (words, part) => {
    const { status, out, err } = await keepsum(words);
    expect([status, out]).toEqual([2, '']);
    expect(err).toContain(part);
    expect(err.split('\n')).toHaveLength(3);
  });
});

it('a result of --output is the one that standard output gets, and nothing is left beside it', async () => {
  const file = join(folder, 'whole.ndjson');
  writeFileSync(file, 'older results');
  const { out } = await keepsum(['batch', demo, '--seed', 'x']);
  expect(await keepsum(['batch', demo, '--seed', 'x', '--output', file])).toEqual({ status: 0, out: '', err: '' });
  expect(readFileSync(file, 'utf8')).toBe(out);
  expect((await inShell(`ls ${folder}`)).out).toBe('whole.ndjson\n');
});

describe('parts', () => {
  it('end with a line that says how long they are, which replay and adjust pass over', async () => {
    const { out } = await keepsum(['batch', demo, '--seed', 'x', '--shard', '2/3']);
    const [line, end, ...more] = out.trimEnd().split('\n').map((one) => JSON.parse(one) as unknown); // prettier-ignore
    expect([isPartEnd(end), more]).toEqual([true, []]);
    expect(line).toMatchObject({ key: 'glaze', shard: '2/3' });
    expect(end).toMatchObject({ part: '2/3', lines: 1, tables: 4, run: { seed: 'x' } });
    expect((await keepsum(['replay', '-'], { input: out })).status).toBe(0);
    expect((await keepsum(['adjust', '-', '--by', 'holm'], { input: out })).err).toContain('1 test counts');
  });

  it('of another run, and parts that were cut short, are not pooled', async () => {
    const made = async (name: string, ...words: string[]): Promise<string> => {
      const path = join(folder, name);
      writeFileSync(path, (await keepsum(['batch', demo, '--allow-errors', ...words])).out);
      return path;
    };
    const one = await made('one', '--seed', 'x', '--shard', '1/2');
    const two = await made('two', '--seed', 'x', '--shard', '2/2');
    const other = await made('other', '--seed', 'x', '--alpha', '0.01', '--shard', '2/2');
    const merge = (...paths: string[]) => keepsum(['merge', ...paths]);
    expect((await merge(one, other)).err).toContain('alpha is not the same');
    writeFileSync(join(folder, 'cut'), readFileSync(two, 'utf8').split('\n').slice(0, -2).join('\n'));
    expect((await merge(one, join(folder, 'cut'))).err).toMatch(
      /without the line that closes a whole part\nhint: make it again/,
    );
    expect((await merge(one, join(folder, 'none'))).err).toContain('there is no such file');
    for (const name of ['one', 'two', 'other', 'cut']) rmSync(join(folder, name));
  });
});

describe('strata, clusters, levels and families', () => {
  const strata = JSON.stringify([
    { label: 'low', counts: [[6, 14], [1, 19]] }, // prettier-ignore
    { label: 'high', counts: [[9, 11], [7, 13]] }, // prettier-ignore
  ]);
  const input = ['a', 'b', 'c', 'd', 'e']
    .map((key) => `{"key":"${key}","family":"f${key < 'c' ? 1 : 2}","strata":${strata},"plan":{"method":"sample","draws":1000}}\n`)
    .join(''); // prettier-ignore

  it('of lines are resumed, dealt to parts, replayed and adjusted like others', async () => {
    const single = (await keepsum(['batch', '-', '--seed', 's'], { input })).out;
    expect(checkedLines(single)).toHaveLength(5);
    expect((await keepsum(['replay', '-'], { input: single })).status).toBe(0);
    const paths = ['1/2', '2/2'].map((part) => join(folder, part.replace('/', '-')));
    for (const [k, path] of paths.entries()) {
      await keepsum(['batch', '-', '--seed', 's', '--shard', `${k + 1}/2`, '--output', path], { input });
    }
    expect((await keepsum(['merge', ...paths])).out).toBe(single);
    const { err } = await keepsum(['adjust', '-', '--by', 'holm'], { input: single });
    expect(err).toContain('family f1: 2 tests count\nnote: family f2: 3 tests count');
    for (const path of paths) rmSync(path);
  });

  it('of files and records are read as keepsum test reads them', async () => {
    const seals = 'fixtures/demo/leaking-seals.csv';
    const alone = JSON.parse((await keepsum(['test', seals, '--format', 'json'])).out) as { pValues: unknown };
    const { out } = await keepsum(['batch', seals]);
    expect(checkedLines(out)[0]).toMatchObject({ key: seals, strata: { length: 3 }, pValues: alone.pValues });
    const merged = await keepsum(['batch', ...records, '--count', 'trees', '--family', 'blight', '--merge', 'any=none+sulphur', '--allow-errors']); // prettier-ignore
    expect(checkedLines(merged.out).map((line) => 'rowLabels' in line && [line.family, line.rowLabels])).toEqual(
      ['scab', 'canker', 'scab', 'canker'].map((family) => [family, ['any']]),
    );
    const held = await keepsum(['batch', records[0]!, '--by', 'blight', '--rows', 'spray', '--columns', 'state', '--strata', 'orchard', '--count', 'trees']); // prettier-ignore
    expect(checkedLines(held.out)).toMatchObject([{ strata: [{ label: 'hill' }, { label: 'river' }] }, {}]);
  });

  it.each([
    [[demo, '--strata', 'x'], /--strata does not go with tables given as lines.*\nhint: a line names its own/],
    [[demo, '--merge', 'a=b+c'], /--merge does not go with tables given as lines/],
    [[...records, '--merge', 'any=none+sulfur'], /there is no level "sulfur".*\nhint: did you mean "sulphur"/],
    [[...records, '--strata', 'orchard'], /--by and --strata both name the column/],
    [[...records, '--family', 'no'], /has no column named "no"/],
    [[...records, '--family', 'blight', '--format', 'csv'], /--family is for lines of JSON only/],
  ])('that do not fit are refused: %j', async (words, message) => {
    const { status, out, err } = await keepsum(['batch', ...words]);
    expect([status, out]).toEqual([2, '']);
    expect(err).toMatch(message);
  });
});
