// What goes to which stream, and what happens when the other end has gone.
import { describe, expect, it } from 'vitest';
import { bin, inShell, keepsum, run } from './run-command.js';

const sampled = [
  'test',
  '800,200,30',
  '100,900,40',
  '5,7,900',
  '--method',
  'auto',
  '--effort',
  '10',
  '--draws',
  '2000',
];

describe('standard output', () => {
  it('holds exactly one document, in every format', async () => {
    const json = await keepsum([...sampled, '--format', 'json', '--seed', 'one document']);
    expect(JSON.parse(json.out)).toMatchObject({ schema: 'keepsum/result/1', plan: { seed: 'one document' } });
    const csv = await keepsum([...sampled, '--format', 'csv', '--seed', 'one document']);
    const [header, ...rows] = csv.out.trimEnd().split('\n');
    expect(header).toContain('statistic,');
    expect(rows.length).toBeGreaterThan(0);
    const markdown = await keepsum([...sampled, '--format', 'markdown', '--seed', 'one document']);
    expect(markdown.out).toMatch(/^# /);
    for (const { status, out } of [json, csv, markdown]) {
      expect(status).toBe(0);
      expect(out).toMatch(/[^\n]\n$/);
    }
  });

  it('stays empty when a run cannot finish', async () => {
    expect((await keepsum(['test', '8,x', '1,9'])).out).toBe('');
  });
});

describe('standard error', () => {
  it('stays empty when there is nothing to remark', async () => {
    expect(await keepsum(['test', '8,2', '1,9'])).toMatchObject({ status: 0, err: '' });
  });

  it('says in one line that the p was sampled, and why, when the method was left to the program', async () => {
    const { err } = await keepsum(sampled);
    expect(err).toMatch(/^note: p is sampled, 2,000 draws: exact .*\n$/);
    expect((await keepsum([...sampled, '--quiet'])).err).toBe('');
    const asked = sampled.map((word) => (word === 'auto' ? 'sample' : word));
    expect((await keepsum(asked)).err).toBe('');
  });
});

describe('a closed pipe ends quietly with 0', () => {
  it.each([
    ['a reader that takes one line', 'head -1'],
    ['a reader that closes at once', 'true'],
  ])('%s', async (_case, reader) => {
    const { out, err } = await inShell(`keepsum test 8,2 1,9 | ${reader}; echo "\${PIPESTATUS[0]}"`);
    expect(err).toBe('');
    expect(out.trimEnd().split('\n').at(-1)).toBe('0');
  });

  it('one closed before the command starts, for a document too long for its buffer', async () => {
    const rows = Array.from({ length: 400 }, (_, row) => `row ${row},${row},${row + 1},3`).join('\n');
    const line = '{ sleep 0.2; keepsum test - --format json --method asymptotic; echo "$?" >&2; } | true';
    expect((await inShell(line, { input: `label,a,b,c\n${rows}\n` })).err).toBe('0\n');
  });

  it('one on standard error leaves the report as it is', async () => {
    const { out } = await inShell(`keepsum ${sampled.join(' ')} --format json 2> >(true); echo "$?"`);
    expect(out).toMatch(/\n\}\n0\n$/);
  });
});

it('a full disk is said, with 1', async () => {
  const { out, err } = await inShell('keepsum test 8,2 1,9 > /dev/full; echo "$?"');
  expect(out).toBe('1\n');
  expect(err).toMatch(/^error: standard output: .*ENOSPC.*\nhint: .*\n$/);
});

describe('colour', () => {
  const escape = '\u001b[';

  it('does not go into a pipe, and --color puts it there', async () => {
    expect((await keepsum(['test', '8,2', '1,9'])).out).not.toContain(escape);
    expect((await keepsum(['test', '8,2', '1,9', '--color'])).out).toContain(escape);
  });

  it('does not go into json, csv or markdown, even when asked for', async () => {
    for (const format of ['json', 'csv', 'markdown']) {
      expect((await keepsum(['test', '8,2', '1,9', '--color', '--format', format])).out).not.toContain(escape);
    }
  });

  it('is not taken from the words of the command line or from FORCE_COLOR', async () => {
    const environment = { FORCE_COLOR: '3' };
    expect((await keepsum(['test', '8,2', '1,9'], { environment })).out).not.toContain(escape);
  });
});

// A terminal made by script(1), which Debian's base system has.
describe.skipIf(process.platform !== 'linux')('at a terminal', () => {
  const atTerminal = (words: string, environment: Record<string, string> = {}) =>
    run('script', ['-qec', `"${process.execPath}" "${bin}" ${words}`, '/dev/null'], { environment });

  it('a report is coloured unless NO_COLOR or a dumb terminal forbids it', async () => {
    const escape = '\u001b[';
    expect((await atTerminal('test 8,2 1,9')).out).toContain(escape);
    expect((await atTerminal('test 8,2 1,9', { NO_COLOR: '1' })).out).not.toContain(escape);
    expect((await atTerminal('test 8,2 1,9', { TERM: 'dumb' })).out).not.toContain(escape);
    expect((await atTerminal('test 8,2 1,9 --no-color')).out).not.toContain(escape);
  });

  it('nothing named is answered with short help and 2, instead of waiting', async () => {
    const { status, out } = await atTerminal('test');
    expect(status).toBe(2);
    expect(out).toMatch(/^Tests whether the rows and columns/);
  });
});
