// The path that was perhaps meant: each part that is not there is replaced by a name beside it that is spelled much like it.
import { readdir, stat } from 'node:fs/promises';
import { isAbsolute, join, normalize, sep } from 'node:path';
import { nearest } from '../../problem/suggest.js';

/** @returns a path that exists, or undefined where some part has no name near it. */
export async function nearPath(path: string): Promise<string | undefined> {
  let found = isAbsolute(path) ? sep : '';
  for (const part of normalize(path).split(sep)) {
    if (part === '') continue;
    const next = join(found, part);
    if (await exists(next)) {
      found = next;
      continue;
    }
    const names = await readdir(found === '' ? '.' : found).catch(() => []);
    const close = nearest(part, names);
    if (close === undefined) return undefined;
    found = join(found, close);
  }
  return found;
}

const exists = (path: string): Promise<boolean> =>
  stat(path).then(
    () => true,
    () => false,
  );
