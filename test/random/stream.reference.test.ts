import seedrandom from 'seedrandom';
import { describe, expect, it } from 'vitest';
import { blockStream, Stream } from '../../src/random/stream.js';

describe('a stream', () => {
  it('steps by the inverse of the ChaCha quarter round (test vector of RFC 8439, 2.1.1)', () => {
    const stream = new Stream(0xea2a92f4, 0xcb1cf8ce, 0x4581472e, 0x5881c4bb);
    expect(stream.word() >>> 0).toBe(0xea2a92f4);
    expect(stream.state.map((word) => word >>> 0)).toEqual([0x11111111, 0x01020304, 0x9b8d6f43, 0x01234567]);
  });

  it("starts from the first 128 bits that seedrandom's xor4096 gives for its key", () => {
    const spread = seedrandom.xor4096('["my seed","table 1",7]');
    expect(blockStream('my seed', 'table 1', 7).state).toEqual([0, 1, 2, 3].map(() => spread.int32()));
  });

  it('starts from other bits wherever keys differ, however little: of 30,000 neighbours no two share 64 of them', () => {
    const starts = new Set<string>();
    for (let block = 0; block < 10_000; block++) {
      for (const key of [
        ['a', ''],
        ['b', ''],
        ['a', 'x'],
      ] as const) {
        const [a, b, c, d] = blockStream(key[0], key[1], block).state;
        starts.add(`${a},${b}`).add(`${c},${d}`);
      }
    }
    expect(starts.size).toBe(60_000);
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
