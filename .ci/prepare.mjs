// Runs after `npm ci` and before packing: builds the command, so that a clone works at once.
// Without the development packages there is no compiler; say so instead of failing obscurely.
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

if (!existsSync('node_modules/vite') || !existsSync('node_modules/typescript')) {
  console.error('keepsum is not built: the development packages are missing (NODE_ENV=production or --omit=dev?).');
  console.error('hint: run `npm ci --include=dev`, or install the packed tarball, which holds the built command.');
  process.exitCode = existsSync('dist/main.js') ? 0 : 1;
} else {
  // Quiet unless it fails: standard output belongs to whoever asked, such as `npm pack --json`.
  const { status, stdout } = spawnSync('npm', ['run', '--silent', 'build'], {
    stdio: ['ignore', 'pipe', 'inherit'],
    encoding: 'utf8',
  });
  if (status !== 0) console.error(stdout);
  process.exitCode = status ?? 1;
}
