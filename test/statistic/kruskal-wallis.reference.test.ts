// Kruskal-Wallis against base R 4.2.2, kruskal.test (its value and chi-square p; the ranks with ties are those of the table).
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { relativeDifference } from '../helpers/tables.js';

const answers: readonly { counts: number[][]; value: number; p: number }[] = [
  {
    counts: [
      [3, 5, 2],
      [1, 4, 8],
      [2, 2, 2],
    ],
    value: 4.4868734561829227,
    p: 0.10609326342309616,
  },
  {
    counts: [
      [9, 1],
      [7, 3],
      [4, 6],
      [5, 5],
      [2, 8],
    ],
    value: 11.520128824476657,
    p: 0.021300345328528075,
  },
  {
    counts: [
      [12, 7, 3, 1],
      [4, 9, 6, 2],
      [0, 5, 8, 11],
    ],
    value: 25.350800737433961,
    p: 3.1271129204215699e-6,
  },
  {
    counts: [
      [2, 0, 1, 5],
      [0, 3, 3, 1],
      [4, 4, 0, 0],
      [1, 1, 6, 2],
    ],
    value: 11.051704327843737,
    p: 0.01144955102987614,
  },
];

describe('kruskal-wallis equals base R', () => {
  it.each(answers)('value and asymptotic p of $counts', async ({ counts, value, p }) => {
    const result = await analyse({ counts }, { statistic: 'kruskal-wallis', method: 'asymptotic' });
    expect(relativeDifference(result.statistic.value as number, value)).toBeLessThan(1e-12);
    expect(relativeDifference(result.pValues[0]!.p!, p)).toBeLessThan(1e-11);
    expect(result.statistic.degreesOfFreedom).toBe(counts.length - 1);
  });
});
