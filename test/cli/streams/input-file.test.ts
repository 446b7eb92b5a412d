import { Readable } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { fileBytes, isPlainFile, pieces, whole } from '../../../src/cli/streams/input-file.js';
import { problemOf } from '../problem-of.js';

describe('bytes of a file or a stream', () => {
  it('are all there, in their order', async () => {
    const stream = Readable.from([Buffer.from('8,2\n'), Buffer.from('1,9\n')]);
    expect(Buffer.from(await whole(pieces(stream, 'x'), 'x')).toString()).toBe('8,2\n1,9\n');
  });

  it('that never end are refused instead of filling the memory', async () => {
    const megabyte = Buffer.alloc(2 ** 20);
    const endless = Readable.from(
      (function* () {
        for (;;) yield megabyte;
      })(),
    );
    const problem = await problemOf(() => whole(pieces(endless, 'standard input'), 'standard input'));
    expect(problem).toMatchObject({ kind: 'data', code: 'input-too-long', place: 'standard input' });
    expect(problem.hint).toContain('--rows COLUMN --columns COLUMN');
    expect(endless.destroyed).toBe(true);
  });

  it.each([
    ['no-such-file', 'package.jsn', 'did you mean package.json?'],
    ['no-such-file', 'src/cli/mian.ts', 'did you mean src/cli/main.ts?'],
    ['no-such-file', 'no/such.csv', 'there is no directory "no" either'],
    ['directory-as-file', 'src', 'name one file in it'],
    ['unreadable-file', 'package.json/x', 'check the path'],
  ])('that cannot be had: %s %s', async (code, path, hint) => {
    const problem = await problemOf(() => whole(fileBytes(path), path));
    expect(problem).toMatchObject({ kind: 'data', code, place: path });
    expect(problem.hint).toContain(hint);
  });

  it('can be read twice from a plain file only', async () => {
    expect(await Promise.all(['package.json', 'src', '/dev/null', 'no-such'].map(isPlainFile))).toEqual([
      true,
      false,
      false,
      false,
    ]);
  });
});
