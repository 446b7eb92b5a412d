// Forecast seconds of exact work against the processor seconds that it took, each table in a fresh process of the command, less
// what the command takes for the same table by its limiting law. Needs a build. Target: within a factor of 5 for nine tables in ten.
import { spawnSync } from 'node:child_process';
import { resolve } from 'node:path';
import { forecastTables } from '../helpers/forecast-tables.js';

const bin = resolve(import.meta.dirname, '../../bin/keepsum.js');
const statistics = ['pearson', 'probability'] as const;
/** Below this a difference of two runs is noise, and what an exact p brings along (fragility, cells). */
const least = 0.1;

interface Run {
  readonly seconds: number;
  readonly foreseen: number;
}

/** Undefined where exact work is refused, or a bracket stands in for it: nothing to compare. */
function run(words: readonly string[]): Run | undefined {
  const timed = spawnSync('/usr/bin/env', ['time', '-f', '%U', process.execPath, bin, 'test', ...words], {
    encoding: 'utf8',
  });
  if (timed.status === 3) return undefined;
  if (timed.status !== 0) throw new Error(timed.stderr);
  const { plan } = JSON.parse(timed.stdout) as { plan: { forecast?: { seconds: number; engine: string } } };
  if (plan.forecast?.engine === 'bracket') return undefined;
  return { seconds: Number(timed.stderr.trim().split('\n').at(-1)), foreseen: plan.forecast?.seconds ?? 0 };
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;
const options = ['--effort', '1e9', '--no-cells', '--format', 'json'];
const ratios: number[] = [];
for (const { name, counts } of forecastTables) {
  const rows = counts.map((row) => row.join());
  for (const statistic of statistics) {
    const words = [...rows, ...options, '--method'];
    const exact = [...words, 'exact', '--statistic', statistic];
    const first = run(exact);
    if (first === undefined) continue;
    const runs = [first, run(exact)!, run(exact)!];
    const starts = [1, 2, 3].map(() => run([...words, 'asymptotic'])!.seconds);
    const taken = Math.max(least, median(runs.map(({ seconds }) => seconds)) - median(starts));
    const foreseen = Math.max(least, first.foreseen);
    ratios.push(foreseen / taken);
    console.log(
      `${name}, ${statistic}: foreseen ${foreseen.toFixed(2)} s, taken ${taken.toFixed(2)} s, ratio ${(foreseen / taken).toFixed(2)}`,
    );
  }
}
ratios.sort((a, b) => a - b);
const at = (share: number): string => ratios[Math.floor(share * (ratios.length - 1))]!.toFixed(2);
const within = ratios.filter((ratio) => ratio <= 5 && ratio >= 0.2).length;
console.log(
  `${ratios.length} tables: foreseen / taken ${at(0.1)} (a tenth below), ${at(0.5)} (median), ${at(0.9)} (a tenth above); ` +
    `${((100 * within) / ratios.length).toFixed(0)}% within a factor of 5`,
);
if (within < 0.9 * ratios.length) process.exitCode = 1;
