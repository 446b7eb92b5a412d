// The map of the reach: for a range of shapes and totals, how long an exact p takes, whole process, processor time of one core.
// Tables are drawn at random from the null with even margins (a fixed seed), so p lies anywhere between 0 and 1.
import { spawnSync } from 'node:child_process';
import { resolve } from 'node:path';
import { drawTables } from '../../src/draw-tables.js';
import { cornerTable, spreadTotals } from '../helpers/margins.js';
import { makeTable } from '../../src/table/table.js';

const bin = resolve(import.meta.dirname, '../../bin/keepsum.js');
/** About thirty seconds. */
const effort = '1e9';

const shapes: [number, number, number[]][] = [
  [2, 5, [200, 1000, 5000, 20_000]],
  [2, 10, [100, 500, 2000, 5000]],
  [2, 20, [60, 200, 600]],
  [3, 3, [200, 1000, 3000]],
  [3, 5, [100, 300, 1000]],
  [3, 10, [60, 120, 240]],
  [4, 4, [60, 200, 400, 800]],
  [4, 6, [50, 100, 200]],
  [5, 5, [50, 100, 200]],
  [6, 8, [40, 60, 80]],
  [8, 8, [30, 50, 70]],
];

function secondsFor(counts: number[][], statistic: string): string {
  const words = [
    'test',
    ...counts.map((row) => row.join()),
    '--statistic',
    statistic,
    '--method',
    'exact',
    '--effort',
    effort,
  ];
  const ran = spawnSync('/usr/bin/env', ['time', '-f', '%U', process.execPath, bin, ...words, '--format', 'csv'], {
    encoding: 'utf8',
    timeout: 120_000,
  });
  if (ran.status === 3) return 'out of reach';
  if (ran.status !== 0) return ran.error === undefined ? `status ${ran.status}` : 'over 120';
  return Number(ran.stderr.trim().split('\n').at(-1)).toFixed(1);
}

export function benchReach(print: (line: string) => void): void {
  print('| rows x columns | total | `probability`, s | `pearson`, s |\n|---|---|---|---|');
  for (const [rows, columns, totals] of shapes) {
    for (const total of totals) {
      const table = makeTable({
        counts: cornerTable(spreadTotals(total, rows, 0.4), spreadTotals(total, columns, 0.4)),
      });
      const [counts] = [...drawTables(table, { number: 1, seed: 'reach' })];
      const [probability, pearson] = ['probability', 'pearson'].map((statistic) => secondsFor(counts!, statistic));
      print(`| ${rows} x ${columns} | ${total} | ${probability} | ${pearson} |`);
    }
  }
}

if (process.argv[1] === import.meta.filename) benchReach((line) => console.log(line));
