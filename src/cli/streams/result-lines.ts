// A stream of result lines, read one by one; only what a family needs of each is kept.
import { readResultLine, type FailedTest, type FoundTest } from '../../family/read-results.js';
import { dataProblem } from '../../problem/problem.js';
import { textLines } from './text-lines.js';

/** @throws Problem (data): `empty-input`, and those of a line. */
export async function resultsIn(
  bytes: AsyncIterable<Uint8Array>,
  sourceName: string,
): Promise<(FoundTest | FailedTest)[]> {
  const results: (FoundTest | FailedTest)[] = [];
  let number = 0;
  for await (const line of textLines(bytes)) {
    number++;
    const text = number === 1 ? line.replace(/^\ufeff/, '') : line;
    if (text.trim() !== '' && !text.startsWith('{"part":'))
      results.push(readResultLine(text, `${sourceName}:${number}`, number));
  }
  if (results.length > 0) return results;
  throw dataProblem({
    code: 'empty-input',
    message: 'there are no results',
    place: sourceName,
    hint: 'give the output of keepsum batch, one result a line',
  });
}
