// Adjusted p-values against answers worked out in rational arithmetic (fixtures/reference/README.md), and the counts of rejections
// that Benjamini & Hochberg (1995) print for their fifteen p-values (from memory: 4 and 3).
import { describe, expect, it } from 'vitest';
import cases from '../../fixtures/reference/data/multiplicity.json' with { type: 'json' };
import { adjusted, type Adjustment } from '../../src/family/adjust.js';
import { relativeDifference } from '../helpers/tables.js';

const named: readonly [Adjustment, keyof (typeof cases)[number]['answers']][] = [
  ['bonferroni', 'bonferroni'],
  ['holm', 'holm'],
  ['hochberg', 'hochberg'],
  ['benjamini-hochberg', 'BH'],
  ['benjamini-yekutieli', 'BY'],
];

describe.each(cases)('$id: $title ($source)', ({ pvalues, answers }) => {
  const family = pvalues.map((p) => ({ p: Number(p), leastAttainable: 0 }));
  it.each(named)('%s', (method, answer) => {
    adjusted(family, method, 0.05).forEach((value, k) => {
      expect(relativeDifference(value!, answers[answer][k]!)).toBeLessThan(1e-13);
    });
  });
});

it('rejects as often as published', () => {
  const { pvalues } = cases.find(({ id }) => id === 'm05-bh1995')!;
  const family = pvalues.map((p) => ({ p: Number(p), leastAttainable: 0 }));
  const rejections = (method: Adjustment): number => adjusted(family, method, 0.05).filter((p) => p! <= 0.05).length;
  expect(rejections('benjamini-hochberg')).toBe(4);
  expect(rejections('bonferroni')).toBe(3);
});
