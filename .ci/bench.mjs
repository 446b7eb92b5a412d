// Runs every benchmark under test/bench, one after the other so that none disturbs another, or only those named.
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';

const wanted = process.argv.slice(2);
const files = readdirSync('test/bench')
  .filter((name) => name.endsWith('.bench.ts'))
  .filter((name) => wanted.length === 0 || wanted.some((word) => name.includes(word)))
  .sort();

for (const file of files) {
  console.log(`\n# ${file}`);
  const { status } = spawnSync(process.execPath, ['--import', 'tsx', `test/bench/${file}`], { stdio: 'inherit' });
  if (status !== 0) process.exitCode = 1;
}
