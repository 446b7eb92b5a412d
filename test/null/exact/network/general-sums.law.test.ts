// The network takes any sum over cells: the statistics it has no keys for, against plain enumeration.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactByEnumeration } from '../../../../src/null/exact/enumerate.js';
import { exactCut } from '../../../../src/null/exact/network/exact-cut.js';
import { liveFrom, orderingOf, relativeDifference, tableOf } from '../../../helpers/tables.js';

const tables = fc.oneof(
  tableOf({ rows: [3, 4], columns: [3, 3], largest: 3 }),
  tableOf({ rows: [2, 3], columns: [3, 5], largest: 4 }),
);

describe('the network gives the masses of enumeration', () => {
  for (const statistic of ['power-divergence', 'freeman-tukey']) {
    for (const tail of ['upper', 'lower'] as const) {
      it(`${statistic}, ${tail}`, () => {
        fc.assert(
          fc.property(tables, (counts) => {
            const live = liveFrom(counts);
            const ordering = orderingOf(live, statistic, tail);
            const network = exactCut(live, ordering, statistic);
            const listed = exactByEnumeration(live, [ordering]).cuts[0]!;
            for (const part of ['below', 'tied', 'above', 'atLeast'] as const) {
              const difference = relativeDifference(network[part].value, listed[part].value);
              expect(difference, `${part} of ${JSON.stringify(counts)}`).toBeLessThan(1e-13);
            }
          }),
          { numRuns: 200, seed: 31 },
        );
      });
    }
  }
});
