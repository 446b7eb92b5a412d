// Tails under a stated odds ratio against base R: fisher.test(matrix(c(62, 18, 55, 25), 2, byrow = TRUE), or = 2), two-sided,
// greater and less, printed to 15 digits.
import { expect, it } from 'vitest';
import { noncentralTails } from '../../../src/null/stated-odds/noncentral-tails.js';

it('are those of base R', () => {
  const { probability, upper, lower } = noncentralTails(
    { firstSize: 80, firstEvents: 62, secondSize: 80, secondEvents: 55 },
    2,
  );
  expect(probability.value).toBeCloseTo(0.583606944516254, 13);
  expect(upper.value).toBeCloseTo(0.809775771804078, 13);
  expect(lower.value).toBeCloseTo(0.303068853296401, 13);
});
