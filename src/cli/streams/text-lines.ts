// Bytes to lines of text, one by one.
import { createInterface } from 'node:readline';
import { Readable } from 'node:stream';

export const textLines = (bytes: AsyncIterable<Uint8Array>): AsyncIterable<string> =>
  createInterface({ input: Readable.from(bytes, { objectMode: false }), crlfDelay: Infinity });
