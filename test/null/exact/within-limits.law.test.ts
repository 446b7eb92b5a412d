// Counting tables within cell limits, against listing them and against the oracle in whole numbers.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { oracleCut, toNumber } from '../../../fixtures/reference/generator/oracle.js';
import type { OrderingName } from '../../../src/null/contract.js';
import { exactByEnumeration } from '../../../src/null/exact/enumerate.js';
import { exactTwoByTwo } from '../../../src/null/exact/two-by-two.js';
import { exactWithinLimits, forecastWithinLimits } from '../../../src/null/exact/within-limits.js';
import { maxResidual } from '../../../src/statistic/max-residual.js';
import {
  liveFrom,
  orderingOf,
  relativeDifference,
  rowsFirst,
  smallTable,
  twoByTwoTable,
} from '../../helpers/tables.js';

const bound = 1e-13;
const swapped = { upper: ['below', 'above'], lower: ['above', 'below'] } as const;

describe('exact cuts of max-residual equal those of the oracle', () => {
  for (const name of ['upper', 'lower'] as const satisfies readonly OrderingName[]) {
    it(`by every engine, ${name}`, () => {
      fc.assert(
        fc.property(fc.oneof(smallTable, twoByTwoTable), (table) => {
          const live = liveFrom(table);
          const ordering = orderingOf(live, 'max-residual', name);
          const truth = oracleCut(table, 'max-residual');
          const [below, above] = swapped[name];
          for (const cut of [
            exactWithinLimits(live, [ordering])[0]!,
            exactByEnumeration(live, [ordering]).cuts[0]!,
            ...(live.rows * live.columns === 4 ? exactTwoByTwo(live, [ordering]).cuts : []),
          ]) {
            for (const [what, ours, theirs] of [
              ['below', cut.below.value, truth[below]],
              ['tied', cut.tied.value, truth.tied],
              ['above', cut.above.value, truth[above]],
              ['atLeast', cut.atLeast.value, truth.tied + truth[above]],
            ] as const) {
              const difference = relativeDifference(ours, toNumber(theirs, truth.whole));
              expect(difference, `${name} ${what} of ${JSON.stringify(table)}`).toBeLessThan(bound);
            }
          }
        }),
        { numRuns: 600, seed: 41 },
      );
    });
  }

  it('keeps its digits far out: p = 1e-166 as by the walk over a 2x2 law', () => {
    const live = liveFrom([
      [300, 5],
      [10, 350],
    ]);
    const ordering = orderingOf(live, 'max-residual', 'upper');
    const [dealt] = exactWithinLimits(live, [ordering]);
    const [walked] = exactTwoByTwo(live, [ordering]).cuts;
    expect(walked!.atLeast.value).toBeLessThan(1e-150);
    for (const mass of ['atLeast', 'tied', 'above'] as const) {
      expect(relativeDifference(dealt![mass].value, walked![mass].value), mass).toBeLessThan(dealt!.relativeError);
    }
  });

  it('answers a table of 90 million in its own tail, and forecasts it as cheap', () => {
    const live = liveFrom([
      [1, 3, 10, 6],
      [2, 3, 10, 7],
      [1, 6, 14, 12],
      [0, 1, 9, 11],
    ]);
    const bound = maxResidual.bind(live, rowsFirst);
    expect(bound.value(live.counts)).toBeCloseTo(1.5936381457791915, 12);
    expect(forecastWithinLimits(live, bound.limits!)).toBeLessThan(5e7);
    const [cut] = exactWithinLimits(live, [orderingOf(live, 'max-residual', 'upper')]);
    expect(cut!.below.value + cut!.atLeast.value).toBeCloseTo(1, 13);
    expect(cut!.atLeast.value).toBeGreaterThan(0.5);
  });
});
