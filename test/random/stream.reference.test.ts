import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { blockStream, Stream } from '../../src/random/stream.js';

describe('a stream', () => {
  it('steps by the inverse of the ChaCha quarter round (test vector of RFC 8439, 2.1.1)', () => {
    const stream = new Stream(0xea2a92f4, 0xcb1cf8ce, 0x4581472e, 0x5881c4bb);
    expect(stream.word() >>> 0).toBe(0xea2a92f4);
    expect(stream.state.map((word) => word >>> 0)).toEqual([0x11111111, 0x01020304, 0x9b8d6f43, 0x01234567]);
  });

  it('starts from the first 128 bits of the SHA-256 of its key', () => {
    const digest = createHash('sha256').update('["my seed","table 1",7]').digest();
    expect(blockStream('my seed', 'table 1', 7).state).toEqual([0, 4, 8, 12].map((at) => digest.readInt32LE(at)));
  });

  it('gives its words as numbers in [0, 1) in steps of 2^-32', () => {
    expect(new Stream(0, 1, 2, 3).uniform()).toBe(0);
    expect(new Stream(-1, 1, 2, 3).uniform()).toBe(1 - 2 ** -32);
    expect(new Stream(-(2 ** 31), 1, 2, 3).uniform()).toBe(0.5);
  });

  it('tells apart seeds, tables and blocks whose texts would run together', () => {
    const starts = [
      blockStream('a', 'b', 1),
      blockStream('a', 'b1', 1),
      blockStream('ab', '', 1),
      blockStream('a","b', '', 1),
      blockStream('a', 'b', 11),
    ].map(({ state }) => state.join());
    expect(new Set(starts).size).toBe(starts.length);
  });
});
