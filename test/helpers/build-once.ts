// Before the tests of the real command: builds dist, once per run, if anything it is made from is newer.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

const madeFrom = ['src', 'package.json', 'tsconfig.json', '.config/vite.config.ts', '.config/tsconfig.types.json'];

const newest = (path: string): number =>
  statSync(path).isDirectory()
    ? Math.max(statSync(path).mtimeMs, ...readdirSync(path).map((name) => newest(join(path, name))))
    : statSync(path).mtimeMs;

/** The last file that a build writes. */
const built = 'dist/types/index.d.ts';

export default function setup(): void {
  const since = existsSync('dist/main.js') && existsSync(built) ? statSync(built).mtimeMs : 0;
  if (Math.max(...madeFrom.map(newest)) <= since) return;
  const { status, stdout, stderr } = spawnSync('npm', ['run', '--silent', 'build'], { encoding: 'utf8' });
  if (status !== 0) throw new Error(`the build that these tests run failed:\n${stdout}${stderr}`);
}
