// Step-down adjustment over shared subjects against brute force: every way to deal the groups to the subjects is listed, and the
// adjusted p-values are worked out from the definition (Westfall & Young 1993, algorithms 2.8 and 4.1).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { jointCounts } from '../../src/family/joint.js';
import type { JointCounts } from '../../src/input/joint-counts.js';

/** Subjects one by one: their group (0 or 1) and their outcomes. */
interface Subjects {
  readonly groups: readonly number[];
  readonly outcomes: readonly (readonly number[])[];
}

function jointOf({ groups, outcomes }: Subjects): JointCounts {
  const names = [...new Set(outcomes.map((list) => list.join()))];
  const profiles = names.map((name) => name.split(',').map(Number));
  const counts = [0, 1].map((group) =>
    names.map((name) => outcomes.filter((list, s) => list.join() === name && groups[s] === group).length),
  );
  const levels = (k: number): number => Math.max(...outcomes.map((list) => list[k]!)) + 1;
  return {
    groups: ['a', 'b'],
    outcomes: outcomes[0]!.map((_, k) => ({
      label: `o${k}`,
      levels: Array.from({ length: levels(k) }, (__, l) => `${l}`),
    })),
    profiles,
    counts,
  };
}

/** Pearson's statistic of outcome k, on a scale of whole numbers where the denominators are the same: rounded far below any gap. */
function statistic(groups: readonly number[], outcomes: Subjects['outcomes'], k: number): number {
  const n = groups.length;
  let sum = 0;
  for (const level of new Set(outcomes.map((list) => list[k]))) {
    const column = outcomes.filter((list) => list[k] === level).length;
    for (const group of [0, 1]) {
      const row = groups.filter((g) => g === group).length;
      const count = outcomes.filter((list, s) => list[k] === level && groups[s] === group).length;
      if (row > 0) sum += (count * count) / (row * column);
    }
  }
  return Math.round(n * (sum - 1) * 1e9) / 1e9;
}

function* deals(groups: readonly number[]): Generator<number[]> {
  const ones = groups.reduce((a, b) => a + b, 0);
  const n = groups.length;
  for (let mask = 0; mask < 1 << n; mask++) {
    const dealt = Array.from({ length: n }, (_, s) => (mask >> s) & 1);
    if (dealt.reduce((a, b) => a + b, 0) === ones) yield dealt;
  }
}

/** `parted`: no p-value of one outcome comes near an observed one of another, so that ones estimated from draws rank alike. */
function bruteForce({ groups, outcomes }: Subjects): {
  raw: number[];
  maxT: number[];
  minP: number[];
  parted: boolean;
} {
  const m = outcomes[0]!.length;
  const all = [...deals(groups)].map((dealt) => Array.from({ length: m }, (_, k) => statistic(dealt, outcomes, k)));
  const observed = Array.from({ length: m }, (_, k) => statistic(groups, outcomes, k));
  const share = (k: number, t: number): number => all.filter((values) => values[k]! >= t).length / all.length;
  const raw = observed.map((t, k) => share(k, t));
  const adjust = (extremeness: (values: number[], k: number) => number): number[] => {
    const own = observed.map((_, k) => extremeness(observed, k));
    const order = [...own.keys()].sort((a, b) => own[b]! - own[a]!);
    const out: number[] = [];
    let most = 0;
    order.forEach((k, at) => {
      const behind = order.slice(at);
      const hits = all.filter((values) => Math.max(...behind.map((j) => extremeness(values, j))) >= own[k]!).length;
      out[k] = most = Math.max(most, hits / all.length);
    });
    return out;
  };
  return {
    raw,
    maxT: adjust((values, k) => values[k]!),
    minP: adjust((values, k) => -share(k, values[k]!)),
    parted: all.every((values) =>
      values.every((value, k) =>
        raw.every((p, j) => j === k || (share(k, value) === 1 && p === 1) || Math.abs(share(k, value) - p) > 0.03),
      ),
    ),
  };
}

const subjects: fc.Arbitrary<Subjects> = fc.integer({ min: 5, max: 9 }).chain((n) =>
  fc.record({
    groups: fc.array(fc.integer({ min: 0, max: 1 }), { minLength: n, maxLength: n }),
    outcomes: fc.integer({ min: 2, max: 3 }).chain((m) =>
      fc.array(fc.array(fc.integer({ min: 0, max: 1 }), { minLength: m, maxLength: m }), {
        minLength: n,
        maxLength: n,
      }),
    ),
  }),
);

const draws = 4000;
/** Five standard deviations. */
const near = (share: number, p: number): boolean => Math.abs(share - p) <= 5 * Math.sqrt((p * (1 - p)) / draws) + 1e-12;

describe('adjustment over shared subjects', () => {
  it('comes to the adjusted p-values of all deals, raw, by the largest statistic and by the smallest p', () => {
    let compared = 0;
    for (const each of fc.sample(subjects, { numRuns: 60, seed: 7 })) {
      const truth = bruteForce(each);
      const { outcomes } = jointCounts(jointOf(each), 'seed', draws);
      outcomes.forEach((outcome, k) => {
        const what = `${JSON.stringify(each)} outcome ${k}`;
        expect(near(outcome.atLeast / draws, truth.raw[k]!), `raw, ${what}`).toBe(true);
        expect(near(outcome.atLeastByLargest / draws, truth.maxT[k]!), `maxT, ${what}`).toBe(true);
        if (!truth.parted) return;
        compared++;
        expect(near(outcome.atLeastBySmallest / draws, truth.minP[k]!), `minP, ${what}`).toBe(true);
      });
    }
    expect(compared).toBeGreaterThan(3);
  });

  it('is never below the raw count, and one outcome alone is not adjusted', () => {
    for (const each of fc.sample(subjects, { numRuns: 20, seed: 8 })) {
      const { outcomes } = jointCounts(jointOf(each), 's', 300);
      for (const { atLeast, atLeastByLargest, atLeastBySmallest } of outcomes) {
        expect(atLeastByLargest).toBeGreaterThanOrEqual(atLeast);
        expect(atLeastBySmallest).toBeGreaterThanOrEqual(atLeast);
      }
      const alone = { groups: each.groups, outcomes: each.outcomes.map(([first]) => [first!]) };
      const [one] = jointCounts(jointOf(alone), 's', 300).outcomes;
      expect(one!.atLeastByLargest).toBe(one!.atLeast);
      expect(one!.atLeastBySmallest).toBe(one!.atLeast);
    }
  });

  it('twins share every count: the same outcome twice is adjusted as if it were one', () => {
    for (const each of fc.sample(subjects, { numRuns: 10, seed: 9 })) {
      const twin = { groups: each.groups, outcomes: each.outcomes.map(([first]) => [first!, first!]) };
      const { outcomes } = jointCounts(jointOf(twin), 's', 300);
      for (const { atLeast, atLeastByLargest } of outcomes) expect(atLeastByLargest).toBe(atLeast);
    }
  });
});
