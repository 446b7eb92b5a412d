// Many tables through the built command, as whole processes: wall seconds, processor seconds and peak memory. Other work on the machine
// stretches the wall seconds; processor seconds say what the run itself took.
//   1. 100,000 exact 2x2 tables from lines, compact lines out (target: 4 s on two free cores), and a million of them: memory is flat.
//   2. A long file of records, the rows of a key adjacent: memory by the number of its keys.
//   3. 10,000 4x4 tables of 10,000 draws each, on one thread and on two (target: 1.8 times as fast on two free cores).
import { spawn } from 'node:child_process';
import { createWriteStream, mkdtempSync, rmSync } from 'node:fs';
import { once } from 'node:events';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { performance } from 'node:perf_hooks';

const bin = resolve(import.meta.dirname, '../../bin/keepsum.js');
const folder = mkdtempSync(join(tmpdir(), 'keepsum-bench-'));
const turns = 3;

/** Lehmer (1951), multiplier 48271: the same tables every time. */
function below(): (limit: number) => number {
  let state = 20240601;
  return (limit) => (state = (state * 48271) % 2147483647) % limit;
}

async function write(name: string, number: number, line: (k: number) => string, head = ''): Promise<string> {
  const path = join(folder, name);
  const file = createWriteStream(path);
  file.write(head);
  for (let k = 0; k < number; k += 10_000) {
    const text = Array.from({ length: Math.min(10_000, number - k) }, (_, j) => line(k + j)).join('');
    if (!file.write(text)) await once(file, 'drain');
  }
  file.end();
  await once(file, 'finish');
  return path;
}

interface Cost {
  readonly wall: number;
  readonly processor: number;
  readonly megabytes: number;
}

/** The last words of the process say what it took, all its threads together. */
const lastWords = `process.on('exit', () => {
  const { userCPUTime, systemCPUTime, maxRSS } = process.resourceUsage();
  process.stderr.write('\\n' + JSON.stringify([(userCPUTime + systemCPUTime) / 1e6, maxRSS / 1024]));
})`;

async function cost(...words: string[]): Promise<Cost> {
  const start = performance.now();
  const node = ['--import', `data:text/javascript,${encodeURIComponent(lastWords)}`, bin, 'batch', ...words, '--quiet'];
  const child = spawn(process.execPath, node, { stdio: ['ignore', 'ignore', 'pipe'] });
  let err = '';
  child.stderr.setEncoding('utf8').on('data', (piece: string) => (err += piece));
  const [status] = (await once(child, 'close')) as [number | null];
  if (status !== 0) throw new Error(`keepsum batch ended with ${status}: ${err}`);
  const [processor, megabytes] = JSON.parse(err.slice(err.lastIndexOf('\n'))) as [number, number];
  return { wall: (performance.now() - start) / 1000, processor, megabytes };
}

const shown = ({ wall, processor, megabytes }: Cost): string =>
  `${wall.toFixed(1)} s wall, ${processor.toFixed(1)} s processor, ${megabytes.toFixed(0)} MB at most`;

/** The run with the least processor time: other work can only add to it. */
async function best(...words: string[]): Promise<Cost> {
  const costs: Cost[] = [];
  for (let turn = 0; turn < turns; turn++) costs.push(await cost(...words));
  return costs.reduce((least, one) => (one.processor < least.processor ? one : least));
}

async function benchLines(print: (line: string) => void): Promise<void> {
  const next = below();
  const line = (k: number): string =>
    `{"key":"t${k}","counts":[[${next(40) + 1},${next(60) + 1}],[${next(30) + 1},${next(80) + 1}]]}\n`;
  const some = await write('some.ndjson', 100_000, line);
  const many = await write('many.ndjson', 1_000_000, line);
  for (const threads of ['1', '2']) {
    print(`batch: 100,000 exact 2x2, ${threads} threads: ${shown(await best(some, '--threads', threads))} (bound 4 s on two free cores)`); // prettier-ignore
  }
  for (const threads of ['1', '2']) {
    print(`batch: 1,000,000 exact 2x2, ${threads} threads: ${shown(await cost(many, '--threads', threads))}`);
  }
}

async function benchRecords(print: (line: string) => void): Promise<void> {
  const next = below();
  const row = (k: number): string =>
    `${Math.floor(k / 4)},${k % 4 < 2 ? 'a' : 'b'},${k % 2 ? 'yes' : 'no'},${1 + next(30)}\n`;
  for (const keys of [1000, 100_000, 300_000]) {
    const path = await write(`keys-${keys}.csv`, 4 * keys, row, 'key,group,event,n\n');
    const found = await cost(path, '--by', 'key', '--rows', 'group', '--columns', 'event', '--count', 'n');
    print(`batch: records of ${keys.toLocaleString('en')} adjacent keys: ${shown(found)}`);
  }
}

async function benchDraws(print: (line: string) => void): Promise<void> {
  const next = below();
  const cells = (): string => Array.from({ length: 4 }, () => 1 + next(20)).join();
  const path = await write('drawn.ndjson', 10_000, () => `{"counts":[[${cells()}],[${cells()}],[${cells()}],[${cells()}]]}\n`); // prettier-ignore
  const drawn = [path, '--method', 'sample', '--draws', '10000', '--seed', 'bench'];
  const one = await cost(...drawn, '--threads', '1');
  const two = await cost(...drawn, '--threads', '2');
  print(`batch: 10,000 4x4 of 10,000 draws, 1 thread: ${shown(one)}`);
  print(`batch: 10,000 4x4 of 10,000 draws, 2 threads: ${shown(two)}; ${(one.wall / two.wall).toFixed(2)} times as fast by the wall (bound 1.8), processor time grew ${(two.processor / one.processor).toFixed(2)} times`); // prettier-ignore
}

const print = (line: string): void => console.log(line);
try {
  await benchLines(print);
  await benchRecords(print);
  await benchDraws(print);
} finally {
  rmSync(folder, { recursive: true });
}
