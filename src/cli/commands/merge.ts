// keepsum merge: the parts of one run, pooled into the result of the whole.
import { render } from '../../report/formats.js';
import { formatNames } from '../../report/formats.js';
import { dataProblem } from '../../problem/problem.js';
import { oneOf } from '../arguments/check-value.js';
import { valued } from '../arguments/option.js';
import { command } from './command-file.js';
import { lookFor } from './look.js';
import { either } from './options/words.js';
import { reporting } from './options/reporting.js';
import { destinationFor, sharedOptions } from './shared-options.js';

export const mergeCommand = command({
  name: 'merge',
  usage: [
    { line: 'keepsum merge PART PART ...', words: 'results of keepsum test --shard, in JSON' },
    { line: 'keepsum merge LINES LINES ...', words: 'results of keepsum batch --shard, in the order of their parts' },
  ],
  purpose: 'Pools the parts of one run into exactly the result that one machine would have given.',
  examples: [
    { line: 'keepsum merge fixtures/golden/part-1.json fixtures/golden/part-2.json', words: 'two halves of a run' },
  ],
  options: {
    format: valued('The report', 'NAME', oneOf(formatNames), `${either(formatNames)} (json)`),
    width: reporting.width,
    color: reporting.color,
    noColor: reporting.noColor,
    ...sharedOptions,
  },
  async run(operands, values, shell) {
    const destination = await destinationFor(values.output, shell, operands[0] ?? null);
    const { fileBytes, whole } = await import('../streams/input-file.js');
    const texts: { place: string; text: string }[] = [];
    for (const place of operands)
      texts.push({ place, text: new TextDecoder().decode(await whole(fileBytes(place), place)) });
    const { areLines, mergeLines } = await import('../../record/merge-lines.js');
    if (texts.length > 0 && areLines(texts[0]!.text)) {
      await destination.write(mergeLines(texts));
      return 0;
    }
    const { mergeParts } = await import('../../record/merge.js');
    const result = await mergeParts(texts.map(({ place, text }) => ({ place, value: parsed(text, place) })));
    await destination.write(await render(result, values.format ?? 'json', await lookFor(values, shell)));
    return 0;
  },
});

function parsed(text: string, place: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    throw dataProblem({
      code: 'not-json',
      message: 'this is not JSON',
      place,
      hint: 'give what --shard with --format json wrote, unchanged',
    });
  }
}
