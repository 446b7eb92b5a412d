// A report's file: tried before the work starts, so that a bad path fails at once, and put in place only when whole.
import { randomBytes } from 'node:crypto';
import { access, chmod, constants, open, realpath, rename, stat, unlink } from 'node:fs/promises';
import type { Stats } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { dataProblem, usageProblem, type Problem } from '../../problem/problem.js';

/** Text, at once or piece by piece, or the bytes of a picture. */
type Content = string | Uint8Array | AsyncIterable<string>;

export interface FileDestination {
  write(content: Content): Promise<unknown>;
}

/**
 * Checks that the file can be made, without leaving a trace; `write` then replaces it in one step, so that a run that
 * dies half-way leaves the old file. Devices and pipes are written to as they are.
 * @throws Problem (usage): `output-is-input`, `output-is-directory`, `cannot-open-output`.
 */
export async function toFile(path: string, inputPath: string | null, option = '--output'): Promise<FileDestination> {
  try {
    const target = await realpath(path).catch(() => path);
    const existing = await stat(target).catch(() => undefined);
    if (existing?.isDirectory()) throw isDirectory(path, option);
    if (inputPath !== null && existing !== undefined && (await sameFile(existing, inputPath)))
      throw isInput(path, option);
    if (existing !== undefined) await access(target, constants.W_OK);
    if (existing !== undefined && !existing.isFile()) return { write: (text) => writePlainly(target, path, text) };
    await unlink(await emptyNeighbour(target));
    return { write: (text) => replace(target, path, existing, text) };
  } catch (thrown) {
    throw cannotOpen(path, thrown, option);
  }
}

/** An empty file of ours in the same directory, so that renaming it over the target stays on one disk. */
async function emptyNeighbour(target: string): Promise<string> {
  const name = join(dirname(target), `.keepsum-${randomBytes(6).toString('hex')}`);
  await (await open(name, 'wx')).close();
  return name;
}

async function replace(target: string, path: string, existing: Stats | undefined, text: Content): Promise<void> {
  let temporary: string | undefined;
  try {
    temporary = await emptyNeighbour(target);
    if (existing !== undefined) await chmod(temporary, existing.mode);
    await writeWhole(temporary, text);
    await rename(temporary, target);
  } catch (thrown) {
    if (temporary !== undefined) await unlink(temporary).catch(() => undefined);
    throw cannotWrite(path, thrown);
  }
}

async function writePlainly(target: string, path: string, text: Content): Promise<void> {
  try {
    await writeWhole(target, text);
  } catch (thrown) {
    throw cannotWrite(path, thrown);
  }
}

async function writeWhole(path: string, text: Content): Promise<void> {
  const file = await open(path, constants.O_WRONLY);
  try {
    if (typeof text === 'string' || text instanceof Uint8Array) await file.writeFile(text);
    else for await (const piece of text) await file.appendFile(piece);
  } finally {
    await file.close();
  }
}

async function sameFile(one: Stats, path: string): Promise<boolean> {
  const other = await stat(path).catch(() => undefined);
  return other !== undefined && other.isFile() && other.dev === one.dev && other.ino === one.ino;
}

const isDirectory = (path: string, option: string): Problem =>
  usageProblem({
    code: 'output-is-directory',
    message: `"${path}" is a directory`,
    place: option,
    hint: `name a file in it, such as ${join(path, 'result.json')}`,
  });

const isInput = (path: string, option: string): Problem =>
  usageProblem({
    code: 'output-is-input',
    message: `"${path}" is the file the counts come from`,
    place: option,
    hint: 'name another file; the counts would be overwritten by the report',
  });

const cannotOpen = (path: string, thrown: unknown, option: string): unknown => {
  const code = (thrown as NodeJS.ErrnoException).code;
  if (thrown instanceof Error && 'exitStatus' in thrown) return thrown;
  return usageProblem({
    code: 'cannot-open-output',
    message: `"${path}" cannot be written (${String(code ?? thrown)})`,
    place: option,
    hint:
      code === 'ENOENT'
        ? `make the directory "${dirname(path)}" first, or check how it is spelled`
        : `check that you may write in "${dirname(path)}", or name another file than ${basename(path)}`,
  });
};

const cannotWrite = (path: string, thrown: unknown): Problem =>
  dataProblem({
    code: 'cannot-write',
    message: `the result could not be written to "${path}" (${String((thrown as NodeJS.ErrnoException).code ?? thrown)})`,
    place: '--output',
    hint: 'check that the disk has room; the old file, if there was one, is as it was',
  });
