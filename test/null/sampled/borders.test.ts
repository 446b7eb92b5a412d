// What a million draws never meet: words that fall on a border between two outcomes, which 32 bits cannot tell apart.
import { describe, expect, it } from 'vitest';
import { prepareSampler } from '../../../src/null/sampled/sample-cuts.js';
import { invert } from '../../../src/null/sampled/hypergeometric/inversion.js';
import { HypergeometricMass } from '../../../src/null/sampled/hypergeometric/mass.js';
import { Guide } from '../../../src/null/sampled/hypergeometric/guide.js';
import { Trial } from '../../../src/null/sampled/hypergeometric/trial.js';
import type { UniformSource } from '../../../src/random/stream.js';
import { liveFrom } from '../../helpers/tables.js';

/** Hands out the given numbers in [0, 1), rounded down to 32 bits, and counts them; throws when there are no more. */
function scripted(...numbers: number[]): UniformSource & { taken: number } {
  const source = {
    taken: 0,
    word: () => {
      if (source.taken === numbers.length) throw new Error('one word too many');
      return Math.floor(numbers[source.taken++]! * 2 ** 32) | 0;
    },
    uniform: () => (source.word() >>> 0) / 2 ** 32,
  };
  return source;
}

// One of three units drawn, one marked: 1/3 carry it. 2^32/3 is no whole number, so one word of 2^32 straddles the border.
const third = 1 / 3;
const step = 2 ** -32;

describe('inversion', () => {
  const mass = new HypergeometricMass(3);
  const outcome = (...numbers: number[]): [count: number, words: number] => {
    const source = scripted(...numbers);
    return [invert(source, source.word(), mass, 3, 1, 1), source.taken];
  };

  it('takes one word where that decides, and a second one where it does not', () => {
    // The mode 0 has 2/3 of the mass.
    expect(outcome(2 * third - step)).toEqual([0, 1]);
    expect(outcome(2 * third + step)).toEqual([1, 1]);
    expect(outcome(2 * third, 0.1)).toEqual([0, 2]);
    expect(outcome(2 * third, 0.9)).toEqual([1, 2]);
  });

  it('gives a rare outcome the share of the second word that is left for it', () => {
    // 2^40 units, one marked, one drawn: the marked one comes once in 2^40 draws, that is 2^-8 of the last word.
    const rare = new HypergeometricMass(2 ** 40);
    const last = (second: number): number => {
      const source = scripted(1 - step, second);
      return invert(source, source.word(), rare, 2 ** 40, 1, 1);
    };
    expect(last(1 - 2 ** -8 + 0.001)).toBe(1);
    expect(last(1 - 2 ** -8 - 0.001)).toBe(0);
  });
});

describe('a guide', () => {
  const guide = new Guide({
    law: { kind: 'hypergeometric', total: 3, fixed: 1 },
    varying: { from: 1, length: 2 },
    outcomes: { from: 0, length: 2 },
    shares: 64,
  });
  const outcome = (value: number, ...numbers: number[]): [count: number, words: number] => {
    const source = scripted(...numbers);
    return [guide.select(source, value, source.word(), false), source.taken];
  };
  const byHalf = (value: number, ...numbers: number[]): [count: number, words: number] => {
    const source = scripted(...numbers);
    return [guide.select(source, value, source.word(), true), source.taken];
  };

  it('takes one word where that decides, and a second one where it does not', () => {
    for (const laidOut of [false, true]) {
      expect(outcome(1, 2 * third, 0.1), String(laidOut)).toEqual([0, 2]);
      expect(outcome(1, 2 * third, 0.9)).toEqual([1, 2]);
    }
    expect(outcome(1, 0)).toEqual([0, 1]);
    expect(outcome(1, 2 * third - step)).toEqual([0, 1]);
    expect(outcome(1, 2 * third + step)).toEqual([1, 1]);
    expect(outcome(1, 1 - step)).toEqual([1, 1]);
    expect(outcome(2, third, 0.2)).toEqual([0, 2]);
    expect(outcome(2, third, 0.8)).toEqual([1, 2]);
  });

  it('with half a word goes by the upper half, and asks for a word where that does not decide', () => {
    const halfStep = 2 ** -16;
    expect(byHalf(1, 0.25)).toEqual([0, 1]);
    expect(byHalf(1, 0.75)).toEqual([1, 1]);
    // 2/3 lies in the stretch that begins at 43690 / 2^16, two thirds into it; what the lower half says does not count.
    expect(byHalf(1, 2 * third, 0.6)).toEqual([0, 2]);
    expect(byHalf(1, 2 * third, 0.7)).toEqual([1, 2]);
    expect(byHalf(1, 43690 * halfStep, 0.7)).toEqual([1, 2]);
    // In the share of the border, but not on it: the word that fills the place of the lower half changes nothing.
    expect(byHalf(1, 2 * third - 2 * halfStep, 0.99)).toEqual([0, 2]);
    expect(byHalf(1, 2 * third + 2 * halfStep, 0.01)).toEqual([1, 2]);
  });

  it('has no answer for a law that it does not hold', () => {
    expect(outcome(0, 0.5)).toEqual([-1, 1]);
    expect(outcome(3, 0.5)).toEqual([-1, 1]);
  });
});

