import {
  chmodSync,
  lstatSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { toFile } from '../../../src/cli/streams/output-file.js';
import { problemOf } from '../problem-of.js';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'keepsum-'));
});
afterEach(() => rmSync(folder, { recursive: true }));
const at = (name: string): string => join(folder, name);

describe('a report in a file', () => {
  it('leaves no trace until it is written, and then nothing but the file', async () => {
    const destination = await toFile(at('new.json'), null);
    expect(readdirSync(folder)).toEqual([]);
    await destination.write('whole\n');
    expect(readdirSync(folder)).toEqual(['new.json']);
    expect(readFileSync(at('new.json'), 'utf8')).toBe('whole\n');
  });

  it('leaves the old file as it was until then, and keeps its rights', async () => {
    writeFileSync(at('old'), 'before');
    chmodSync(at('old'), 0o640);
    const destination = await toFile(at('old'), null);
    expect(readFileSync(at('old'), 'utf8')).toBe('before');
    await destination.write('after');
    expect(readFileSync(at('old'), 'utf8')).toBe('after');
    expect(statSync(at('old')).mode & 0o777).toBe(0o640);
  });

  it('writes through a symbolic link instead of replacing it', async () => {
    writeFileSync(at('real'), 'before');
    symlinkSync(at('real'), at('link'));
    await (await toFile(at('link'), null)).write('after');
    expect(lstatSync(at('link')).isSymbolicLink()).toBe(true);
    expect(readFileSync(at('real'), 'utf8')).toBe('after');
  });

  it('writes to a device without replacing it', async () => {
    await (await toFile('/dev/null', null)).write('gone');
    expect(statSync('/dev/null').isCharacterDevice()).toBe(true);
  });

  it('takes any name a file may have', async () => {
    const name = `${'long '.repeat(50)}$(x)`;
    await (await toFile(at(name), null)).write('x');
    expect(readdirSync(folder)).toEqual([name]);
  });
});

describe('a path that cannot be written is wrong usage before any work', () => {
  it.each([
    ['a directory that does not exist', 'no/such.json', 'cannot-open-output'],
    ['a directory', '.', 'output-is-directory'],
    ['a path through a file', 'input.csv/x', 'cannot-open-output'],
    ['the file that holds the counts', 'input.csv', 'output-is-input'],
    ['a link to it', 'link.csv', 'output-is-input'],
  ])('%s', async (_case, name, code) => {
    writeFileSync(at('input.csv'), 'counts');
    symlinkSync(at('input.csv'), at('link.csv'));
    const problem = await problemOf(() => toFile(at(name), at('input.csv')));
    expect(problem).toMatchObject({ kind: 'usage', code, place: '--output' });
    expect(readFileSync(at('input.csv'), 'utf8')).toBe('counts');
  });
});
