// keepsum report: saved results, one or many, in one document; nothing is worked out again.
import { dataProblem } from '../../problem/problem.js';
import type { SavedLine } from '../../batch/lines-page.js';
import type { Result } from '../../result/result.js';
import { version } from '../../result/version.js';
import { savedLine, wholeOf } from './report/saved-line.js';
import { oneOf } from '../arguments/check-value.js';
import { valued } from '../arguments/option.js';
import type { Shell } from '../shell.js';
import { command } from './command-file.js';
import { checkDocument, citationsIn } from './document.js';
import { lookFor, type LookValues } from './look.js';
import { documents } from './options/documents.js';
import { reporting } from './options/reporting.js';
import { oneFile } from './one-file.js';
import { either } from './options/words.js';
import { destinationFor, sharedOptions } from './shared-options.js';

/** A page of more is none that anybody reads or opens. */
const mostResults = 1000;

const formats = ['html', 'text', 'markdown'] as const;

export const reportCommand = command({
  name: 'report',
  usage: [
    { line: 'keepsum report RESULTS', words: 'JSON results, one alone or one a line, as keepsum batch writes them' },
  ],
  purpose:
    'Writes saved results as one document, without working them out again: html with pictures and record, unless told.',
  examples: [
    { line: 'keepsum report fixtures/golden/orchid-forms.json', words: 'a page to send' },
    { line: 'keepsum report fixtures/demo/shift-results.ndjson', words: 'a table of many answers' },
    {
      line: 'keepsum report fixtures/golden/orchid-forms.json --citations bibtex',
      words: 'the sources of what it used',
    },
  ],
  options: {
    format: valued('The report', 'NAME', oneOf(formats), `${either(formats)} (html)`),
    citations: documents.citations,
    width: reporting.width,
    color: reporting.color,
    noColor: reporting.noColor,
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    checkDocument(values);
    const file = oneFile(operands, shell, {
      message: 'no results are named',
      hint: 'write keepsum report results.ndjson, or pipe them in',
    });
    const destination = await destinationFor(values.output, shell, file.path);
    const { textLines } = await import('../streams/text-lines.js');
    const { recordsIn } = await import('../../record/records-in.js');
    const lines: (SavedLine & { readonly place: string })[] = [];
    for await (const { record, place } of recordsIn(textLines(file.bytes()), file.name)) {
      if (lines.length === mostResults) {
        throw dataProblem({
          code: 'too-many-results',
          message: `more than ${mostResults} results make no page`,
          place,
          hint: 'split the file, or select the results that the report is about',
        });
      }
      const line = await savedLine(record, place);
      if (line !== undefined) lines.push({ ...line, place });
    }
    if (lines.length === 0) {
      throw dataProblem({
        code: 'no-results',
        message: 'the file holds no results',
        place: file.name,
        hint: 'give what --format json or keepsum batch wrote',
      });
    }
    const isPage = values.citations === undefined && (values.format ?? 'html') === 'html';
    if (isPage && lines.some(({ kind }) => kind !== 'whole')) {
      const { linesPage } = await import('../../batch/lines-page.js');
      await destination.write(linesPage(lines, version));
      return 0;
    }
    const results = lines.map((line) => wholeOf(line, line.place));
    await destination.write((await citationsIn(results, values)) ?? (await pageOf(results, values, shell)));
    return 0;
  },
});

async function pageOf(
  results: readonly Result[],
  { format = 'html', ...look }: LookValues & { readonly format?: (typeof formats)[number] },
  shell: Shell,
): Promise<string> {
  if (format === 'html') return (await import('../../report/html/report.js')).htmlReport(results);
  const { render } = await import('../../report/formats.js');
  const settings = await lookFor(look, shell);
  return results.map((result) => render(result, format, settings)).join('\n');
}
