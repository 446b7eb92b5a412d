// Exact p of r x c tables, whole process, against base R's fisher.test in the same run, taking turns; fastest and median of
// the turns (other work on the machine can only add time). Target: probability within a third of base R, the other
// statistics within three times probability. Needs a build (npm run build); says so when Rscript is not installed.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

const turns = Number(process.argv[2] ?? 5);
const bin = join(import.meta.dirname, '../../bin/keepsum.js');

const tables = [
  '23,12,30,8,11,8,12,28,17,13 13,12,34,3,3,2,6,24,19,22',
  '2,1,0,0,0,0 0,1,0,0,0,4 1,2,1,1,2,4 7,0,3,0,2,1 1,1,3,2,2,5 2,2,2,1,5,2',
  '2,6,0,18,30 2,12,12,20,38 3,4,2,19,32',
  '65,17,72,154 33,10,38,86 28,11,22,64',
  '4,4,10,6,3 6,0,3,0,1 9,2,6,4,7 7,5,4,6,3',
  '3,3,10,5,5,7 2,3,2,3,8,5 9,12,11,14,11,7',
] as const;
const statistics = ['probability', 'likelihood-ratio', 'pearson'] as const;
/** More partial sums than an answer in seconds allows: listed apart, once. */
const tooMany = (table: string, statistic: string): boolean => table === tables[1] && statistic === 'pearson';

const ours = (table: string, statistic: string): readonly string[] => [
  process.execPath,
  bin,
  'test',
  ...table.split(' '),
  '--statistic',
  statistic,
  '--method',
  'exact',
  '--format',
  'json',
];

const theirs = (table: string): readonly string[] => [
  'Rscript',
  '-e',
  `t <- do.call(rbind, lapply(strsplit(strsplit("${table}", " ")[[1]], ","), as.numeric)); ` +
    'cat(format(fisher.test(t, workspace = 2e8)$p.value, digits = 15))',
];

function run([command, ...words]: readonly string[]): { seconds: number; output: string } {
  const began = process.hrtime.bigint();
  const { status, stdout } = spawnSync(command!, words, { stdio: ['ignore', 'pipe', 'ignore'], encoding: 'utf8' });
  if (status !== 0) throw new Error(`${command!} ${words.slice(0, 3).join(' ')} ended with ${String(status)}`);
  return { seconds: Number(process.hrtime.bigint() - began) / 1e9, output: stdout };
}

const fastest = (values: readonly number[]): number => Math.min(...values);
const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

/** Prints one line per table and statistic: seconds, ratio to base R, ratio to our own probability, p. */
export function benchExact(print: (line: string) => void): void {
  const hasR = spawnSync('Rscript', ['-e', '1'], { stdio: 'ignore' }).status === 0;
  if (!hasR) print('exact: Rscript is not installed, so there is nothing to compare with; our own times follow');
  for (const table of tables) {
    const contestants = new Map<string, readonly string[]>(
      statistics.filter((name) => !tooMany(table, name)).map((name) => [name, ours(table, name)]),
    );
    if (hasR) contestants.set('base R', theirs(table));
    const times = new Map([...contestants.keys()].map((name) => [name, [] as number[]]));
    const outputs = new Map<string, string>();
    for (let turn = 0; turn < turns; turn++) {
      for (const [name, words] of contestants) {
        const { seconds, output } = run(words);
        times.get(name)!.push(seconds);
        outputs.set(name, output);
      }
    }
    print(`exact: ${table}`);
    for (const [name, values] of times) {
      const p = name === 'base R' ? outputs.get(name)! : String(pOf(outputs.get(name)!));
      const against = (other: string): string =>
        times.has(other)
          ? `${(fastest(values) / fastest(times.get(other)!)).toFixed(2)} (${(median(values) / median(times.get(other)!)).toFixed(2)})`
          : '-';
      print(
        `  ${name.padEnd(16)} ${fastest(values).toFixed(3)} s (median ${median(values).toFixed(3)})  ` +
          `to base R ${against('base R')}  to probability ${against('probability')}  p ${p}`,
      );
    }
  }
}

const pOf = (json: string): number => (JSON.parse(json) as { pValues: { p: number }[] }).pValues[0]!.p;

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  benchExact((line) => console.log(line));
}
