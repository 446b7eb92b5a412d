// keepsum selfcheck: the shipped reference answers, worked out on the user's own machine.
import type { ReferenceCase } from '../../self-check/reference-case.js';
import { usageProblem } from '../../problem/problem.js';
import { renderSelfCheck, selfCheckFormats } from '../../report/self-check.js';
import { anyText, oneOf } from '../arguments/check-value.js';
import { valued } from '../arguments/option.js';
import { command } from './command-file.js';
import { lookFor } from './look.js';
import { reporting } from './options/reporting.js';
import { either } from './options/words.js';
import { destinationFor, sharedOptions } from './shared-options.js';

export const selfCheckCommand = command({
  name: 'selfcheck',
  usage: [
    { line: 'keepsum selfcheck', words: 'run every case; ends with 1 where an answer differs' },
    { line: 'keepsum selfcheck --answers FILE', words: 'the same with cases of your own' },
  ],
  purpose: 'Works out the shipped reference answers on this machine and reports whether each agrees.',
  examples: [
    { line: 'keepsum selfcheck', words: 'the validation report on the screen' },
    { line: 'keepsum selfcheck --format json', words: 'the same for a record (keepsum schema selfcheck)' },
  ],
  options: {
    answers: valued(
      'Reading the tables',
      'FILE',
      anyText,
      'cases of your own with known answers, in place of those that ship (keepsum schema reference-answers)',
    ),
    format: valued('The report', 'NAME', oneOf(selfCheckFormats), `${either(selfCheckFormats)} (text)`),
    width: reporting.width,
    color: reporting.color,
    noColor: reporting.noColor,
    noProgress: reporting.noProgress,
    quiet: reporting.quiet,
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    if (operands.length > 0) {
      throw usageProblem({
        code: 'needless-operand',
        message: `keepsum selfcheck takes no "${operands[0]!}"`,
        hint: 'write keepsum selfcheck; every case is run',
      });
    }
    const destination = await destinationFor(values.output, shell);
    const { selfCheck } = await import('../../self-check.js');
    const { withSteps } = await import('../streams/steps.js');
    const cases = await casesFrom(values.answers);
    const report = await withSteps(values, shell, (onProgress) => selfCheck(cases, thisMachine(), onProgress));
    const { format } = values;
    await destination.write(
      format === 'html'
        ? (await import('../../report/html/self-check.js')).selfCheckHtml(report)
        : renderSelfCheck(report, format ?? 'text', await lookFor(values, shell)),
    );
    return report.verdict === 'agrees' ? 0 : 1;
  },
});

async function casesFrom(path: string | undefined): Promise<readonly ReferenceCase[]> {
  if (path === undefined) return (await import('../../self-check.js')).shippedCases();
  const { fileBytes, whole } = await import('../streams/input-file.js');
  const { readAnswers } = await import('../../self-check/read-answers.js');
  return readAnswers(new TextDecoder().decode(await whole(fileBytes(path), path)), path);
}

const thisMachine = () => ({
  runtime: `Node.js ${process.version}`,
  engine: `V8 ${process.versions.v8}`,
  system: process.platform,
  architecture: process.arch,
});
