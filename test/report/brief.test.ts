import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { briefLine } from '../../src/report/brief.js';
import { sampleResults } from '../helpers/sample-results.js';

describe('the brief report', () => {
  it.each(Object.entries(sampleResults))('of %s is one line with statistic, p and n', (_name, result) => {
    const line = briefLine(result);
    expect(line).toMatch(/^[^\n]+; .*\bp\b.*; n [\d,]+\n$/);
  });

  it('says the error of a p: rounding, of drawing, or unknown', async () => {
    const counts = [[8, 2], [1, 9]]; // prettier-ignore
    expect(briefLine(await analyse({ counts }))).toBe(
      "Pearson's chi-square statistic 9.899; upper-tailed permutation p 0.00548, exact (rounding at most 1.0e-14 of it); n 20\n",
    );
    const drawn = briefLine(await analyse({ counts }, { method: 'sample', draws: 1000, seed: 'b' }));
    expect(drawn).toMatch(
      /p [\d.]+ \(standard error [\d.]+, 99% interval [\d.]+ to [\d.]+\), sampled from 1,000 random tables .*\(seed "b"\); n 20\n$/,
    );
    expect(briefLine(await analyse({ counts }, { method: 'asymptotic' }))).toContain(
      '(error unknown) by the chi-square approximation; n 20',
    );
  });
});
