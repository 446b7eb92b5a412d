// How long the smallest whole run takes, against a Node that does nothing; medians of runs that take turns, so that
// a busy moment of the machine hits all alike. Target: at most 2.2 times. Needs a build (npm run build).
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';

const rounds = Number(process.argv[2] ?? 41);
const target = 2.2;
const root = join(import.meta.dirname, '../..');
const bin = join(root, 'bin/keepsum.js');
const bare = 'node -e 0';

const contestants: Record<string, readonly string[]> = {
  [bare]: ['-e', '0'],
  'keepsum test 8,2 1,9': [bin, 'test', '8,2', '1,9'],
  'keepsum test 8,2 1,9 --format json': [bin, 'test', '8,2', '1,9', '--format', 'json'],
  'keepsum test 8,2 1,9 --method sample': [bin, 'test', '8,2', '1,9', '--method', 'sample'],
  'keepsum test fixtures/demo/orchid-forms.tsv': [bin, 'test', join(root, 'fixtures/demo/orchid-forms.tsv')],
  'keepsum --version': [bin, '--version'],
};

const times = new Map<string, number[]>(Object.keys(contestants).map((name) => [name, []]));
for (let round = 0; round < rounds; round++) {
  for (const [name, words] of Object.entries(contestants)) {
    const began = process.hrtime.bigint();
    const { status } = spawnSync(process.execPath, words, { stdio: ['ignore', 'pipe', 'pipe'] });
    times.get(name)!.push(Number(process.hrtime.bigint() - began) / 1e6);
    if (status !== 0) throw new Error(`${name} ended with ${String(status)}`);
  }
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

const base = median(times.get(bare)!);
console.log(`median of ${rounds} runs, ms, and times ${bare}`);
for (const [name, values] of times) {
  console.log(`${median(values).toFixed(1).padStart(8)}  ${(median(values) / base).toFixed(2)}  ${name}`);
}
const ratio = median(times.get('keepsum test 8,2 1,9')!) / base;
console.log(`keepsum test 8,2 1,9: ${ratio.toFixed(2)} times, target at most ${target}`);
if (ratio > target) process.exitCode = 1;
