// Bytes of a file to text, or a refusal that says what the file is instead: empty, UTF-16, a workbook, binary, not UTF-8.
// A wrong guess at an encoding would damage labels in silence, so only UTF-8 is read (with or without a byte order mark).
import type { Problem } from '../problem/problem.js';
import { dataProblem } from '../problem/problem.js';

const saveAs = 'save it as CSV in UTF-8 and try again';

const startsWith = (bytes: Uint8Array, ...head: number[]): boolean =>
  head.every((byte, index) => bytes[index] === byte);

/** What the first bytes give away, or undefined for what may be text. */
export function headProblem(head: Uint8Array, sourceName: string): Problem | undefined {
  if (head.length === 0) {
    return dataProblem({
      code: 'empty-input',
      message: 'there is nothing to read (0 bytes)',
      place: sourceName,
      hint: 'give a file with counts in it, or type the rows: keepsum test 8,2 1,9',
    });
  }
  if (startsWith(head, 0xff, 0xfe) || startsWith(head, 0xfe, 0xff)) {
    return dataProblem({
      code: 'utf-16-text',
      message: 'the text is in UTF-16, not in UTF-8',
      place: sourceName,
      hint: saveAs,
    });
  }
  if (startsWith(head, 0x50, 0x4b, 0x03, 0x04)) {
    return dataProblem({
      code: 'workbook-file',
      message: 'this is a spreadsheet workbook or another zipped file, not text',
      place: sourceName,
      hint: 'open it in the spreadsheet and save the sheet as CSV in UTF-8',
    });
  }
  return undefined;
}

/** NUL bytes stand in no text file. @param offset how many bytes were read before these */
export function binaryProblem(bytes: Uint8Array, offset: number, sourceName: string): Problem | undefined {
  const at = bytes.indexOf(0);
  if (at < 0) return undefined;
  return dataProblem({
    code: 'binary-input',
    message: `this is not text: byte ${offset + at + 1} is NUL`,
    place: sourceName,
    hint: saveAs,
  });
}

export const notUtf8 = (place: string): Problem =>
  dataProblem({
    code: 'not-utf-8',
    message: 'the text is not UTF-8, so its labels cannot be read faithfully',
    place,
    hint: saveAs,
  });

/**
 * The whole text of a file, without its byte order mark.
 * @throws Problem (data): `empty-input`, `utf-16-text`, `workbook-file`, `binary-input`, `not-utf-8`
 */
export function decodeText(bytes: Uint8Array, sourceName: string): string {
  const problem = headProblem(bytes, sourceName) ?? binaryProblem(bytes, 0, sourceName);
  if (problem !== undefined) throw problem;
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw notUtf8(fileAndLine(bytes, sourceName));
  }
}

/** The line on which the first damaged character stands: good enough to find it, and never wrong. */
function fileAndLine(bytes: Uint8Array, sourceName: string): string {
  const lenient = new TextDecoder('utf-8').decode(bytes);
  const damaged = lenient.indexOf('\ufffd');
  const before = lenient.slice(0, Math.max(damaged, 0));
  return `${sourceName}:${before.split(/\r\n|\r|\n/).length}`;
}
