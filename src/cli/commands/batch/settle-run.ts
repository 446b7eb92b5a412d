// What a batch run is, and where its lines go, settled before anything is read.
import { createWriteStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import type { PlanOptions } from '../../../plan/plan.js';
import { usageProblem, type Problem } from '../../../problem/problem.js';
import type { Values } from '../../arguments/option.js';
import type { Shell } from '../../shell.js';
import { writeOut } from '../../streams/write-out.js';
import { partNeedsSeed } from '../../../plan/shard-of.js';
import { destinationFor } from '../shared-options.js';
import type { TablesFrom } from './choose-tables.js';
import { readingTables, type batchOptions } from './options.js';
import type { RunDescription, Sink } from './sink.js';

export type BatchValues = Values<typeof batchOptions>;

/** @throws Problem (usage) */
export function checkCombinations(values: BatchValues): void {
  const { rawCsv, format, full, resume, output, shard, seed, family, strata, cluster } = values;
  if (rawCsv && format !== 'csv')
    throw doesNotFit('--raw-csv is for CSV output only', 'add --format csv, or leave it out');
  if (shard !== undefined && format === 'csv')
    throw doesNotFit('--shard is for lines of JSON only: they can be pooled', 'leave --format csv out');
  if (family !== undefined && format === 'csv')
    throw doesNotFit('--family is for lines of JSON only: keepsum adjust reads these', 'leave --format csv out');
  if (strata !== undefined && cluster !== undefined)
    throw doesNotFit('--strata does not go with --cluster', 'leave one of the two out');
  if (shard !== undefined && seed === undefined) throw partNeedsSeed();
  if (full && format === 'csv') {
    throw doesNotFit(
      '--full is for lines of JSON only: CSV has a row for each p-value',
      'leave --full or --format csv out',
    );
  }
  if (resume && (output === undefined || output === '-')) {
    throw doesNotFit('--resume goes on with a file', 'name it with --output FILE, as in the run that did not end');
  }
}

const doesNotFit = (message: string, hint: string): Problem =>
  usageProblem({ code: 'option-does-not-fit', message, hint });

/** All that decides a byte of the results, but for the seed and the input itself. */
export function described(values: BatchValues, wishes: PlanOptions, from: TablesFrom): RunDescription {
  const { statistic, ...others } = wishes;
  const reading = Object.fromEntries(Object.entries(values).filter(([name]) => name in readingTables));
  return {
    ...others,
    seed: null, // kept apart, because one may have been made
    ...reading,
    statistic: typeof statistic === 'object' ? statistic.name : (statistic ?? null),
    input: from.form === 'files' ? from.paths : from.path,
    format: values.format ?? 'ndjson',
    full: values.full ?? false,
    ...(values.shard === undefined ? {} : { shard: values.shard }),
    rawCsv: values.rawCsv ?? false,
  };
}

/** The file that the results will stand in; undefined for streams: standard output, pipes, devices. */
export async function outputFile({ output }: BatchValues, from: TablesFrom, shell: Shell): Promise<string | undefined> {
  if (output === undefined || output === '-') return undefined;
  const there = await stat(output).catch(() => undefined);
  if (there !== undefined && !there.isFile() && !there.isDirectory()) return undefined;
  for (const input of from.form === 'files' ? from.paths : [from.path]) await destinationFor(output, shell, input);
  return output;
}

export function streamSink(output: string | undefined, shell: Shell): Sink {
  const named = output !== undefined && output !== '-';
  const stream = named ? createWriteStream(output) : shell.stdout;
  const name = named ? output : 'standard output';
  // Without a listener, a stream that cannot be written ends the process with a stack trace.
  stream.on('error', () => undefined);
  return {
    write: (text) => (text === '' ? Promise.resolve(true) : writeOut(stream, text, name)),
    finish: () => (named ? stream.end() : undefined),
    abandon: () => undefined,
  };
}
