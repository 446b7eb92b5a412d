// keepsum together: several outcomes of the same subjects against one grouping, from raw records.
import { parseLabelList } from '../../input/label-list.js';
import { usageProblem } from '../../problem/problem.js';
import { togetherFormats } from '../../report/together.js';
import { anyText, betweenZeroAndOne, oneOf, wholeNumber } from '../arguments/check-value.js';
import { valued } from '../arguments/option.js';
import { command } from './command-file.js';
import { checkDocument, citationsIn } from './document.js';
import { documents } from './options/documents.js';
import { lookFor } from './look.js';
import { reading } from './options/reading.js';
import { reporting } from './options/reporting.js';
import { oneFile } from './one-file.js';
import { either } from './options/words.js';
import { destinationFor, sharedOptions } from './shared-options.js';

const own = {
  groups: valued('Reading the table', 'COLUMN', anyText, 'the column of the file that gives the group of each subject'),
  outcomes: valued('Reading the table', 'COLUMNS', anyText, 'the columns of the outcomes: nausea,rash,fever'),
  draws: valued('How p is found', 'N', wholeNumber(1, 1e9, '10000'), 'times the groups are dealt anew (10000)'),
  seed: valued('How p is found', 'TEXT', anyText, 'makes the draws repeatable (one is made and shown)'),
  samplingConfidence: valued('How p is found', 'LEVEL', betweenZeroAndOne('0.99'), 'of the intervals around p (0.99)'),
  format: valued('The report', 'NAME', oneOf(togetherFormats), `${either(togetherFormats)} (text)`),
};

export const togetherCommand = command({
  name: 'together',
  usage: [
    { line: 'keepsum together FILE --groups COLUMN --outcomes COLUMNS', words: 'raw records, one subject a line' },
  ],
  purpose: 'Tests several outcomes of the same subjects against one grouping, with p-values adjusted over all of them.',
  examples: [
    {
      line: 'keepsum together fixtures/demo/trial-diary.csv --groups arm --outcomes nausea,rash,fever --missing drop --seed a',
      words: 'complete records only',
    },
  ],
  options: {
    ...own,
    count: reading.count,
    missing: reading.missing,
    delimiter: reading.delimiter,
    citations: documents.citations,
    width: reporting.width,
    color: reporting.color,
    noColor: reporting.noColor,
    noProgress: reporting.noProgress,
    quiet: reporting.quiet,
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    checkDocument(values);
    const file = oneFile(operands, shell, {
      message: 'no file is named',
      hint: 'write keepsum together FILE --groups COLUMN --outcomes COLUMNS',
    });
    const { groups, outcomes } = values;
    if (groups === undefined || outcomes === undefined) {
      throw usageProblem({
        code: 'columns-not-named',
        message: `${groups === undefined ? '--groups' : '--outcomes'} is missing`,
        hint: 'name the columns: keepsum together FILE --groups arm --outcomes nausea,rash,fever',
      });
    }
    const destination = await destinationFor(values.output, shell, file.path);
    const { readJointRecords } = await import('../../input/joint-records.js');
    const { isPlainFile } = await import('../streams/input-file.js');
    const read = await readJointRecords(file.bytes(), {
      groups,
      outcomes: parseLabelList(outcomes, '--outcomes'),
      count: values.count,
      missing: values.missing,
      delimiter: values.delimiter,
      sourceName: file.name,
      reread: file.path !== null && (await isPlainFile(file.path)) ? file.bytes : undefined,
    });
    const { testTogether } = await import('../../test-together.js');
    const { renderTogether } = await import('../../report/together.js');
    const { withSteps } = await import('../streams/steps.js');
    const { draws, seed, samplingConfidence } = values;
    const wishes = {
      ...(draws === undefined ? {} : { draws }),
      ...(seed === undefined ? {} : { seed }),
      ...(samplingConfidence === undefined ? {} : { samplingConfidence }),
    };
    const result = await withSteps(values, shell, (onProgress) => testTogether(read, wishes, onProgress));
    await destination.write(
      (await citationsIn([result], values)) ??
        renderTogether(result, values.format ?? 'text', await lookFor(values, shell)),
    );
    return 0;
  },
});
