// Remarks that a reader should not miss.
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import { checked } from './helpers/checked-result.js';

const codes = async (counts: number[][], options: PlanOptions): Promise<string[]> =>
  checked(await analyse({ counts }, options)).notes.map(({ code }) => code);

const sparse = [
  [8, 2],
  [1, 9],
];
const dense = [
  [80, 20, 40],
  [70, 30, 50],
];

describe('a note on the approximation', () => {
  it.each([
    ['exact', { method: 'exact' }],
    ['a fixed number of draws', { method: 'sample', draws: 50_000, seed: 'n' }],
    ['draws until settled', { method: 'sample', seed: 'n' }],
  ] as const)('is given where it is off by more than a factor of 1.5: %s', async (_, options) => {
    expect(await codes(sparse, { statistic: 'wald', ...options })).toContain('asymptotic-differs');
    expect(await codes(dense, options)).not.toContain('asymptotic-differs');
  });

  it('says when it has no value at all', async () => {
    expect(await codes([[5, 0], [0, 4]], { statistic: 'wald' })).toContain('asymptotic-undefined'); // prettier-ignore
  });
});

describe('a note on a sampled p', () => {
  it('says how many draws should tell its side of the level', async () => {
    const result = checked(
      await analyse({ counts: sparse }, { method: 'sample', draws: 500, seed: 'n', alpha: 0.005 }),
    );
    const note = result.notes.find(({ code }) => code === 'level-inside-interval');
    expect(note?.text).toMatch(/about [\d,]+ draws \(--draws \d+\) should tell the side/);
  });
});
