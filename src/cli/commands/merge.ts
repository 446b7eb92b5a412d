// keepsum merge: the parts of one run, pooled into the result of the whole.
import { stat } from 'node:fs/promises';
import { render } from '../../report/formats.js';
import { formatNames } from '../../report/formats.js';
import { dataProblem, usageProblem, type Problem } from '../../problem/problem.js';
import type { Shell } from '../shell.js';
import { writeOut } from '../streams/write-out.js';
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
    { line: 'keepsum merge LINES LINES ...', words: 'results of keepsum batch --shard' },
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
    if (await holdLines(operands)) return mergeBatch(operands, values.output, shell);
    const destination = await destinationFor(values.output, shell, operands[0] ?? null);
    const { fileBytes, whole } = await import('../streams/input-file.js');
    const texts: { place: string; text: string }[] = [];
    for (const place of operands)
      texts.push({ place, text: new TextDecoder().decode(await whole(fileBytes(place), place)) });
    const { mergeParts } = await import('../../record/merge.js');
    const result = await mergeParts(texts.map(({ place, text }) => ({ place, value: parsed(text, place) })));
    await destination.write(await render(result, values.format ?? 'json', await lookFor(values, shell)));
    return 0;
  },
});

/** By the first line that there is. What cannot be read says so when it is read. */
async function holdLines(paths: readonly string[]): Promise<boolean> {
  const { isPlainFile } = await import('../streams/input-file.js');
  const { isPartLine } = await import('../../record/merge-lines.js');
  for (const path of paths) {
    if (await isPlainFile(path)) for await (const line of linesOf(path)) return isPartLine(line);
  }
  return false;
}

async function* linesOf(path: string): AsyncGenerator<string> {
  const { fileBytes } = await import('../streams/input-file.js');
  yield* (await import('../streams/text-lines.js')).textLines(fileBytes(path));
}

/** Parts of a batch, however long. */
async function mergeBatch(paths: readonly string[], output: string | undefined, shell: Shell): Promise<number> {
  const { mergeLines } = await import('../../record/merge-lines.js');
  for (const path of paths) if (await isNoPlainFile(path)) throw notPlain(path);
  const file =
    output === undefined || output === '-'
      ? undefined
      : await (await import('../streams/output-file.js')).toFile(output, paths[0]!);
  const pieces = await mergeLines(paths.map((path) => ({ place: path, lines: () => linesOf(path) })));
  if (file !== undefined) await file.write(pieces);
  else for await (const piece of pieces) if (!(await writeOut(shell.stdout, piece, 'standard output'))) break;
  return 0;
}

/** A missing one is named as such when it is read. */
const isNoPlainFile = (path: string): Promise<boolean> =>
  stat(path).then(
    (facts) => !facts.isFile(),
    () => false,
  );

const notPlain = (path: string): Problem =>
  usageProblem({
    code: 'part-not-a-file',
    message: 'this is no plain file, and parts of a batch are read twice',
    place: path,
    hint: 'give the files that keepsum batch --shard wrote',
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
