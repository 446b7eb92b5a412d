// Bytes of a file or a pipe to lines of text, in the chunks that a batch works on; memory does not depend on the length of the file.
import { StringDecoder } from 'node:string_decoder';
import { binaryProblem, headProblem } from '../input/file-text.js';
import { dataProblem, type Problem } from '../problem/problem.js';
import type { Chunk, UnitSource } from './chunk.js';

/** In characters: far beyond any table of counts. */
const longestLine = 2 ** 24;

/** Lines as they come: every line that is whole is handed on before more is waited for. A blank line is a unit, too. */
export class LineSource implements UnitSource {
  /** Bytes of the pieces read so far. */
  bytesRead = 0;
  private readonly pieces: AsyncIterator<Uint8Array>;
  private readonly decoder = new StringDecoder('utf8');
  private lines: string[] = [];
  private at = 0;
  /** What stands behind the last line feed. */
  private rest = '';
  private ended = false;
  /** What is wrong behind the lines that are still to be handed on. */
  private failure: Problem | undefined;
  /** Lines handed on. */
  private number = 0;

  constructor(
    bytes: AsyncIterable<Uint8Array>,
    private readonly sourceName: string,
    /** Whether no bytes at all are no tables, rather than a slip. */
    private readonly mayBeEmpty = false,
  ) {
    this.pieces = bytes[Symbol.asyncIterator]();
  }

  /** @throws Problem (data): that the source cannot be read, `empty-input`, `utf-16-text`, `workbook-file`, `binary-input`, `long-line` */
  async next(most: number): Promise<Chunk | null> {
    while (this.at === this.lines.length) {
      this.refuse(this.failure);
      if (this.ended) return null;
      await this.readOn();
    }
    const lines = this.lines.slice(this.at, this.at + most);
    this.at += lines.length;
    const first = this.number + 1;
    this.number += lines.length;
    return { kind: 'lines', lines, first };
  }

  private async readOn(): Promise<void> {
    const { done, value } = await this.pieces.next();
    let bytes = done ? new Uint8Array() : value;
    if (this.bytesRead === 0 && !(done && this.mayBeEmpty)) this.refuse(headProblem(bytes, this.sourceName));
    this.failure = binaryProblem(bytes, this.bytesRead, this.sourceName);
    // The lines before it are whole, and are answered first.
    if (this.failure !== undefined) bytes = bytes.subarray(0, bytes.lastIndexOf(0x0a, bytes.indexOf(0)) + 1);
    const text = done
      ? this.decoder.end()
      : this.decoder.write(Buffer.from(bytes.buffer, bytes.byteOffset, bytes.length));
    this.lines = (this.rest + (this.bytesRead === 0 ? text.replace(/^\ufeff/, '') : text)).split('\n');
    this.bytesRead += bytes.length;
    this.at = 0;
    this.ended = done === true;
    this.rest = this.lines.at(-1)!;
    if (!this.ended || this.rest === '') this.lines.pop();
    if (this.rest.length > longestLine)
      this.refuse(longLine(`${this.sourceName}:${this.number + this.lines.length + 1}`));
  }

  private refuse(problem: Problem | undefined): void {
    if (problem !== undefined) throw problem;
  }
}

const longLine = (place: string): Problem =>
  dataProblem({
    code: 'long-line',
    message: `this line is longer than ${longestLine} characters`,
    place,
    hint: 'write one table a line, with a line feed after each',
  });
