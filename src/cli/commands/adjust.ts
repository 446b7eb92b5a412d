// keepsum adjust: p-values of a family of results on disk, adjusted.
import { usageProblem } from '../../problem/problem.js';
import { nameHint } from '../../problem/suggest.js';
import { adjustments, discreteAdjustments, type Adjustment } from '../../family/adjust.js';
import { standardAdjustments } from '../../adjust-results.js';
import type { FailedTest, FoundTest } from '../../family/read-results.js';
import type { PlanOptions } from '../../plan/plan.js';
import { betweenZeroAndOne, oneOf, type CheckValue } from '../arguments/check-value.js';
import { toggle, valued } from '../arguments/option.js';
import { remark } from '../streams/write-out.js';
import { command } from './command-file.js';
import { checkDocument, citationsIn } from './document.js';
import { lookFor } from './look.js';
import { documents } from './options/documents.js';
import { reporting } from './options/reporting.js';
import { oneFile } from './one-file.js';
import { either } from './options/words.js';
import { destinationFor, sharedOptions } from './shared-options.js';

const formats = ['ndjson', 'csv', 'text'] as const;

const methodList: CheckValue<Adjustment[]> = (text, flag) =>
  text.split(',').map((part) => {
    const name = part.trim();
    const found = adjustments.find((each) => each === name);
    if (found !== undefined) return found;
    throw usageProblem({
      code: 'unknown-value',
      message: `"${name}" is not a value of ${flag}`,
      place: flag,
      hint: nameHint(name, adjustments),
    });
  });

export const adjustCommand = command({
  name: 'adjust',
  usage: [
    { line: 'keepsum adjust RESULTS', words: 'results one a line, as keepsum batch writes them; - is standard input' },
  ],
  purpose: 'Adjusts the p-values of many results for being many: each family on its own.',
  examples: [
    { line: 'keepsum adjust fixtures/demo/shift-results.ndjson', words: 'the usual adjustments' },
    {
      line: 'keepsum adjust fixtures/demo/shift-results.ndjson --by holm,tarone --format csv',
      words: 'one that uses what each table could attain',
    },
  ],
  options: {
    by: valued('The test', 'NAMES', methodList, `${either(adjustments)} (${standardAdjustments.join(', ')})`),
    alpha: valued('The test', 'LEVEL', betweenZeroAndOne('0.05'), 'the level that gilbert picks tests for (0.05)'),
    format: valued('The report', 'NAME', oneOf(formats), `${either(formats)} (ndjson)`),
    citations: documents.citations,
    width: reporting.width,
    color: reporting.color,
    noColor: reporting.noColor,
    quiet: toggle('The report', 'no remarks on standard error', 'q'),
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    checkDocument(values);
    const file = oneFile(operands, shell, {
      message: 'no results are named',
      hint: 'write keepsum adjust results.ndjson, or pipe them in',
    });
    const destination = await destinationFor(values.output, shell, file.path);
    const { resultsIn } = await import('../streams/result-lines.js');
    const { adjustResults } = await import('../../adjust-results.js');
    const read = await resultsIn(file.bytes(), file.name);
    const methods = values.by ?? standardAdjustments;
    const results = methods.some((method) => discreteAdjustments.includes(method)) ? await withReach(read) : read;
    const alpha = values.alpha ?? 0.05;
    const { lines, remarks } = adjustResults(results, { methods, alpha });
    const { citations, format = 'ndjson' } = values;
    if (citations !== undefined) {
      const { adjustMethods } = await import('../../result/adjust-words.js');
      await destination.write((await citationsIn([{ methods: adjustMethods(methods, alpha) }], values))!);
      return 0;
    }
    if (format === 'text') {
      const { adjustedPage } = await import('../../report/adjusted-page.js');
      const { pageText } = await import('../../report/page-lines.js');
      await destination.write(pageText(adjustedPage(lines, methods, alpha, remarks), await lookFor(values, shell)));
      return 0;
    }
    if (!values.quiet) await remark(shell.stderr, remarks.map((text) => `note: ${text}\n`).join(''));
    const { adjustedLines } = await import('../../report/adjusted.js');
    await destination.write(adjustedLines(lines, format));
    return 0;
  },
});

/** Exact p-values that do not say what they could attain: worked out from the margins of their tables. */
async function withReach(results: readonly (FoundTest | FailedTest)[]): Promise<(FoundTest | FailedTest)[]> {
  const { reachOf } = await import('../../reach-of.js');
  const all: (FoundTest | FailedTest)[] = [];
  for (const one of results) {
    const known = 'code' in one || one.leastAttainable !== null || one.method !== 'exact' || one.table === undefined;
    all.push(known ? one : { ...one, leastAttainable: await reachOf(one.table!, one.wishes as PlanOptions) });
  }
  return all;
}
