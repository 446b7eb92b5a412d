// The network engine against the reference answers: exact rationals rounded once (fixtures/reference/README.md).
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { exactCut } from '../../../../src/null/exact/network/exact-cut.js';
import { liveFrom, orderingOf, relativeDifference } from '../../../helpers/tables.js';

interface Answer {
  readonly p: number;
  readonly strict: number;
}
interface Case {
  readonly id: string;
  readonly table?: number[][];
  readonly exact?: Readonly<Record<string, Answer | undefined>> | null;
}

const path = new URL('../../../../fixtures/reference/data/conditional.json', import.meta.url);
const cases = JSON.parse(readFileSync(path, 'utf8')) as Case[];
/** Two lines that are not empty: the engine's smallest table. */
const isProper = (table: number[][]): boolean => {
  const live = liveFrom(table);
  return live.rows >= 2 && live.columns >= 2 && live.total < 100_000;
};

describe('reference answers are met to twelve digits', () => {
  for (const statistic of ['pearson', 'likelihood-ratio', 'probability']) {
    for (const { id, table, exact } of cases) {
      const answer = exact?.[statistic];
      if (table === undefined || answer === undefined || answer === null || !isProper(table)) continue;
      it(`${id}, ${statistic}`, () => {
        const live = liveFrom(table);
        const cut = exactCut(live, orderingOf(live, statistic, 'upper'), statistic);
        expect(relativeDifference(cut.atLeast.value, answer.p)).toBeLessThan(1e-12);
        expect(relativeDifference(cut.above.value, answer.strict)).toBeLessThan(1e-12);
        expect(cut.relativeError).toBeLessThan(1e-11);
      });
    }
  }
});
