// Every way to hand over the same table gives the same result.
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { commands } from '../../src/cli/commands/all.js';
import { rootExamples } from '../../src/cli/purpose.js';
import { inShell, keepsum } from './run-command.js';

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'keepsum-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

const asJson = ['--format', 'json'];
const crossTable = 'arm,healed,open\ntreated,8,2\ncontrol,1,9\n';
const records = (rows: [string, string, number][]): string =>
  ['arm,outcome', ...rows.flatMap(([arm, outcome, times]) => Array<string>(times).fill(`${arm},${outcome}`)), ''].join(
    '\n',
  );
const raw = records([
  ['treated', 'healed', 8],
  ['treated', 'open', 2],
  ['control', 'healed', 1],
  ['control', 'open', 9],
]);

/** Everything but where the table came from. */
function analysis(out: string): unknown {
  const { input, ...rest } = JSON.parse(out) as { input: Record<string, unknown> };
  return { ...rest, input: { ...input, source: null, sha256: null, missing: null } };
}

describe('the same table', () => {
  it('gives the same result from rows, a file, standard input named or not, and raw records', async () => {
    writeFileSync(join(folder, 'table.csv'), crossTable);
    writeFileSync(join(folder, 'raw.csv'), raw);
    const byRecords = ['--rows', 'arm', '--columns', 'outcome'];
    const results = await Promise.all([
      keepsum(['test', 'treated=8,2', 'control=1,9', '--column-labels', 'healed,open', ...asJson]),
      keepsum(['test', 'table.csv', ...asJson], { folder }),
      keepsum(['test', '-', ...asJson], { input: crossTable }),
      keepsum(['test', ...asJson], { input: crossTable }),
      keepsum(['test', ...asJson], { input: crossTable.replaceAll(',', '\t').replaceAll('\n', '\r\n') }),
      keepsum(['test', 'raw.csv', ...byRecords, ...asJson], { folder }),
      keepsum(['test', ...byRecords, ...asJson], { input: raw }),
    ]);
    expect(results.map(({ status }) => status)).toEqual(results.map(() => 0));
    const [first, ...others] = results.map(({ out }) => analysis(out));
    for (const other of others) expect(other).toEqual(first);
  });

  it('is read from a pipe that a shell names as a file', async () => {
    const { status, out } = await inShell(
      `keepsum test <(printf '${crossTable.replaceAll('\n', '\\n')}') --format json`,
    );
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ input: { rowLabels: ['treated', 'control'] } });
  });

  it('is a file when ./ stands in front of what looks like a row', async () => {
    writeFileSync(join(folder, '8,2'), crossTable);
    const { out } = await keepsum(['test', './8,2', ...asJson], { folder });
    expect(JSON.parse(out)).toMatchObject({ input: { source: { form: 'cross-table' } } });
  });
});

describe('--output', () => {
  it('writes the document to the file and nothing to standard output', async () => {
    const toScreen = await keepsum(['test', '8,2', '1,9', ...asJson]);
    const toFile = await keepsum(['test', '8,2', '1,9', ...asJson, '--output', 'result.json'], { folder });
    expect(toFile).toEqual({ status: 0, out: '', err: '' });
    expect(readFileSync(join(folder, 'result.json'), 'utf8')).toBe(toScreen.out);
    expect(await keepsum(['test', '8,2', '1,9', ...asJson, '-o', '-'])).toEqual(toScreen);
  });

  it('leaves the file as it was when the run cannot finish', async () => {
    writeFileSync(join(folder, 'kept.json'), 'before');
    expect((await keepsum(['test', '8,x', '1,9', '-o', 'kept.json'], { folder })).status).toBe(1);
    expect(readFileSync(join(folder, 'kept.json'), 'utf8')).toBe('before');
    expect(readdirSync(folder).filter((name) => name.startsWith('.'))).toEqual([]);
  });

  it('fails before the table is read when the path is bad', async () => {
    const { status, err } = await keepsum(['test', 'no-such.csv', '-o', 'no/such.json'], { folder });
    expect(status).toBe(2);
    expect(err).toContain('--output');
  });
});

it('an operand after -- is never an option', async () => {
  expect((await keepsum(['test', ...asJson, '--', '8,2', '1,9'])).status).toBe(0);
});

describe('the examples of the help', async () => {
  const files = await Promise.all(commands.map((entry) => entry.load()));
  const lines = [...rootExamples, ...files.flatMap((file) => file.examples)].map((example) => example.line);

  it.each([...new Set(lines)])('%s', async (line) => {
    const { status, out, err } = await inShell(line);
    expect({ status, err }).toEqual({ status: 0, err: expect.stringMatching(/^(note: [^\n]+\n)*$/) });
    expect(out).not.toBe('');
  });
});
