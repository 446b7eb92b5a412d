// A run that is killed at any moment goes on with --resume, and its file is then that of a run that nothing happened to.
import { spawn } from 'node:child_process';
import {
  appendFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmdirSync,
  rmSync,
  statSync,
  truncateSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, describe, expect, it } from 'vitest';
import { bin, keepsum, run } from './run-command.js';

const folder = mkdtempSync(join(tmpdir(), 'keepsum-resume-'));
afterAll(() => rmSync(folder, { recursive: true }));
const input = join(folder, 'tables.ndjson');
const tables = 1500;
/** Quick exact tables, some drawn ones, some that cannot be used, and blank lines. */
writeFileSync(
  input,
  Array.from({ length: tables }, (_, k) => {
    if (k % 97 === 0) return '';
    if (k % 41 === 0) return '{"counts":[[1,2],[3,"x"]]}';
    const plan = k % 10 === 0 ? ',"plan":{"method":"sample","draws":1000}' : '';
    return `{"key":"k${k}","counts":[[${k % 13},${5 + (k % 3)},4],[2,${1 + (k % 11)},9]]${plan}}`;
  }).join('\n'),
);

const sizeOf = (path: string): number => (existsSync(path) ? statSync(path).size : 0);
const words = (output: string, ...more: string[]): string[] => [
  'batch',
  input,
  '--output',
  output,
  '--seed',
  'killed',
  '--threads',
  '1',
  '--quiet',
  ...more,
];

/** Starts a run, and kills it when its results have grown by so much and some more milliseconds have passed. */
async function killed(output: string, growth: number, milliseconds: number, more: string[]): Promise<void> {
  const partial = `${output}.partial`;
  const begin = sizeOf(partial);
  const child = spawn(process.execPath, [bin, ...words(output, ...more)], { stdio: 'ignore' });
  const ended = new Promise((resolve) => child.on('close', resolve));
  while (child.exitCode === null && growth > 0 && sizeOf(partial) < begin + growth) await sleep(2);
  await sleep(milliseconds);
  child.kill('SIGKILL');
  await ended;
}

describe('a run killed at twenty random moments', { timeout: 400_000 }, () => {
  it.each([
    ['ndjson', 20],
    ['csv', 4],
  ])('leaves the same %s file as one left alone', async (format, kills) => {
    const alone = join(folder, `alone.${format}`);
    const output = join(folder, `killed.${format}`);
    expect((await keepsum(words(alone, '--format', format))).status).toBe(1);
    let hits = 0;
    let more = ['--format', format];
    for (let kill = 0; kill < kills; kill++) {
      if (existsSync(output)) break;
      // Every fourth dies while it starts, the others when they have written something.
      const growth = kill % 4 === 3 ? 0 : 1 + Math.random() * (statSync(alone).size / kills / 2);
      const before = sizeOf(`${output}.partial`);
      await killed(output, growth, Math.random() * (growth === 0 ? 250 : 10), more);
      if (existsSync(`${output}.partial`) && sizeOf(`${output}.partial`) > before) hits++;
      more = ['--format', format, '--resume'];
    }
    expect(hits).toBeGreaterThanOrEqual(kills / 4);
    if (!existsSync(output)) expect((await keepsum(words(output, ...more))).status).toBe(1);
    expect(readFileSync(output, 'utf8')).toBe(readFileSync(alone, 'utf8'));
    expect(existsSync(`${output}.partial`) || existsSync(`${output}.partial.journal`)).toBe(false);
  });
});

