// Bytes of a file or of standard input, in pieces as they come, and what is wrong when there are none.
import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import type { Readable } from 'node:stream';
import { dirname } from 'node:path';
import { dataProblem, type Problem } from '../../problem/problem.js';

/** A failure, at the start or half-way, is a Problem (data) that names the path. */
export const fileBytes = (path: string): AsyncIterable<Uint8Array> => pieces(createReadStream(path), path);

/** @param name how places name the stream; a directory can stand here too: `keepsum test < folder` */
export async function* pieces(stream: Readable, name: string): AsyncGenerator<Uint8Array> {
  try {
    for await (const piece of stream) yield piece as Uint8Array;
  } catch (thrown) {
    throw await unreadable(name, thrown);
  }
}

/** Only a plain file can be read a second time; a pipe has been emptied. */
export const isPlainFile = (path: string): Promise<boolean> =>
  stat(path).then(
    (facts) => facts.isFile(),
    () => false,
  );

/** Bytes of a plain file; undefined for anything else. */
export const plainSize = (path: string): Promise<number | undefined> =>
  stat(path).then(
    (facts) => (facts.isFile() ? facts.size : undefined),
    () => undefined,
  );

/** Far beyond any table of counts, and small enough to hold. */
const mostBytes = 64 * 2 ** 20;

/** All of it at once. @throws Problem (data) `input-too-long` beyond 64 MB. */
export async function whole(all: AsyncIterable<Uint8Array>, name: string): Promise<Uint8Array> {
  const kept: Uint8Array[] = [];
  let length = 0;
  for await (const piece of all) {
    kept.push(piece);
    length += piece.length;
    if (length > mostBytes) throw tooLong(name);
  }
  return Buffer.concat(kept);
}

const tooLong = (name: string): Problem =>
  dataProblem({
    code: 'input-too-long',
    message: 'there is no end after 64 MB, which is too long for a table of counts',
    place: name,
    hint: 'if it holds raw records, add --rows COLUMN --columns COLUMN: they are counted as they are read',
  });

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
  const directoryExists = await stat(directory).then(
    (facts) => facts.isDirectory(),
    () => false,
  );
  const close = await (await import('./near-path.js')).nearPath(path);
  return dataProblem({
    code: 'no-such-file',
    message: 'there is no such file',
    place: path,
    hint: hintForMissing(path, directory, directoryExists, close),
  });
}

function hintForMissing(path: string, directory: string, directoryExists: boolean, close: string | undefined): string {
  if (close !== undefined) return `did you mean ${close}?`;
  if (!directoryExists) return `there is no directory "${directory}" either; check how it is spelled`;
  if (/^[^/]*[0-9][;,. ]/.test(path))
    return 'if a row of counts was meant: whole numbers with commas between, as in 8,2';
  return 'give the path of a file, rows of counts such as 8,2 1,9, or - for standard input';
}
