// `pearson` draws, whole process on both sides, against base R's compiled simulation (chisq.test, simulate.p.value) in the same
// run; runs take turns, so that a busy moment of the machine hits all alike. Needs a build (npm run build) and Rscript (Debian
// package r-base-core), which serves as a reference calculator only. Beside them: this process, warm, by the draw.
// Arguments: rounds (default 5), draws (default 1,000,000). Targets, for 10^7 draws: half of base R's time on one
// thread, three tenths on two.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { orderingFor } from '../../src/null/ordering.js';
import { blockSize } from '../../src/null/sampled/limits.js';
import { prepareSampler } from '../../src/null/sampled/sample-cuts.js';
import { blockStream } from '../../src/random/stream.js';
import { pearson } from '../../src/statistic/pearson.js';
import { liveTable } from '../../src/table/live-table.js';
import { makeTable } from '../../src/table/table.js';

const rounds = Number(process.argv[2] ?? 5);
const draws = Number(process.argv[3] ?? 1_000_000);
const targets = { 1: 0.5, 2: 0.3 } as const;

const tables: Record<string, string> = {
  '4x4 of 592': '68,20,15,5 119,84,54,29 26,17,14,14 7,94,10,16',
  '2x5 of 28,000, a row of 24': '9,3,6,2,4 11000,5200,7300,1900,2576',
  '4x5 of 29': '3,1,2,0,2 1,4,0,2,1 0,1,3,1,2 2,0,1,1,2',
  '3x3 of 45,000': '7600,4500,3000 6900,4600,3200 7300,4700,3200',
};

const bin = join(import.meta.dirname, '../../bin/keepsum.js');
const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

function time(command: string, words: readonly string[]): number {
  const began = process.hrtime.bigint();
  const { status, error, stderr } = spawnSync(command, words, { stdio: ['ignore', 'ignore', 'pipe'] });
  if (error !== undefined || status !== 0)
    throw new Error(`${command} ended with ${String(status)}: ${String(stderr)}`);
  return Number(process.hrtime.bigint() - began) / 1e6;
}

/** Nanoseconds a draw in this process: median over blocks, after a warm-up. */
function warm(counts: number[][]): number {
  const live = liveTable(makeTable({ counts }));
  const bound = pearson.bind(live, { groups: 'rows', event: 0, first: 0 });
  const sampler = prepareSampler(live, [orderingFor(live, bound, 'upper')]);
  const times = Array.from({ length: 400 }, (_, block) => {
    const stream = blockStream('bench', '', block);
    const began = process.hrtime.bigint();
    sampler.countBlock(stream, blockSize);
    return Number(process.hrtime.bigint() - began) / blockSize;
  });
  return median(times.slice(100));
}

const hasR = spawnSync('Rscript', ['--version'], { stdio: 'ignore' }).status === 0;
if (!hasR) console.log('Rscript is not installed (Debian package r-base-core): the comparison is left out');

console.log(
  `${draws} pearson draws; medians of ${rounds} rounds; targets on one thread ${targets[1]}, on two ${targets[2]}`,
);
for (const [name, text] of Object.entries(tables)) {
  const rows = text.split(' ');
  const counts = rows.map((row) => row.split(',').map(Number));
  const inProcess = `${warm(counts).toFixed(0)} ns a draw when warm`;
  if (!hasR) {
    console.log(`${name}: ${inProcess}`);
    continue;
  }
  const ours = { 1: [] as number[], 2: [] as number[] };
  const theirs: number[] = [];
  const matrix = `matrix(c(${counts.flat().join()}), ${counts.length}, byrow = TRUE)`;
  const script = `invisible(chisq.test(${matrix}, simulate.p.value = TRUE, B = ${draws}))`;
  const words = [bin, 'test', ...rows, '--method', 'sample', '--draws', String(draws), '--seed', 'bench'];
  for (let round = 0; round < rounds; round++) {
    for (const threads of [1, 2] as const) {
      ours[threads].push(time(process.execPath, [...words, '--threads', String(threads)]));
    }
    theirs.push(time('Rscript', ['-e', script]));
  }
  const base = median(theirs);
  const found = ([1, 2] as const).map((threads) => {
    const ratio = median(ours[threads]) / base;
    if (draws >= 1e7 && ratio > targets[threads]) process.exitCode = 1;
    return `${threads === 1 ? 'one thread' : 'two'} ${median(ours[threads]).toFixed(0)} ms (${ratio.toFixed(2)})`;
  });
  console.log(`${name}: base R ${base.toFixed(0)} ms, ${found.join(', ')}; ${inProcess}`);
}
