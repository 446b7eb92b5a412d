// Laws of the limits of one look, for any counts up to 1e12 draws, any level and any risk.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { logEvidence, mixtureAround } from '../../../src/pvalue/sequential/beta-mixture.js';
import { allowedDeviance, deviance, limitsAt } from '../../../src/pvalue/sequential/limits.js';

const many = { numRuns: 2000 };

const looks = fc
  .record({
    draws: fc.oneof(
      fc.integer({ min: 1, max: 50 }),
      fc.integer({ min: 1, max: 1e5 }),
      fc.integer({ min: 1, max: 1e12 }),
    ),
    share: fc.oneof(
      fc.constantFrom(0, 1),
      fc.double({ min: 0, max: 1, noNaN: true }),
      fc.double({ min: 0, max: 1e-9, noNaN: true }),
    ),
    level: fc.oneof(
      fc.constantFrom(1e-9, 1e-4, 0.01, 0.05, 0.5, 0.99),
      fc.double({ min: 1e-6, max: 0.999999, noNaN: true }),
    ),
    risk: fc.constantFrom(0.2, 0.01, 5e-4, 1e-9, 1e-100, 1e-300),
  })
  .map(({ draws, share, level, risk }) => ({ draws, hits: Math.round(draws * share), level, risk }));

describe('the limits of one look', () => {
  it('hold the share seen, strictly inside unless it is 0 or 1', () => {
    fc.assert(
      fc.property(looks, ({ hits, draws, level, risk }) => {
        const [lower, upper] = limitsAt(mixtureAround(level), risk, hits, draws);
        expect(lower).toBeGreaterThanOrEqual(0);
        expect(upper).toBeLessThanOrEqual(1);
        expect(lower).toBeLessThan(upper);
        if (hits === 0) expect(lower).toBe(0);
        else expect(lower).toBeLessThan(hits / draws);
        if (hits === draws) expect(upper).toBe(1);
        else expect(upper).toBeGreaterThan(hits / draws);
      }),
      many,
    );
  });

  it('are where the mixture beats the likelihood by 1 / risk', () => {
    fc.assert(
      fc.property(looks, ({ hits, draws, level, risk }) => {
        const mixture = mixtureAround(level);
        const allowed = allowedDeviance(mixture, risk, hits, draws);
        for (const p of limitsAt(mixture, risk, hits, draws)) {
          if (p < 1e-290 || p === 1) continue;
          // A limit near 1, or told by its distance from 1, is known to 2^-52; one near 0 to as many digits as any double.
          const known = hits > draws / 2 || p > 0.5 ? 2 ** -52 : 2 ** -52 * p;
          const rounding = 1e-9 + (known * draws * Math.abs(p - hits / draws)) / (p * (1 - p)) / allowed;
          expect(Math.abs(deviance(hits, draws, p) / allowed - 1)).toBeLessThan(rounding);
        }
      }),
      many,
    );
  });

  it('move up with every further hit', () => {
    fc.assert(
      fc.property(
        looks.filter(({ draws }) => draws <= 1e6),
        ({ hits, draws, level, risk }) => {
          if (hits === draws) return;
          const mixture = mixtureAround(level);
          const [lower, upper] = limitsAt(mixture, risk, hits, draws);
          const [higherLower, higherUpper] = limitsAt(mixture, risk, hits + 1, draws);
          expect(higherLower).toBeGreaterThanOrEqual(lower);
          expect(higherUpper).toBeGreaterThanOrEqual(upper);
        },
      ),
      many,
    );
  });

  it('stay limits where the lower one is below every double with all its digits', () => {
    const mixture = mixtureAround(0.001);
    for (const hits of [1, 2, 3]) {
      for (const risk of [1e-300, 1e-306, 1e-308]) {
        for (const draws of [3, 10, 1000, 1e6]) {
          const [lower, upper] = limitsAt(mixture, risk, hits, draws);
          expect(lower).toBeGreaterThanOrEqual(0);
          expect(lower).toBeLessThan(hits / draws);
          expect(upper).toBeGreaterThanOrEqual(hits / draws);
          expect(upper).toBeLessThanOrEqual(1);
        }
      }
    }
  });

  it('are wider at a smaller risk', () => {
    fc.assert(
      fc.property(looks, ({ hits, draws, level, risk }) => {
        const mixture = mixtureAround(level);
        const [lower, upper] = limitsAt(mixture, risk, hits, draws);
        const [widerLower, widerUpper] = limitsAt(mixture, risk / 10, hits, draws);
        expect(widerLower).toBeLessThanOrEqual(lower);
        expect(widerUpper).toBeGreaterThanOrEqual(upper);
      }),
      many,
    );
  });
});

describe('the evidence of the mixture', () => {
  it('is a probability law over sequences: a further draw splits it into hit and miss', () => {
    fc.assert(
      fc.property(
        fc
          .integer({ min: 1, max: 3000 })
          .chain((draws) => fc.tuple(fc.integer({ min: 0, max: draws }), fc.constant(draws))),
        fc.constantFrom(0.001, 0.05, 0.5, 0.9),
        ([hits, draws], level) => {
          const mixture = mixtureAround(level);
          // ln probability of one given sequence: evidence plus the likelihood of its own share.
          const sequence = (b: number, m: number): number =>
            logEvidence(mixture, b, m) + xLogX(b) + xLogX(m - b) - xLogX(m);
          const split =
            Math.exp(sequence(hits + 1, draws + 1) - sequence(hits, draws)) +
            Math.exp(sequence(hits, draws + 1) - sequence(hits, draws));
          expect(Math.abs(split - 1)).toBeLessThan(1e-9);
        },
      ),
      many,
    );
  });

  it('never beats the best single p', () => {
    fc.assert(
      fc.property(looks, ({ hits, draws, level }) => {
        expect(logEvidence(mixtureAround(level), hits, draws)).toBeLessThanOrEqual(1e-6);
      }),
      many,
    );
  });
});

const xLogX = (x: number): number => (x === 0 ? 0 : x * Math.log(x));
