// Bytes in, records out, in constant memory: each record goes to the taker as it is parsed, and none is kept.
import type { Hash } from 'node:crypto';
import { Buffer } from 'node:buffer';
import type { Options } from 'csv-parse';
import { Parser } from 'csv-parse';
import { binaryProblem, headProblem } from './file-text.js';

/** As much as is read before the delimiter is detected. */
export const headSize = 65_536;

/**
 * csv-parse's parser with its output side short-circuited. Its object stream costs more than the counting does; a record pushed here is
 * counted on the spot.
 */
export class RecordParser extends Parser {
  constructor(
    options: Options,
    private readonly taker: (record: readonly string[]) => void,
  ) {
    super(options);
    // Errors come back through the callbacks below; without a listener Node would throw them a second time.
    this.on('error', () => undefined);
  }

  override push(record: unknown): boolean {
    if (record === null) return super.push(null);
    this.taker(record as readonly string[]);
    return true;
  }

  /** Rejects with csv-parse's error. */
  feed(bytes: Buffer): Promise<void> {
    return new Promise((resolve, reject) => {
      this.write(bytes, (error) => (error ? reject(error) : resolve()));
    });
  }

  close(): Promise<void> {
    return new Promise((resolve, reject) => {
      this.once('error', reject);
      this.end(() => resolve());
      this.resume();
    });
  }
}

export interface CheckedBytes {
  readonly bytes: Buffer;
  /** True when these bytes, the first ones, are all there are. */
  readonly whole: boolean;
}

/**
 * The bytes of a source, hashed as they come and checked to be text; the first piece is long enough to detect a
 * delimiter in, and its byte order mark is taken off.
 * @throws Problem (data): `empty-input`, `utf-16-text`, `workbook-file`, `binary-input`
 */
export async function* checkedBytes(
  chunks: AsyncIterable<Uint8Array>,
  sourceName: string,
  hash: Hash,
): AsyncGenerator<CheckedBytes> {
  let offset = 0;
  let head: Buffer[] | undefined = [];
  for await (const chunk of chunks) {
    const bytes = Buffer.from(chunk.buffer, chunk.byteOffset, chunk.byteLength);
    hash.update(bytes);
    if (head === undefined) {
      refuseBinary(bytes, offset, sourceName);
      yield { bytes, whole: false };
    } else {
      head.push(bytes);
      if (offset + bytes.length >= headSize) {
        yield { bytes: checkedHead(Buffer.concat(head), sourceName), whole: false };
        head = undefined;
      }
    }
    offset += bytes.length;
  }
  if (head !== undefined) yield { bytes: checkedHead(Buffer.concat(head), sourceName), whole: true };
}

function checkedHead(head: Buffer, sourceName: string): Buffer {
  const problem = headProblem(head, sourceName);
  if (problem !== undefined) throw problem;
  refuseBinary(head, 0, sourceName);
  const marked = head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf;
  return marked ? head.subarray(3) : head;
}

function refuseBinary(bytes: Buffer, offset: number, sourceName: string): void {
  const problem = binaryProblem(bytes, offset, sourceName);
  if (problem !== undefined) throw problem;
}
