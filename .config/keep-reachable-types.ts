// Part of the build: of the declarations that the compiler wrote, only those that the library's own lead to are shipped.
import { existsSync, readdirSync, readFileSync, rmSync, rmdirSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';

const folder = resolve('dist/types');
const kept = new Set<string>();

function keep(path: string): void {
  if (kept.has(path)) return;
  kept.add(path);
  for (const [, from] of readFileSync(path, 'utf8').matchAll(/(?:from |import\()['"](\.[^'"]+)\.js['"]/g)) {
    const next = resolve(dirname(path), `${from!}.d.ts`);
    if (!existsSync(next)) throw new Error(`${path} leads to ${next}, which is not there`);
    keep(next);
  }
}

keep(join(folder, 'index.d.ts'));

function prune(place: string): void {
  for (const entry of readdirSync(place, { withFileTypes: true })) {
    const path = join(place, entry.name);
    if (entry.isDirectory()) prune(path);
    else if (!kept.has(path)) rmSync(path);
  }
  if (readdirSync(place).length === 0) rmdirSync(place);
}

prune(folder);
