// Bytes of a file or of standard input, in pieces as they come, and what is wrong when there are none.
import { createReadStream } from 'node:fs';
import { readdir } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { dataProblem, type Problem } from '../../problem/problem.js';
import { nearest } from '../../problem/suggest.js';

/** Pieces as they come; a failure, at the start or half-way, is a Problem (data) that names the path. */
export async function* fileBytes(path: string): AsyncGenerator<Uint8Array> {
  try {
    for await (const piece of createReadStream(path)) yield piece as Uint8Array;
  } catch (thrown) {
    throw await unreadable(path, thrown);
  }
}

async function unreadable(path: string, thrown: unknown): Promise<unknown> {
  const code = (thrown as NodeJS.ErrnoException).code;
  if (code === undefined) return thrown;
  if (code === 'ENOENT') return noSuchFile(path);
  if (code === 'EISDIR') {
    return dataProblem({
      code: 'directory-as-file',
      message: 'this is a directory, not a file of counts',
      place: path,
      hint: 'name one file in it',
    });
  }
  return dataProblem({
    code: 'unreadable-file',
    message: `the file cannot be read (${code})`,
    place: path,
    hint:
      code === 'EACCES' || code === 'EPERM'
        ? 'ask for the right to read it, or copy it to where you have that right'
        : 'check the path, and that the disk it stands on is well',
  });
}

async function noSuchFile(path: string): Promise<Problem> {
  const directory = dirname(path);
  const names = await readdir(directory).catch(() => undefined);
  const close = names === undefined ? undefined : nearest(basename(path), names);
  return dataProblem({
    code: 'no-such-file',
    message: 'there is no such file',
    place: path,
    hint: hintForMissing(path, directory, names !== undefined, close),
  });
}

function hintForMissing(path: string, directory: string, directoryExists: boolean, close: string | undefined): string {
  if (!directoryExists) return `there is no directory "${directory}" either; check how it is spelled`;
  if (close !== undefined) return `did you mean ${directory === '.' ? close : join(directory, close)}?`;
  if (/^[^/]*[0-9][;,. ]/.test(path))
    return 'if a row of counts was meant: whole numbers with commas between, as in 8,2';
  return 'give the path of a file, rows of counts such as 8,2 1,9, or - for standard input';
}
