// When drawing stops for one p, what is known then, and what a sequence refuses.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mixtureAround } from '../../../src/pvalue/sequential/beta-mixture.js';
import type { Decision, Sequence, SequenceOptions } from '../../../src/pvalue/sequential/contract.js';
import { limitsAt } from '../../../src/pvalue/sequential/limits.js';
import { startDoubledSequence, startSequence } from '../../../src/pvalue/sequential/stopping-rule.js';

const standard: SequenceOptions = {
  alpha: 0.05,
  risk: 0.0005,
  targetRelativeError: 0.02,
  limit: 10_000_000,
  blockSize: 1000,
};

/** Blocks whose hits add up to a share of all draws so far, until it stops or `most` draws are made. */
function drawAtShare(sequence: Sequence, share: number, most: number): Decision {
  const before = sequenceDraws(sequence);
  let hits = Math.round(before * share);
  for (let draws = before + 1000; draws <= most; draws += 1000) {
    const next = Math.round(draws * share);
    const decision = sequence.add(next - hits, 1000);
    if (decision.stop) return decision;
    hits = next;
  }
  return { stop: false };
}

function sequenceDraws(sequence: Sequence): number {
  try {
    return sequence.state().draws;
  } catch {
    return 0;
  }
}

describe('drawing stops', () => {
  it('after one block without a hit: settled below, p is the upper limit plus the risk', () => {
    const sequence = startSequence(standard);
    expect(sequence.add(0, 1000)).toEqual({ stop: true, because: 'settled-below' });
    const state = sequence.state();
    expect(state).toMatchObject({
      rule: 'beta-binomial-mixture',
      level: 0.9995,
      risk: 0.0005,
      atLeast: 0,
      draws: 1000,
    });
    expect(state).toMatchObject({ estimate: 0, lower: 0, drawsToSettle: 0 });
    expect(state.upper).toBeCloseTo(0.011233, 6);
    expect(state.p).toBe(state.upper + 0.0005);
  });

  it('after one block with a hit in two draws: settled above', () => {
    const sequence = startSequence(standard);
    expect(sequence.add(500, 1000)).toEqual({ stop: true, because: 'settled-above' });
    expect(sequence.state()).toMatchObject({ estimate: 0.5, drawsToSettle: 0 });
    expect(sequence.state().lower).toBeGreaterThan(0.05);
  });

  it.each([
    [0.05, 166_000],
    [0.02, 1_129_000],
  ])('when the interval is within %d of its middle: for a share of just alpha after %d draws', (target, draws) => {
    const sequence = startSequence({ ...standard, targetRelativeError: target });
    expect(drawAtShare(sequence, 0.05, 10_000_000)).toEqual({ stop: true, because: 'precise-enough' });
    const { lower, upper, draws: made } = sequence.state();
    expect(made).toBe(draws);
    expect((upper - lower) / (upper + lower)).toBeLessThanOrEqual(target);
  });

  it('with the last whole block that fits the limit', () => {
    const sequence = startSequence({ ...standard, limit: 3999 });
    expect(sequence.add(50, 1000)).toEqual({ stop: false });
    expect(sequence.add(50, 1000)).toEqual({ stop: false });
    expect(sequence.add(50, 1000)).toEqual({ stop: true, because: 'limit' });
    expect(sequence.state()).toMatchObject({ draws: 3000, atLeast: 150, drawsToSettle: null });
  });

  it('never for its precision at a target of 0', () => {
    const sequence = startSequence({ ...standard, targetRelativeError: 0 });
    expect(drawAtShare(sequence, 0.05, 2_000_000)).toEqual({ stop: false });
  });

  it('below exactly when the reported p is at or below alpha, for any blocks', () => {
    fc.assert(
      fc.property(paths, ({ blocks, options }) => {
        const sequence = startSequence(options);
        for (const hits of blocks) {
          const decision = sequence.add(hits, 100);
          const { p, lower, upper, estimate } = sequence.state();
          expect(decision.stop && decision.because === 'settled-below').toBe(p <= options.alpha);
          if (decision.stop && decision.because === 'settled-above') expect(lower).toBeGreaterThan(options.alpha);
          expect(p).toBe(Math.min(1, upper + options.risk));
          expect(estimate).toBeGreaterThanOrEqual(0);
          if (decision.stop) return;
        }
      }),
    );
  });
});

