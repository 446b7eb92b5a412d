// Parts of a batch woven together: table k of the whole run is the next line of part ((k - 1) mod parts) + 1.
import { dataProblem, usageProblem } from '../problem/problem.js';

interface Stamped {
  readonly shard?: unknown;
}

/** Whether a text is lines of a batch's part, rather than one result. */
export function areLines(text: string): boolean {
  const [first] = text.split('\n', 1);
  try {
    return typeof (JSON.parse(first ?? '') as Stamped).shard === 'string';
  } catch {
    return false;
  }
}

/** @param parts texts of all parts, in any order. @throws Problem: `parts-differ`, `part-twice`, `parts-missing`, `not-a-part`. */
export function mergeLines(parts: readonly { readonly place: string; readonly text: string }[]): string {
  const read = parts.map(({ place, text }) => stampedLines(text, place));
  const of = read[0]!.of;
  const inOrder: string[][] = [];
  read.forEach(({ index, of: other, lines }, k) => {
    const { place } = parts[k]!;
    if (other !== of) {
      throw usageProblem({
        code: 'parts-differ',
        message: `this is a part of ${other}, the first one of ${of}`,
        place,
        hint: 'name the parts of one run',
      });
    }
    if (inOrder[index - 1] !== undefined) {
      throw usageProblem({
        code: 'part-twice',
        message: `part ${index} of ${of} is there twice`,
        place,
        hint: 'name every part once',
      });
    }
    inOrder[index - 1] = lines;
  });
  const gaps = Array.from({ length: of }, (_, k) => k).filter((k) => inOrder[k] === undefined);
  if (gaps.length > 0) {
    throw usageProblem({
      code: 'parts-missing',
      message: `part ${gaps[0]! + 1} of ${of} is missing`,
      hint: 'run what is missing with --shard, then name all parts',
    });
  }
  const all = inOrder.reduce((sum, lines) => sum + lines.length, 0);
  const woven: string[] = [];
  for (let k = 0; k < all; k++) {
    const line = inOrder[k % of]![Math.floor(k / of)];
    if (line === undefined) {
      throw usageProblem({
        code: 'parts-differ',
        message: 'the parts have not as many lines as parts of one run would',
        hint: 'a part is cut short, or belongs to another run: make it again',
      });
    }
    woven.push(line);
  }
  return woven.map((line) => `${line}\n`).join('');
}

const stamp = /^(\d+)\/(\d+)$/;

/** Every line names its part; in the whole run none does. */
function stampedLines(text: string, place: string): { index: number; of: number; lines: string[] } {
  let part: string | undefined;
  const lines = text
    .split('\n')
    .filter((line) => line !== '')
    .map((line, k) => {
      const match = /^(\{"key":"(?:[^"\\]|\\.)*"),"shard":"(\d+\/\d+)"/.exec(line);
      if (match === null || (part !== undefined && match[2] !== part)) {
        throw dataProblem({
          code: 'not-a-part',
          message: 'this line is none of one part of a batch',
          place: `${place}:${k + 1}`,
          hint: 'give what keepsum batch --shard wrote, unchanged',
        });
      }
      part = match[2]!;
      return match[1]! + line.slice(match[0].length);
    });
  const [, index, of] = stamp.exec(part ?? '') ?? [];
  if (index === undefined || of === undefined) {
    throw dataProblem({
      code: 'not-a-part',
      message: 'there are no lines',
      place,
      hint: 'give what keepsum batch --shard wrote, unchanged',
    });
  }
  return { index: Number(index), of: Number(of), lines };
}
