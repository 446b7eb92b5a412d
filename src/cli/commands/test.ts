// keepsum test: one table, from where it stands to a report. Read, analyse, report, write.
import { analyse } from '../../analyse.js';
import { groupedDigits } from '../../numeric/digit-groups.js';
import type { PlanOptions } from '../../plan/plan.js';
import { usageProblem } from '../../problem/problem.js';
import type { Result } from '../../result/result.js';
import type { Values } from '../arguments/option.js';
import type { Shell } from '../shell.js';
import { withProgress } from '../streams/progress.js';
import { noteFor, remark } from '../streams/write-out.js';
import { chooseSource } from './choose-source.js';
import { command } from './command-file.js';
import { checkDocument, documentOf } from './document.js';
import { withOwnStatistic } from './module-path.js';
import { readSource } from './read-source.js';
import { destinationFor } from './shared-options.js';
import { planning } from './options/planning.js';
import { testOptions } from './test-options.js';

type TestValues = Values<typeof testOptions>;

export const testCommand = command({
  name: 'test',
  usage: [
    { line: 'keepsum test ROW ROW ...', words: 'rows typed in: 8,2 or label=8,2' },
    { line: 'keepsum test FILE', words: 'a table of counts; - is standard input' },
    { line: 'keepsum test FILE --rows COLUMN --columns COLUMN', words: 'raw records, one a line' },
  ],
  purpose: 'Tests whether the rows and columns of one table of counts are related.',
  examples: [
    { line: 'keepsum test 8,2 1,9', words: 'a table typed in' },
    { line: 'keepsum test fixtures/demo/orchid-forms.tsv', words: 'a table from a file, with labels' },
    {
      line: 'keepsum test fixtures/demo/ward-line-list.csv --rows custard --columns outcome --missing drop',
      words: 'raw records, counted',
    },
  ],
  options: testOptions,
  async run(operands, values, shell) {
    checkCombinations(values);
    const source = chooseSource(operands, values, shell.stdinIsTerminal);
    if (source === undefined) return nothingNamed(shell);
    const destination = await destinationFor(values.output, shell, source.form === 'inline' ? null : source.path);
    const pictures = await plotFilesFor(values, source.form === 'inline' ? null : source.path, shell);
    const table = await readSource(source, values, shell);
    const wishes = await withOwnStatistic(planOptions(values));
    const result = await withProgress(values, shell, (surroundings) => analyse(table, wishes, surroundings));
    const report = await documentOf(result, values, shell);
    if (!values.quiet) await remarkOnSampling(result, shell);
    await destination.write(report);
    await pictures?.(result);
    return 0;
  },
});

/** Only what the plan knows; it also makes the seed when none is given. */
function planOptions(values: TestValues): PlanOptions {
  const chosen: Values<typeof planning> = Object.fromEntries(
    Object.entries(values).filter(([name]) => name in planning),
  );
  const { noCells, ...wishes } = chosen;
  const nullSummary =
    values.histogram || values.format === 'html' || values.plot?.some(({ picture }) => picture === 'null');
  return { ...wishes, ...(noCells ? { cells: false } : {}), ...(nullSummary ? { nullSummary } : {}) };
}

/** Tries the files of --plot; what it gives draws into them. */
async function plotFilesFor(
  { plot, output, quiet }: TestValues,
  inputPath: string | null,
  shell: Shell,
): Promise<((result: Result) => Promise<void>) | undefined> {
  if (plot === undefined) return undefined;
  const write = await (
    await import('../plots/plot-files.js')
  ).plotFiles(plot, inputPath, output, noteFor({ quiet }, shell));
  return async (result) => {
    const { drawPicture, lackOf } = await import('../../report/pictures/pictures.js');
    await write((picture) => {
      const lack = lackOf(result, picture);
      if (lack === undefined) return drawPicture(result, picture);
      throw usageProblem({
        code: 'no-picture',
        message: `there is no picture "${picture}" of this result: ${lack.because}`,
        place: '--plot',
        hint: lack.hint,
      });
    });
  };
}

/** A method that was picked for the user is never a silent matter. */
async function remarkOnSampling({ plan }: Result, shell: Shell): Promise<void> {
  if (plan.methodAsked !== 'auto' || plan.method !== 'sample') return;
  const draws = plan.draws === 'auto' ? 'until it is settled' : `${groupedDigits(plan.draws!)} draws`;
  await remark(shell.stderr, `note: p is sampled, ${draws}: ${plan.methodReason}\n`);
}

function checkCombinations(values: TestValues): void {
  checkDocument(values);
  if (values.cells && values.noCells) {
    throw usageProblem({
      code: 'cells-and-no-cells',
      message: '--cells and --no-cells contradict each other',
      hint: 'give one of them, or neither: what is cheap about cells is then worked out',
    });
  }
  if (values.rawCsv && values.format !== 'csv') {
    throw usageProblem({
      code: 'option-does-not-fit',
      message: '--raw-csv is for CSV output only',
      hint: 'add --format csv, or leave --raw-csv out',
    });
  }
}

async function nothingNamed(shell: Shell): Promise<number> {
  const { shortHelp } = await import('../help.js');
  await remark(shell.stderr, shortHelp(testCommand, shell.columns));
  return 2;
}
