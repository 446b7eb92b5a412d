// keepsum replay: a saved result made again from its own record and compared digit by digit.
import { anyText, oneOf, wholeNumber } from '../arguments/check-value.js';
import { toggle, valued } from '../arguments/option.js';
import { command } from './command-file.js';
import { oneFile } from './one-file.js';
import { either } from './options/words.js';
import { reporting } from './options/reporting.js';
import { destinationFor, sharedOptions } from './shared-options.js';

const formats = ['text', 'json'] as const;
/** Ends so when anything is not as recorded. */
const differingStatus = 4;

export const replayCommand = command({
  name: 'replay',
  usage: [
    { line: 'keepsum replay RESULT', words: 'a result in JSON, or a page that --format html wrote' },
    { line: 'keepsum replay RESULTS', words: 'many, one a line, as keepsum batch writes them' },
  ],
  purpose: 'Makes saved results again from the counts and the plan inside them, and compares every digit.',
  examples: [
    { line: 'keepsum replay fixtures/golden/orchid-forms.json', words: 'status 0 when all is the same, 4 when not' },
    {
      line: 'keepsum replay fixtures/golden/orchid-forms.json --against fixtures/demo/orchid-forms.tsv',
      words: 'and the data file is the very one',
    },
  ],
  options: {
    against: valued(
      'Reading the table',
      'FILE',
      anyText,
      'the data file that the result came from: its bytes are checked',
    ),
    statistic: valued(
      'The test',
      'FILE',
      anyText,
      "the module of one's own statistic, where the result was made with one",
    ),
    threads: valued(
      'How p is found',
      'N',
      wholeNumber(1, 256, '2'),
      'threads for long sampling; the digits are the same (all)',
    ),
    format: valued('The report', 'NAME', oneOf(formats), `${either(formats)} (text)`),
    width: reporting.width,
    quiet: toggle('The report', 'nothing on the screen, the exit status alone', 'q'),
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    const file = oneFile(operands, shell, {
      message: 'no result is named',
      hint: 'write keepsum replay result.json, or pipe it in',
    });
    const destination = await destinationFor(values.output, shell, file.path);
    const { fileBytes } = await import('../streams/input-file.js');
    const { textLines } = await import('../streams/text-lines.js');
    const { recordsIn } = await import('../../record/records-in.js');
    const { differs, replayRecords } = await import('../../replay-records.js');
    const own =
      values.statistic === undefined
        ? undefined
        : await (await import('./load-statistic.js')).loadStatistic(values.statistic);
    const report = await replayRecords(recordsIn(textLines(file.bytes()), file.name), {
      ...(own === undefined ? {} : { own }),
      ...(values.threads === undefined ? {} : { surroundings: { threads: values.threads } }),
      ...(values.against === undefined ? {} : { against: fileBytes(values.against) }),
    });
    if (!values.quiet) {
      const { replayedText } = await import('../../report/replayed.js');
      await destination.write(
        values.format === 'json'
          ? `${JSON.stringify(report, null, 2)}\n`
          : replayedText(report, Math.min(96, Math.max(40, values.width ?? shell.columns))),
      );
    }
    return differs(report) ? differingStatus : 0;
  },
});
