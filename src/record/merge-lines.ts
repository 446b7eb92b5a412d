// Parts of a batch woven together: table k of the whole run is the next line of part ((k - 1) mod parts) + 1. Every part is read
// twice, first to see that it is whole and of the same run, then line by line, so that memory does not grow with the tables.
import { partEndDeclaration } from '../batch/declaration.js';
import { dataProblem, usageProblem, type Problem } from '../problem/problem.js';
import { differencesBetween } from './differences.js';

export interface PartLines {
  readonly place: string;
  /** From the first line on, each time it is called. */
  lines(): AsyncIterable<string>;
}

interface Surveyed {
  readonly part: PartLines;
  readonly index: number;
  readonly of: number;
  readonly end: ReturnType<typeof partEndDeclaration.parse>;
}

/** Whether a first line is one of a batch's part, rather than the start of one result. */
export const isPartLine = (line: string): boolean => stamped.test(line) || isEnd(line);

/**
 * @param parts all parts, in any order.
 * @throws Problem: usage (`parts-missing`, `part-twice`, `parts-differ`), data (`not-a-part`, `part-cut-short`); all before the first text.
 */
export async function mergeLines(parts: readonly PartLines[]): Promise<AsyncIterable<string>> {
  const surveyed: Surveyed[] = [];
  for (const part of parts) surveyed.push(await survey(part));
  const inOrder = arranged(surveyed);
  return woven(inOrder.map(({ part }) => part));
}

const stamped = /^(\{"key":"(?:[^"\\]|\\.)*"),"shard":"(\d+\/\d+)"/;
const isEnd = (line: string): boolean => line.startsWith('{"part":"');

/** Every line names its part, and the last one says how long the part is. */
async function survey(part: PartLines): Promise<Surveyed> {
  const { place } = part;
  let stamp: string | undefined;
  let end: Surveyed['end'] | undefined;
  let lines = 0;
  for await (const line of part.lines()) {
    const at = `${place}:${lines + 1}`;
    if (isEnd(line) && end === undefined) {
      end = endIn(line, at);
      continue;
    }
    const [, , found] = stamped.exec(line) ?? [];
    if (found === undefined || end !== undefined || (stamp !== undefined && found !== stamp)) throw notOfPart(at);
    stamp = found;
    lines++;
  }
  if (end?.lines !== lines || (stamp !== undefined && stamp !== end.part)) throw cutShort(place, lines, end?.lines);
  const [index, of] = end.part.split('/').map(Number) as [number, number];
  const expected = Math.max(0, Math.ceil((end.tables - index + 1) / of));
  if (lines !== expected) throw cutShort(place, lines, expected);
  return { part, index, of, end };
}

function endIn(line: string, place: string): Surveyed['end'] {
  const parsed = partEndDeclaration.safeParse(readable(line));
  if (parsed.success) return parsed.data;
  throw notOfPart(place);
}

function readable(line: string): unknown {
  try {
    return JSON.parse(line);
  } catch {
    return undefined;
  }
}

/** In the order of their numbers, every one there once. */
function arranged(surveyed: readonly Surveyed[]): Surveyed[] {
  const [first] = surveyed as [Surveyed];
  const inOrder: Surveyed[] = [];
  for (const one of surveyed) {
    const { part, index, of, end } = one;
    const common = ({ of: all, end: { part: _, lines: __, ...rest } }: Surveyed) => ({ parts: all, ...rest });
    const [difference] = differencesBetween(common(first), common(one));
    if (difference !== undefined) {
      throw usageProblem({
        code: 'parts-differ',
        message: `this is a part of another run than ${first.part.place}: ${difference.field.replace(/^run\./, '')} is not the same`,
        place: part.place,
        hint: 'name the parts of one run: they need the same tables, options, seed, number of parts and version',
      });
    }
    const before = inOrder[index - 1];
    if (before !== undefined) {
      throw usageProblem({
        code: 'part-twice',
        message: `part ${end.part} is there twice, also as ${before.part.place}`,
        place: part.place,
        hint: 'name every part once',
      });
    }
    inOrder[index - 1] = one;
    if (inOrder.length > of) throw notOfPart(part.place);
  }
  const gaps = Array.from({ length: first.of }, (_, k) => k).filter((k) => inOrder[k] === undefined);
  if (gaps.length === 0) return inOrder;
  const named = gaps.slice(0, 10).map((k) => k + 1);
  throw usageProblem({
    code: 'parts-missing',
    message: `${gaps.length === 1 ? 'part' : 'parts'} ${named.join(', ')}${gaps.length > 10 ? ' and more' : ''} of ${first.of} ${gaps.length === 1 ? 'is' : 'are'} missing`,
    hint: 'run what is missing with --shard, then name all parts',
  });
}

/** In pieces of text, with what the parts were stamped taken away. */
async function* woven(parts: readonly PartLines[]): AsyncGenerator<string> {
  const readers = parts.map((part) => part.lines()[Symbol.asyncIterator]());
  let text = '';
  for (let k = 0; ; k++) {
    const { done, value } = await readers[k % readers.length]!.next();
    if (done || isEnd(value)) break;
    text += `${value.replace(stamped, '$1')}\n`;
    if (text.length < 2 ** 16) continue;
    yield text;
    text = '';
  }
  for (const reader of readers) await reader.return?.();
  yield text;
}

const notOfPart = (place: string): Problem =>
  dataProblem({
    code: 'not-a-part',
    message: 'this line is none of one part of a batch',
    place,
    hint: 'give what keepsum batch --shard wrote, unchanged',
  });

const cutShort = (place: string, lines: number, expected: number | undefined): Problem =>
  dataProblem({
    code: 'part-cut-short',
    message:
      expected === undefined
        ? `this part ends after ${lines} ${lines === 1 ? 'result' : 'results'}, without the line that closes a whole part`
        : `this part holds ${lines} of ${expected} results`,
    place,
    hint: 'make it again; where it was written with --output, --resume goes on with it',
  });