describe('an unfinished run', () => {
  const output = join(folder, 'left.ndjson');
  const partial = `${output}.partial`;
  const again = (...more: string[]) => keepsum(piped(...more), { input: text });

  const text = readFileSync(input, 'utf8');
  const piped = (...more: string[]): string[] => words(output, ...more).map((word) => (word === input ? '-' : word));

  /** Half of the input is sent, and the rest waited for when the end comes. */
  async function leftHalfWay(): Promise<void> {
    const child = spawn(process.execPath, [bin, ...piped()], { stdio: ['pipe', 'ignore', 'inherit'] });
    const ended = new Promise((resolve) => child.on('close', resolve));
    child.stdin.write(text.slice(0, text.length / 2));
    while (child.exitCode === null && sizeOf(partial) < 200_000) await sleep(10);
    child.kill('SIGKILL');
    await ended;
  }

  it('is kept from a run that would begin anew, from other settings and from other input', async () => {
    await leftHalfWay();
    const kept = readFileSync(partial);
    const refusals = async (...more: string[]): Promise<string> => {
      const { status, out, err } = await again(...more);
      expect([status, out, err.split('\n').length]).toEqual([2, '', 3]);
      return err;
    };
    expect(await refusals()).toContain('results of an unfinished run are kept');
    expect(await refusals('--resume', '--alpha', '0.01')).toContain('it differs in alpha');
    const another = piped('--resume').map((word) => (word === 'killed' ? 'another' : word));
    expect((await keepsum(another, { input: text })).err).toContain('it differs in seed');
    const other = await keepsum(piped('--resume'), { input: text.replace('"k1"', '"k0"') });
    expect(other.err).toContain('are not those that the unfinished run');
    expect(readFileSync(partial)).toEqual(kept);
  });

  it.each<[string, () => void]>([
    [
      'the end of both files is torn',
      () => {
        appendFileSync(partial, '{"key":"torn');
        appendFileSync(`${partial}.journal`, '{"units":99');
      },
    ],
    ['the disk lost half of the results', () => truncateSync(partial, Math.floor(statSync(partial).size / 2))],
    [
      'a result was changed',
      () => writeFileSync(partial, readFileSync(partial, 'utf8').replace('"key":"k300"', '"key":"k301"')),
    ],
  ])('goes on from the last line that the results bear out where %s', async (_, damage) => {
    if (!existsSync(partial)) await leftHalfWay();
    damage();
    const alone = readFileSync(join(folder, 'alone.ndjson'), 'utf8').replaceAll(input, 'standard input');
    expect((await again('--resume', '--allow-errors')).status).toBe(0);
    expect(readFileSync(output, 'utf8')).toBe(alone);
    expect((await again('--resume')).err).toContain('no unfinished run beside it');
    rmSync(output);
  });
});

it('a run killed between its header and its first table has one header', async () => {
  const output = join(folder, 'header.csv');
  const csv = ['batch', '-', '--format', 'csv', '--output', output, '--quiet'];
  const child = spawn(process.execPath, [bin, ...csv], { stdio: ['pipe', 'ignore', 'inherit'] });
  const ended = new Promise((resolve) => child.on('close', resolve));
  while (child.exitCode === null && sizeOf(`${output}.partial`) === 0) await sleep(10);
  child.kill('SIGKILL');
  await ended;
  expect(readFileSync(`${output}.partial`, 'utf8')).toMatch(/^key,headline,.*\n$/);
  expect((await keepsum([...csv, '--resume'], { input: '{"counts":[[8,2],[1,9]]}\n' })).status).toBe(0);
  expect(readFileSync(output, 'utf8').match(/^key,/gm)).toHaveLength(1);
});

it('a part that ended when all but its name was there has one closing line', async () => {
  const output = join(folder, 'part.ndjson');
  const part = ['batch', '-', '--seed', 's', '--shard', '2/3', '--quiet', '--output', output];
  const lines = '{"counts":[[8,2],[1,9]]}\n'.repeat(5);
  const child = spawn(process.execPath, [bin, ...part], { stdio: ['pipe', 'ignore', 'ignore'] });
  const ended = new Promise((resolve) => child.on('close', resolve));
  child.stdin.write(lines);
  while (child.exitCode === null && sizeOf(`${output}.partial`) === 0) await sleep(10);
  // A directory takes the name away, so that the whole part cannot have it.
  mkdirSync(output);
  child.stdin.end();
  await ended;
  expect(readFileSync(`${output}.partial`, 'utf8')).toContain('{"part":"2/3","lines":2,"tables":5');
  rmdirSync(output);
  expect((await keepsum([...part, '--resume'], { input: lines })).status).toBe(0);
  const alone = await keepsum(part.slice(0, -2), { input: lines });
  expect(readFileSync(output, 'utf8')).toBe(alone.out);
});

it('a disk that is full keeps what is finished, and says how to go on', async () => {
  const output = join(folder, 'full.ndjson');
  const limited = `trap '' XFSZ; ulimit -f 200; exec "${process.execPath}" "${bin}" ${words(output).join(' ')}`;
  const { err, status } = await run('bash', ['-c', limited], {});
  expect(status).toBe(1);
  expect(err).toMatch(
    /^note: what is finished is kept in .*\nerror: --output: the results could not be written .*\nhint: .*--resume\n$/,
  );
  expect((await keepsum(words(output, '--resume', '--allow-errors'))).status).toBe(0);
  expect(readFileSync(output)).toEqual(readFileSync(join(folder, 'alone.ndjson')));
});
