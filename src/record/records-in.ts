// The records in a file: one JSON result, many lines of results, or the one inside an html report.
import { dataProblem } from '../problem/problem.js';

export interface Found {
  readonly record: unknown;
  readonly place: string;
}

/**
 * @param lines of the file, one by one, so that a long file of results is never held whole.
 * @throws Problem (data): `empty-input`, `not-json`, `no-record-inside`.
 */
export async function* recordsIn(lines: AsyncIterable<string>, sourceName: string): AsyncGenerator<Found> {
  let number = 0;
  let whole: string[] | undefined;
  for await (const line of lines) {
    number++;
    const text = number === 1 ? line.replace(/^\ufeff/, '') : line;
    if (whole !== undefined) {
      whole.push(text);
      continue;
    }
    if (text.trim() === '') continue;
    const record = parsed(text);
    // A first line that is no JSON of its own is the beginning of a longer text.
    if (record === undefined && number === 1) whole = [text];
    else if (record === undefined) throw notJson(`${sourceName}:${number}`);
    else yield { record, place: `${sourceName}:${number}` };
  }
  if (number === 0)
    throw dataProblem({
      code: 'empty-input',
      message: 'the file is empty',
      place: sourceName,
      hint: 'give what --format json or keepsum batch wrote',
    });
  if (whole === undefined) return;
  const text = whole.join('\n');
  const record = parsed(/^\s*</.test(text) ? inside(text, sourceName) : text);
  if (record === undefined) throw notJson(sourceName);
  // A page of several results holds a list.
  for (const each of Array.isArray(record) ? (record as unknown[]) : [record])
    yield { record: each, place: sourceName };
}

/** An html report carries its record in a script element that runs nothing. */
function inside(html: string, sourceName: string): string {
  const match = /<script\b[^>]*\bid="keepsum-record"[^>]*>([\s\S]*?)<\/script>/.exec(html);
  if (match !== null) return match[1]!;
  throw dataProblem({
    code: 'no-record-inside',
    message: 'this page holds no record of keepsum',
    place: sourceName,
    hint: 'give a page that --format html wrote, or a JSON result',
  });
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined;
  }
}

const notJson = (place: string): Error =>
  dataProblem({
    code: 'not-json',
    message: 'this is not JSON',
    place,
    hint: 'give what --format json, keepsum batch or --format html wrote, unchanged',
  });
