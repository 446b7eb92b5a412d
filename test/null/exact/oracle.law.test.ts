// Every exact engine against the slow oracle in whole numbers, over thousands of small tables.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { oracleCut, toNumber, type Ordering as OracleOrdering } from '../../../fixtures/reference/generator/oracle.js';
import type { OrderingName } from '../../../src/null/contract.js';
import { exactByEnumeration } from '../../../src/null/exact/enumerate.js';
import { exactTwoByTwo } from '../../../src/null/exact/two-by-two.js';
import { liveFrom, orderingOf, relativeDifference, smallTable, twoByTwoTable } from '../../helpers/tables.js';

const upperStatistics = ['pearson', 'likelihood-ratio', 'probability'] as const;
const engines = { 'two-by-two': exactTwoByTwo, enumeration: exactByEnumeration };

/** 64 roundings at the most go into a mass of these sizes. */
const bound = 64 * 2 ** -52;

function compare(
  engine: keyof typeof engines,
  table: number[][],
  statistic: string,
  name: OrderingName,
  oracleOrdering: OracleOrdering,
): void {
  const live = liveFrom(table);
  const answer = engines[engine](live, [orderingOf(live, statistic, name)]);
  const truth = oracleCut(table, oracleOrdering);
  const cut = answer.cuts[0]!;
  const pairs = [
    ['atLeast', cut.atLeast.value, toNumber(truth.tied + truth.above, truth.whole)],
    ['above', cut.above.value, toNumber(truth.above, truth.whole)],
    ['tied', cut.tied.value, toNumber(truth.tied, truth.whole)],
    ['below', cut.below.value, toNumber(truth.below, truth.whole)],
    ['point', answer.point.value, toNumber(truth.point, truth.whole)],
  ] as const;
  for (const [what, ours, theirs] of pairs) {
    const difference = relativeDifference(ours, theirs);
    expect(
      difference,
      `${engine} ${statistic} ${what} of ${JSON.stringify(table)}: ${ours} not ${theirs}`,
    ).toBeLessThanOrEqual(bound);
  }
  expect(answer.tables).toBe(truth.tables);
}

describe('exact cuts equal those of the oracle', () => {
  for (const statistic of upperStatistics) {
    it(`r x c by enumeration, ${statistic}`, () => {
      fc.assert(
        fc.property(smallTable, (table) => compare('enumeration', table, statistic, 'upper', statistic)),
        { numRuns: 1000, seed: 1 },
      );
    });

    it(`2x2 by the walk, ${statistic}`, () => {
      fc.assert(
        fc.property(twoByTwoTable, (table) => compare('two-by-two', table, statistic, 'upper', statistic)),
        { numRuns: 1000, seed: 2 },
      );
    });
  }

  const signed: [string, OrderingName, OracleOrdering][] = [
    ['wald', 'upper', 'corner'],
    ['score', 'upper', 'corner'],
    ['wald', 'distance', 'wald-distance'],
    ['score', 'distance', 'score-distance'],
    ['wald', 'probability', 'probability'],
    ['score', 'probability', 'probability'],
  ];
  for (const [statistic, name, oracleOrdering] of signed) {
    for (const engine of ['two-by-two', 'enumeration'] as const) {
      it(`2x2 by ${engine}, ${statistic} ordered by ${name}`, () => {
        fc.assert(
          fc.property(twoByTwoTable, (table) => compare(engine, table, statistic, name, oracleOrdering)),
          { numRuns: 500, seed: 3 },
        );
      });
    }
  }
});
