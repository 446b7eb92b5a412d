// Speed and memory of reading raw records. A million of them are written to a temporary file at run time; keepsum's reader
// is timed against a bare `for await` over csv-parse's array rows of the same file, in turns, in the same run. Bound: 1.5.
// Other work on the machine can only add time, so the fastest of the turns is the fairest measure; the median stands beside it.
import { createReadStream, createWriteStream } from 'node:fs';
import { mkdtemp, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { once } from 'node:events';
import { pathToFileURL } from 'node:url';
import { parse } from 'csv-parse';
import { readRecords } from '../../src/input/records.js';

const million = 1_000_000;
const turns = 5;
const wards = ['north', 'south', 'east', 'west', 'north-east', 'day clinic'];
const outcomes = ['healed', 'open', 'lost to follow-up'];

/** Five columns, two of them counted, a few values missing; the same file every time (Lehmer 1951, multiplier 48271). */
async function writeRecords(path: string, records: number): Promise<void> {
  const file = createWriteStream(path);
  let state = 20240601;
  const below = (limit: number): number => (state = (state * 48271) % 2147483647) % limit;
  file.write('case,ward,age,outcome,"remark, if any"\n');
  for (let at = 0; at < records; at += 10_000) {
    let text = '';
    for (let record = at; record < Math.min(at + 10_000, records); record++) {
      const outcome = below(50) === 0 ? 'NA' : outcomes[below(3)]!;
      text += `${record},${wards[below(6)]!},${18 + below(80)},${outcome},"seen ${below(9)} times"\n`;
    }
    if (!file.write(text)) await once(file, 'drain');
  }
  file.end();
  await once(file, 'finish');
}

async function bare(path: string): Promise<number> {
  let records = 0;
  for await (const record of createReadStream(path).pipe(parse({ bom: true })))
    records += (record as string[]).length > 0 ? 1 : 0;
  return records;
}

async function ours(path: string): Promise<number> {
  const read = await readRecords(createReadStream(path), {
    rows: 'ward',
    columns: 'outcome',
    missing: 'drop',
    sourceName: 'records.csv',
  });
  return read.missing!.records + 1;
}

async function seconds(run: () => Promise<number>, expected: number): Promise<number> {
  const start = performance.now();
  const records = await run();
  if (records !== expected) throw new Error(`${records} records read, not ${expected}`);
  return (performance.now() - start) / 1000;
}

const median = (values: number[]): number => values.sort((a, b) => a - b)[Math.floor(values.length / 2)]!;

/** Highest memory of the process while reading, in megabytes above what it was before. */
async function memoryGrowth(path: string): Promise<number> {
  globalThis.gc?.();
  const before = process.memoryUsage().rss;
  let peak = before;
  const watch = setInterval(() => (peak = Math.max(peak, process.memoryUsage().rss)), 5);
  await ours(path);
  clearInterval(watch);
  return (peak - before) / 2 ** 20;
}

/** Prints the ratios of times, and the growth of memory for a tenth of the records and for all of them. */
export async function benchRecords(print: (line: string) => void): Promise<void> {
  const folder = await mkdtemp(join(tmpdir(), 'keepsum-bench-'));
  try {
    const [large, small] = [join(folder, 'million.csv'), join(folder, 'tenth.csv')];
    await writeRecords(large, million);
    await writeRecords(small, million / 10);
    const times: { bare: number[]; ours: number[] } = { bare: [], ours: [] };
    await seconds(() => ours(small), million / 10 + 1);
    const growth = [await memoryGrowth(small), await memoryGrowth(large)];
    for (let turn = 0; turn < turns; turn++) {
      times.bare.push(await seconds(() => bare(large), million + 1));
      times.ours.push(await seconds(() => ours(large), million + 1));
    }
    const size = ((await stat(large)).size / 2 ** 20).toFixed(0);
    print(
      `records: a million (${size} MB), medians of ${turns}: bare iteration ${median(times.bare).toFixed(2)} s, keepsum ${median(times.ours).toFixed(2)} s`,
    );
    print(
      `records: ratio of the fastest ${(Math.min(...times.ours) / Math.min(...times.bare)).toFixed(2)}, of the medians ${(median(times.ours) / median(times.bare)).toFixed(2)} (bound 1.5)`,
    );
    print(
      `records: memory grows by ${growth[0]!.toFixed(0)} MB for 100,000 records, by ${growth[1]!.toFixed(0)} MB for 1,000,000`,
    );
  } finally {
    await rm(folder, { recursive: true });
  }
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  await benchRecords((line) => console.log(line));
}