describe('the interval', () => {
  it('is what all looks so far agree on', () => {
    fc.assert(
      fc.property(paths, ({ blocks, options }) => {
        const sequence = startSequence(options);
        const mixture = mixtureAround(options.alpha);
        let [lower, upper, hits, draws] = [0, 1, 0, 0];
        for (const more of blocks) {
          sequence.add(more, 100);
          hits += more;
          draws += 100;
          const [low, high] = limitsAt(mixture, options.risk, hits, draws);
          lower = Math.max(lower, low);
          upper = Math.min(upper, high);
          if (lower > upper) return;
          expect(sequence.state()).toMatchObject({ lower, upper, atLeast: hits, draws });
        }
      }),
    );
  });

  it('starts afresh from the latest look when looks exclude each other', () => {
    const sequence = startSequence(standard);
    for (let k = 0; k < 20; k++) sequence.add(0, 1000);
    for (let k = 0; k < 20; k++) sequence.add(1000, 1000);
    const { lower, upper, estimate } = sequence.state();
    expect(estimate).toBe(0.5);
    expect(lower).toBeLessThan(0.5);
    expect(upper).toBeGreaterThan(lower);
  });

  it('goes on shrinking when blocks are added after a stop', () => {
    const sequence = startSequence(standard);
    expect(sequence.add(10, 1000)).toMatchObject({ stop: true });
    const first = sequence.state();
    expect(sequence.add(10, 1000)).toMatchObject({ stop: true, because: 'settled-below' });
    expect(sequence.state().upper).toBeLessThan(first.upper);
    expect(sequence.state().draws).toBe(2000);
  });
});

describe('the draws that would settle it', () => {
  it.each([0.03, 0.04, 0.046, 0.053, 0.06, 0.07])('settle a share of %d, and nine tenths of them do not', (share) => {
    const sequence = startSequence(standard);
    const first = sequence.add(Math.round(1000 * share), 1000);
    expect(first).toEqual({ stop: false });
    const more = sequence.state().drawsToSettle!;
    expect(more % 1000).toBe(0);
    if (more >= 10_000) expect(drawAtShare(sequence, share, 1000 + 0.88 * more)).toEqual({ stop: false });
    expect(drawAtShare(sequence, share, 1000 + 1.05 * more)).toEqual({
      stop: true,
      because: share < 0.05 ? 'settled-below' : 'settled-above',
    });
    expect(sequence.state().drawsToSettle).toBe(0);
  });

  it('are not told for a share from alpha - risk to alpha', () => {
    const sequence = startSequence(standard);
    drawAtShare(sequence, 0.0498, 50_000);
    expect(sequence.state().drawsToSettle).toBeNull();
  });

  it('are told for no hits at all while alpha is small', () => {
    const sequence = startSequence({ ...standard, alpha: 0.001, risk: 0.00001 });
    expect(sequence.add(0, 1000)).toEqual({ stop: false });
    const more = sequence.state().drawsToSettle!;
    expect(drawAtShare(sequence, 0, 1000 + more)).toEqual({ stop: true, because: 'settled-below' });
  });

  it('are two digits of a whole number of blocks', () => {
    const sequence = startSequence({ ...standard, blockSize: 1000 });
    drawAtShare(sequence, 0.0505, 20_000);
    expect(String(sequence.state().drawsToSettle)).toMatch(/^\d\d0+$/);
  });
});

describe('a sequence refuses', () => {
  it.each<[string, Partial<SequenceOptions>, string]>([
    ['a risk as large as the level', { risk: 0.05 }, 'a risk of 0.05 is not between 0 and the level 0.05'],
    ['a risk of 0', { risk: 0 }, 'a risk of 0 is not between 0 and the level 0.05'],
    ['a risk that is no number', { risk: NaN }, 'a risk of NaN is not between 0 and the level 0.05'],
    ['a limit below one block', { limit: 999 }, 'a limit of 999 draws is less than one block of 1000'],
  ])('%s', (_, wrong, message) => {
    for (const start of [startSequence, startDoubledSequence]) {
      expect(() => start({ ...standard, ...wrong })).toThrow(
        expect.objectContaining({ code: 'out-of-range', kind: 'usage', message: expect.stringContaining(message) }),
      );
    }
  });

  it.each([
    [1001, 1000],
    [-1, 1000],
    [0.5, 1000],
    [0, 0],
    [5, 2000],
    [NaN, 1000],
  ])('a look with %d hits in %d draws', (atLeast, draws) => {
    expect(() => startSequence(standard).add(atLeast, draws)).toThrow(RangeError);
    expect(() => startDoubledSequence(standard).add({ upper: 1, lower: atLeast }, draws)).toThrow(RangeError);
  });

  it('to tell its state before the first block', () => {
    expect(() => startSequence(standard).state()).toThrow(RangeError);
    expect(() => startDoubledSequence(standard).state()).toThrow(RangeError);
  });
});

const paths = fc
  .record({
    alpha: fc.constantFrom(0.01, 0.05, 0.2),
    share: fc.double({ min: 0, max: 0.4, noNaN: true }),
    noise: fc.array(fc.double({ min: 0.5, max: 1.5, noNaN: true }), { minLength: 1, maxLength: 60 }),
  })
  .map(({ alpha, share, noise }) => ({
    blocks: noise.map((factor) => Math.min(100, Math.round(100 * share * factor))),
    options: { ...standard, alpha, risk: alpha / 20, blockSize: 100, targetRelativeError: 0.1 },
  }));
