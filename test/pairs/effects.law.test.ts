// Effects of pairs against what defines them: tails, likelihoods and derivatives worked out anew.
import { jStat } from 'jstat';
import { describe, expect, it } from 'vitest';
import { logFactorial } from '../../src/numeric/log-factorial.js';
import { kappaEffect } from '../../src/pairs/kappa-effect.js';
import { matchedDifference } from '../../src/pairs/matched-difference.js';
import { matchedOddsRatio } from '../../src/pairs/matched-odds-ratio.js';
import { agreementOf, kappaMoments } from '../../src/statistic/kappa-moments.js';
import { liveTable } from '../../src/table/live-table.js';
import { makeTable } from '../../src/table/table.js';

const z = jStat.normal.inv(0.975, 0, 1);
const binomial = (k: number, n: number, q: number): number =>
  Math.exp(logFactorial(n) - logFactorial(k) - logFactorial(n - k) + k * Math.log(q) + (n - k) * Math.log1p(-q));

describe('the matched odds ratio', () => {
  it('mid-p limits leave 2.5% in either tail with the observed count by half', async () => {
    for (const [there, back] of [
      [7, 3],
      [1, 9],
      [40, 31],
    ] as const) {
      const { intervals } = await matchedOddsRatio(there, back, 0.95);
      const m = there + back;
      const mid = (odds: number): number => {
        const q = odds / (1 + odds);
        let sum = binomial(there, m, q) / 2;
        for (let x = there + 1; x <= m; x++) sum += binomial(x, m, q);
        return sum;
      };
      expect(mid(intervals[1]!.lower as number)).toBeCloseTo(0.025, 10);
      expect(mid(intervals[1]!.upper as number)).toBeCloseTo(0.975, 10);
    }
  });

  it('has infinite and zero limits where all went one way, and none where nothing changed', async () => {
    const all = await matchedOddsRatio(7, 0, 0.95);
    expect(all.estimate).toBe('infinity');
    expect(all.intervals.map(({ upper }) => upper)).toEqual(['infinity', 'infinity']);
    const none = await matchedOddsRatio(0, 0, 0.95);
    expect(none).toMatchObject({ estimate: null, reason: 'no-discordant-pairs' });
  });
});

describe('the difference of matched shares', () => {
  it('score limits lie where the score statistic, its likelihood maximised by search, is -z and z (Tango 1998)', () => {
    for (const [both, there, back, neither] of [
      [1, 1, 7, 12],
      [43, 0, 1, 0],
      [10, 0, 0, 6],
      [20, 14, 3, 9],
    ] as const) {
      const n = both + there + back + neither;
      const [tango] = matchedDifference({ both, there, back, neither }, 'yes', 0.95, z).intervals;
      const score = (d: number): number => {
        const log = (k: number, p: number): number => (k === 0 ? 0 : k * Math.log(p));
        const likelihood = (q: number): number =>
          log(there, q + d) + log(back, q) + log(n - there - back, 1 - 2 * q - d);
        let [low, high] = [Math.max(0, -d), (1 - d) / 2];
        for (let step = 0; step < 200; step++) {
          const [a, b] = [low + (high - low) / 3, high - (high - low) / 3];
          if (likelihood(a) < likelihood(b)) low = a;
          else high = b;
        }
        return (there - back - n * d) / Math.sqrt(n * (2 * low + d * (1 - d)));
      };
      expect(score(tango!.lower as number)).toBeCloseTo(z, 4);
      expect(score(tango!.upper as number)).toBeCloseTo(-z, 4);
    }
  });

  it('agrees with the intervals published for 1, 1, 7, 12 (Fagerland, Lydersen & Laake 2014; from memory, rounded)', () => {
    const { estimate, intervals } = matchedDifference({ both: 1, there: 1, back: 7, neither: 12 }, 'yes', 0.95, z);
    expect(estimate).toBeCloseTo(-0.286, 3);
    const rounded = Object.fromEntries(
      intervals.map(({ method, lower, upper }) => [
        method,
        [lower, upper].map((x) => Number((x as number).toFixed(3))),
      ]),
    );
    expect(rounded).toEqual({ tango: [-0.517, -0.026], newcombe: [-0.507, -0.026], wald: [-0.52, -0.052] });
  });
});

describe('kappa', () => {
  const counts = [
    [11, 3, 1, 0],
    [2, 9, 4, 0],
    [0, 3, 8, 0],
    [0, 0, 0, 0],
  ];
  const live = liveTable(makeTable({ counts }));

  it.each(['none', 'linear', 'quadratic'] as const)(
    'weights %s: both standard errors are those of the delta method, by numerical derivatives',
    (weights) => {
      const agreement = agreementOf(weights, 4);
      const n = counts.flat().reduce((a, b) => a + b, 0);
      const kappaOf = (p: readonly number[]): number => {
        const rows = [0, 1, 2, 3].map((i) => [0, 1, 2, 3].reduce((sum, j) => sum + p[4 * i + j]!, 0));
        const columns = [0, 1, 2, 3].map((j) => [0, 1, 2, 3].reduce((sum, i) => sum + p[4 * i + j]!, 0));
        let [seen, expected] = [0, 0];
        for (let i = 0; i < 4; i++) {
          for (let j = 0; j < 4; j++) {
            seen += agreement(i, j) * p[4 * i + j]!;
            expected += agreement(i, j) * rows[i]! * columns[j]!;
          }
        }
        return (seen - expected) / (1 - expected);
      };
      const errorAt = (p: readonly number[]): number => {
        const slope = p.map((_, k) => {
          const shifted = (h: number): number => kappaOf(p.map((x, j) => (j === k ? x + h : x)));
          return (shifted(1e-5) - shifted(-1e-5)) / 2e-5;
        });
        const mean = slope.reduce((sum, s, k) => sum + s * p[k]!, 0);
        return Math.sqrt(slope.reduce((sum, s, k) => sum + s * s * p[k]!, -mean * mean) / n);
      };
      const seen = counts.flat().map((x) => x / n);
      const rows = counts.map((row) => row.reduce((a, b) => a + b, 0) / n);
      const columns = counts.map((_, j) => counts.reduce((sum, row) => sum + row[j]!, 0) / n);
      const found = kappaMoments(live, agreement, live.counts);
      expect(found.kappa).toBeCloseTo(kappaOf(seen), 12);
      expect(found.error).toBeCloseTo(errorAt(seen), 7);
      expect(found.nullError).toBeCloseTo(errorAt(rows.flatMap((r) => columns.map((c) => r * c))), 7);
    },
  );

  it('is undefined where both raters used one level only, and has no width at full agreement', () => {
    const one = makeTable({
      counts: [
        [5, 0],
        [0, 0],
      ],
    });
    expect(kappaEffect(one, 'kappa', 0.95, z)).toMatchObject({ estimate: null, reason: 'one-level-only' });
    const full = makeTable({
      counts: [
        [5, 0],
        [0, 4],
      ],
    });
    expect(kappaEffect(full, 'kappa', 0.95, z)).toMatchObject({
      estimate: 1,
      intervals: [{ reason: 'zero-variance' }],
    });
  });
});
