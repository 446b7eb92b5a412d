// Streams are even, their parts do not know of each other, and neither do neighbouring blocks. Fixed keys; the family of tests is held
// to Holm's procedure at 1e-6.
import { describe, expect, it } from 'vitest';
import { blockStream } from '../../src/random/stream.js';
import { chiSquareUpperTail } from '../../src/numeric/chi-square-tail.js';
import { fit, rejectedByHolm, type Verdict } from '../null/sampled/proof/fit.js';

const verdicts: Verdict[] = [];
const record = (name: string, p: number): void => {
  verdicts.push({ name, p });
  expect(p).toBeGreaterThan(1e-9);
};
const even = (classes: number): Float64Array => new Float64Array(classes).fill(1 / classes);

describe('one stream', () => {
  it('fills the classes of its high bits and of its low bits evenly', () => {
    const stream = blockStream('evenness', '', 0);
    const high = new Float64Array(4096);
    const low = new Float64Array(4096);
    for (let k = 0; k < 4_000_000; k++) {
      const word = stream.word();
      high[word >>> 20]!++;
      low[word & 4095]!++;
    }
    record('high bits', fit(even(4096), high));
    record('low bits', fit(even(4096), low));
  });

  it.each([1, 2, 3, 4, 5])('fills the classes of pairs at distance %i evenly, high bits and low bits', (lag) => {
    const stream = blockStream('pairs', String(lag), 0);
    const words = Int32Array.from({ length: 1_000_000 + lag }, () => stream.word());
    const high = new Float64Array(4096);
    const low = new Float64Array(4096);
    for (let k = 0; k < 1_000_000; k++) {
      high[((words[k]! >>> 26) << 6) | (words[k + lag]! >>> 26)]!++;
      low[((words[k]! & 63) << 6) | (words[k + lag]! & 63)]!++;
    }
    record(`high pairs at ${lag}`, fit(even(4096), high));
    record(`low pairs at ${lag}`, fit(even(4096), low));
  });

  it('waits for a rare event as long as chance does', () => {
    // Gaps between words in the lowest 1/64: geometric.
    const stream = blockStream('gaps', '', 0);
    const gaps = new Float64Array(600);
    for (let found = 0, gap = 0; found < 40_000; gap++) {
      if (stream.word() >>> 26 !== 0) continue;
      gaps[Math.min(gap, 599)]!++;
      found++;
      gap = -1;
    }
    const law = gaps.map((_, k) => (k < 599 ? (63 / 64) ** k / 64 : (63 / 64) ** 599));
    record('gaps', fit(law, gaps));
  });
});

describe('neighbouring blocks', () => {
  it('start anywhere: every bit of their first words is set half the time and does not follow the block before', () => {
    const blocks = 60_000;
    let chiSquare = 0;
    let changes = 0;
    const set = new Float64Array(128);
    const changed = new Float64Array(128);
    let before = blockStream('starts', 'table', 0).state;
    for (let block = 1; block <= blocks; block++) {
      const { state } = blockStream('starts', 'table', block);
      for (let bit = 0; bit < 128; bit++) {
        set[bit]! += (state[bit >> 5]! >>> (bit & 31)) & 1;
        changed[bit]! += ((state[bit >> 5]! ^ before[bit >> 5]!) >>> (bit & 31)) & 1;
      }
      before = state;
    }
    for (let bit = 0; bit < 128; bit++) {
      chiSquare += (set[bit]! - blocks / 2) ** 2 / (blocks / 4);
      changes += (changed[bit]! - blocks / 2) ** 2 / (blocks / 4);
    }
    record('bits of starts', chiSquareUpperTail(chiSquare, 128).p);
    record('changes of starts', chiSquareUpperTail(changes, 128).p);
  });

  it('do not move together: pairs of words at the same place are even', () => {
    const pairs = new Float64Array(4096);
    let left = blockStream('side by side', 'table', 0);
    for (let block = 1; block <= 2000; block++) {
      const here = blockStream('side by side', 'table', block);
      const again = blockStream('side by side', 'table', block);
      for (let k = 0; k < 1000; k++) pairs[((left.word() >>> 26) << 6) | (here.word() >>> 26)]!++;
      left = again;
    }
    record('side by side', fit(even(4096), pairs));
  });

  it('do not move together under seeds that differ by one letter', () => {
    const pairs = new Float64Array(4096);
    for (let seed = 0; seed < 2000; seed++) {
      const one = blockStream(`seed ${seed}`, 'table', 0);
      const other = blockStream(`seed ${seed + 1}`, 'table', 0);
      for (let k = 0; k < 1000; k++) pairs[((one.word() >>> 26) << 6) | (other.word() >>> 26)]!++;
    }
    record('seeds', fit(even(4096), pairs));
  });
});

describe('all these tests', () => {
  it("are not rejected by Holm's procedure at 1e-6", () => {
    expect(verdicts).toHaveLength(17);
    expect(rejectedByHolm(verdicts, 1e-6)).toEqual([]);
  });
});