describe('a trial', () => {
  // Three units to come, each taken with probability 1/2: 0 is kept with 1/3 of the chance of 1.
  const trial = new Trial({ share: 0.5, mostUnits: 10, units: { from: 3, length: 1 }, taken: { from: 0, length: 2 } });
  const kept = (units: number, taken: number, half: number, ...numbers: number[]): [boolean, number] => {
    const source = scripted(...numbers);
    return [trial.keeps(source, units, taken, half), source.taken];
  };
  // 2^16 / 3 = 21845 + 1/3.
  const border = 21845;

  it('is decided by half a word, and by one word more where that does not suffice', () => {
    expect(kept(3, 0, border - 1)).toEqual([true, 0]);
    expect(kept(3, 0, border + 1)).toEqual([false, 0]);
    expect(kept(3, 0, border, 0.33)).toEqual([true, 1]);
    expect(kept(3, 0, border, 0.34)).toEqual([false, 1]);
    expect(kept(3, 1, 65_535)).toEqual([true, 0]);
  });

  it('works out what its grid does not hold, and never keeps what cannot be', () => {
    expect(kept(3, 3, border - 1)).toEqual([true, 0]);
    expect(kept(3, 3, border + 1)).toEqual([false, 0]);
    expect(kept(1, 1, 65_535)).toEqual([true, 0]);
    expect(kept(3, 4, 0)).toEqual([false, 0]);
    expect(kept(3, -1, 0)).toEqual([false, 0]);
  });
});

describe('labels', () => {
  it('out of the bag: a second word decides between two units that half a word cannot tell apart', () => {
    const drawn = (...numbers: number[]): number[] => {
      const table = [0, 0, 0, 0];
      prepareSampler(
        liveFrom([
          [1, 0],
          [0, 2],
        ]),
        [],
        { prefer: 'labels' },
      ).drawTable(scripted(...numbers), table);
      return table;
    };
    // Three units, the first of them in the smaller column; one is drawn.
    const half = 2 ** -16;
    expect(drawn(third - half)).toEqual([1, 0, 0, 2]);
    expect(drawn(third + half)).toEqual([0, 1, 1, 1]);
    expect(drawn(third, 0.2)).toEqual([1, 0, 0, 2]);
    expect(drawn(third, 0.8)).toEqual([0, 1, 1, 1]);
  });

  it('out of the bag: half a word for each unit', () => {
    const source = scripted(0.999, 0.999);
    const table = [0, 0, 0, 0];
    prepareSampler(
      liveFrom([
        [2, 1],
        [0, 2],
      ]),
      [],
      { prefer: 'labels' },
    ).drawTable(source, table);
    expect(source.taken).toBe(1);
  });

  it('searched for: likewise with whole words, and from the largest column on', () => {
    const drawn = (...numbers: number[]): number[] => {
      const table = [0, 0, 0, 0];
      prepareSampler(
        liveFrom([
          [1, 0],
          [99, 200],
        ]),
        [],
        { prefer: 'labels' },
      ).drawTable(scripted(...numbers), table);
      return table;
    };
    expect(drawn(2 * third - step)).toEqual([0, 1, 100, 199]);
    expect(drawn(2 * third + step)).toEqual([1, 0, 99, 200]);
    expect(drawn(2 * third, 0.2)).toEqual([0, 1, 100, 199]);
    expect(drawn(2 * third, 0.8)).toEqual([1, 0, 99, 200]);
  });
});
