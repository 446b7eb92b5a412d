// Peak memory of a sampled run must depend on a table's shape, not on its total: a 2x5 of total 10^9 against the same shape
// with total 100, whole process. Target: within 10 MB. Needs a build (npm run build).
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';

const bin = join(import.meta.dirname, '../../bin/keepsum.js');
const runs = 5;
const small = ['3,4,5,6,2', '20,25,20,10,5'];
const large = small.map((row) =>
  row
    .split(',')
    .map((count) => Number(count) * 1e7)
    .join(),
);

/** Runs the command in a process of its own that prints its peak, in megabytes, on standard error at the end. */
function peak(rows: readonly string[]): number {
  const words = ['test', ...rows, '--method', 'sample', '--draws', '200000', '--seed', 'm', '--threads', '1'];
  const code =
    `process.argv.splice(1, 0, ${JSON.stringify(bin)}); process.on('exit', () => ` +
    `process.stderr.write(String(process.resourceUsage().maxRSS / 1024))); await import(${JSON.stringify(bin)});`;
  const { stderr, status } = spawnSync(process.execPath, ['--input-type=module', '-e', code, ...words], {
    encoding: 'utf8',
  });
  if (status !== 0) throw new Error(stderr);
  return Number(stderr);
}

const median = (values: number[]): number => values.sort((a, b) => a - b)[values.length >> 1]!;

export function benchMemory(print: (line: string) => void): void {
  const peaks: [number[], number[]] = [[], []];
  for (let run = 0; run < runs; run++) {
    peaks[0].push(peak(small));
    peaks[1].push(peak(large));
  }
  const [of100, of1e9] = [median(peaks[0]), median(peaks[1])];
  print(`memory: peak ${of100.toFixed(1)} MB for a total of 100, ${of1e9.toFixed(1)} MB for 10^9 (target: within 10)`);
}

if (process.argv[1] === import.meta.filename) benchMemory((line) => console.log(line));
