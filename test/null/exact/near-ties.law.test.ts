// Tables that doubles cannot tell apart and that are no ties. With n odd and 2 R C = S n + 1 the corners a and S - a of a 2x2 table
// lie at distances D and D + 1 from their mean, in units of 1/n: at n = 1e10 the statistics differ in the 15th digit at most.
import { describe, expect, it } from 'vitest';
import { answer } from '../../../src/answer.js';
import type { PlanOptions } from '../../../src/plan/plan.js';
import { boundTo, liveFrom, relativeDifference } from '../../helpers/tables.js';

/** x with x y = 1 modulo n (extended Euclid); y and n have no common factor. */
function inverse(y: bigint, n: bigint): bigint {
  let [r0, r1, s0, s1] = [n, y % n, 0n, 1n];
  while (r1 !== 0n) {
    const q = r0 / r1;
    [r0, r1, s0, s1] = [r1, r0 - q * r1, s1, s0 - q * s1];
  }
  return ((s0 % n) + n) % n;
}

const n = 10_000_000_019n;
const cases = [4_321_987_654n, 1_234_567_891n].map((column) => {
  const row = inverse(2n * column, n);
  return { row, column, mirror: (2n * row * column - 1n) / n, mean: (row * column) / n };
});

const tableAt = ({ row, column }: { row: bigint; column: bigint }, corner: bigint): number[][] => [
  [Number(corner), Number(row - corner)],
  [Number(column - corner), Number(n - row - column + corner)],
];

async function pOf(counts: number[][], options: PlanOptions): Promise<number> {
  const { pValues } = await answer({ counts }, { method: 'exact', effort: 1e9, ...options });
  return pValues[0]!.p!;
}

describe.each(cases)('near ties of pearson, $row of one row and $column of one column in 1e10', (margins) => {
  const above = margins.mean + 40_000n;
  const below = margins.mirror - above;

  it('are within what rounding can do, so that they take whole numbers to decide', () => {
    const live = liveFrom(tableAt(margins, above));
    const { sum } = boundTo(live, 'pearson');
    const other = boundTo(liveFrom(tableAt(margins, below)), 'pearson').sum!;
    expect(Math.abs(other.observed - sum!.observed)).toBeLessThanOrEqual(sum!.slack);
  });

  it('go into the tail on one side and stay out on the other', async () => {
    const upper = (corner: bigint): Promise<number> =>
      pOf(tableAt(margins, corner), { statistic: 'score', tail: 'upper' });
    const lower = await pOf(tableAt(margins, below), { statistic: 'score', tail: 'lower' });
    const [ofAbove, ofBelow] = [await pOf(tableAt(margins, above), {}), await pOf(tableAt(margins, below), {})];
    expect(relativeDifference(ofAbove, (await upper(above)) + lower)).toBeLessThan(1e-12);
    expect(relativeDifference(ofBelow, (await upper(above + 1n)) + lower)).toBeLessThan(1e-12);
    expect(relativeDifference(ofAbove, ofBelow)).toBeGreaterThan(1e-6);
  });
});
