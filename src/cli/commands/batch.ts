// keepsum batch: many tables, one line of results each. Choose, open, go on where a run ended, answer, write.
import { availableParallelism } from 'node:os';
import { rmSync } from 'node:fs';
import { freshSeed } from '../../plan/fresh-seed.js';
import type { PlanOptions } from '../../plan/plan.js';
import { shownJson } from '../../result/label-words.js';
import { version } from '../../result/version.js';
import type { Shell } from '../shell.js';
import { partOf, type PartSource } from '../../batch/part-source.js';
import { batchWords, progressLine } from '../streams/progress.js';
import { journalOf, nothingYet } from '../streams/unfinished-file.js';
import { remark } from '../streams/write-out.js';
import { chooseTables } from './batch/choose-tables.js';
import { openTables } from './batch/open-tables.js';
import { batchOptions } from './batch/options.js';
import { runBatch } from './batch/run-batch.js';
import { checkCombinations, described, outputFile, streamSink, type BatchValues } from './batch/settle-run.js';
import { fileSink, findUnfinished, type Progress, type RunDescription } from './batch/sink.js';
import { faultWords, resumeWords } from './batch/words.js';
import { command } from './command-file.js';
import { withOwnStatistic } from './module-path.js';
import { planning } from './options/planning.js';

export const batchCommand = command({
  name: 'batch',
  usage: [
    { line: 'keepsum batch FILE', words: 'one table a line of JSON; - is standard input' },
    { line: 'keepsum batch FILE --by COLUMNS --rows COLUMN --columns COLUMN', words: 'one long file of records' },
    { line: 'keepsum batch FILE FILE ...', words: 'tables of counts, one a file' },
  ],
  purpose:
    'Tests many tables, one after the other or on all cores, and writes one line of JSON (or rows of CSV) for each.',
  examples: [
    { line: 'keepsum batch fixtures/demo/shift-checks.ndjson', words: 'one compact line a table, in their order' },
    {
      line: 'keepsum batch fixtures/demo/orchard-blight.csv --by orchard,blight --rows spray --columns state --count trees',
      words: 'a table for each orchard and blight',
    },
    {
      line: 'keepsum batch fixtures/demo/shift-checks.ndjson | keepsum adjust -',
      words: 'adjusted for being many, once all p-values are known',
    },
  ],
  options: batchOptions,
  async run(operands, values, shell) {
    checkCombinations(values);
    const from = await chooseTables(operands, values, shell.stdinIsTerminal);
    if (from === undefined) return nothingNamed(shell);
    const wishes = await withOwnStatistic(planOptions(values));
    const path = await outputFile(values, from, shell);
    const run = described(values, wishes, from);
    const unfinished = path !== undefined && values.resume ? findUnfinished(path, run, values.seed) : undefined;
    if (unfinished?.isWhole) return clearedUp(path!, unfinished.reached, values, shell);
    const seed = unfinished?.seed ?? values.seed ?? freshSeed();
    if (values.resume && !values.quiet) await remark(shell.stderr, resumeWords(unfinished));
    const tables = await openTables(from, values, shell);
    if (!values.quiet) for (const text of tables.remarks) await remark(shell.stderr, `note: ${text}\n`);
    const sink = path === undefined ? await streamSink(values.output, shell) : fileSink(path, run, seed, unfinished);
    const part = values.shard === undefined ? undefined : partOf(tables.source, values.shard);
    const line = progressLine(values, shell);
    try {
      const reached = await runBatch({
        source: part ?? tables.source,
        settings: {
          wishes: { ...wishes, seed },
          full: values.full ?? false,
          requireKeys: values.requireKeys ?? false,
          sourceName: tables.sourceName,
          ...stampOf(values),
        },
        style: values.format !== 'csv' ? 'ndjson' : values.rawCsv ? 'raw-csv' : 'csv',
        threads: values.threads ?? availableParallelism(),
        sink,
        header: values.format === 'csv' && !unfinished?.reached.bytes ? await csvHeader() : '',
        from: unfinished?.reached ?? nothingYet,
        closing: part && (({ tables: lines }) => closingLine(values, lines, part.whole(), { ...run, seed })),
        path,
        onProgress: (done) => line?.show((seconds) => batchWords(done, tables.share(), seconds)),
      });
      line?.erase();
      if (reached === undefined) return 0; // nobody reads on
      sink.finish();
      if (reached.faults === 0) return 0;
      if (!values.quiet) await remark(shell.stderr, faultWords(reached.faults, reached.tables));
      return values.allowErrors ? 0 : 1;
    } catch (thrown) {
      line?.erase();
      sink.abandon();
      if (sink.keptIn !== undefined) {
        await remark(shell.stderr, `note: what is finished is kept in ${sink.keptIn}; --resume goes on from there\n`);
      }
      throw thrown;
    }
  },
});

/** What the parts of a batch must have in common, and how long this one is: `keepsum merge` pools no others. */
function closingLine(
  { shard }: BatchValues,
  lines: number,
  whole: ReturnType<PartSource['whole']>,
  { shard: _, input: __, ...run }: RunDescription,
): string {
  const closing = { part: `${shard!.index}/${shard!.of}`, lines, ...whole, run: { version, ...run } };
  return `${shownJson(JSON.stringify(closing))}\n`;
}

const stampOf = ({ shard }: BatchValues): { shard?: string } =>
  shard === undefined ? {} : { shard: `${shard.index}/${shard.of}` };

/** A part of a batch is some of its tables, each of them whole. */
function planOptions(values: BatchValues): PlanOptions {
  const {
    noCells,
    shard: _,
    ...wishes
  } = Object.fromEntries(Object.entries(values).filter(([name]) => name in planning));
  return noCells ? { ...wishes, cells: false } : wishes;
}

/** A run that was killed after its file had taken its name. */
async function clearedUp(
  path: string,
  { faults, tables }: Progress,
  values: BatchValues,
  shell: Shell,
): Promise<number> {
  rmSync(journalOf(path));
  if (faults > 0 && !values.quiet) await remark(shell.stderr, faultWords(faults, tables));
  return faults > 0 && !values.allowErrors ? 1 : 0;
}

async function csvHeader(): Promise<string> {
  return (await import('../../batch/write-lines.js')).csvHeader();
}

async function nothingNamed(shell: Shell): Promise<number> {
  const { shortHelp } = await import('../help.js');
  await remark(shell.stderr, shortHelp(batchCommand, shell.columns));
  return 2;
}
