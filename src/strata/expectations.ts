// Would the chi-square approximation do over strata? It rests on sums over the strata, so it may hold where no single stratum is large.
import type { ExpectationCheck } from '../table/expectation-check.js';
import { expectedCount } from '../table/live-table.js';
import type { Layer } from './general/problem.js';
import { highestCorner, lowestCorner, type Stratum } from './odds/stratum.js';

/** Mantel & Fleiss (1980): the sum of the corners can fall short of, and exceed, its expectation by 5 at least. */
export function mantelFleiss(layers: readonly Layer[], strata: readonly Stratum[]): ExpectationCheck {
  const sum = (term: (one: Stratum) => number): number => strata.reduce((all, one) => all + term(one), 0);
  const expected = sum(({ first, events, total }) => (first / total) * events);
  const met = expected - sum(lowestCorner) >= 5 && sum(highestCorner) - expected >= 5;
  return {
    ...withinStrata(layers),
    cochranAdvice: met ? 'met' : 'not-met',
    cochranSentence: met
      ? 'By the rule of Mantel & Fleiss (1980; the sum over strata can lie 5 counts or more to either side of its expectation) the approximation has room here.'
      : 'By the rule of Mantel & Fleiss (1980; the sum over strata can lie 5 counts or more to either side of its expectation) these strata are too thin for the approximation.',
  };
}

/** Cochran's (1954) advice on the expected counts added up over strata. */
export function summedExpectations(layers: readonly Layer[]): ExpectationCheck {
  const sums = new Map<string, number>();
  for (const { live, rows, columns } of layers) {
    rows.forEach((row, i) =>
      columns.forEach((column, j) => {
        const key = `${row} ${column}`;
        sums.set(key, (sums.get(key) ?? 0) + expectedCount(live, i, j));
      }),
    );
  }
  const values = [...sums.values()];
  const met = values.every((x) => x >= 1) && values.filter((x) => x < 5).length <= values.length / 5;
  return {
    ...withinStrata(layers),
    cochranAdvice: met ? 'met' : 'not-met',
    cochranSentence: met
      ? "Cochran's (1954) advice (none below 1, at most a fifth of the cells below 5), applied to expected counts added up over strata, leaves room for the approximation here."
      : "Expected counts added up over strata fall short of Cochran's (1954) advice (none below 1, at most a fifth of the cells below 5): do not lean on the approximation.",
  };
}

function withinStrata(layers: readonly Layer[]): Pick<ExpectationCheck, 'smallestExpected' | 'shareBelowFive'> {
  let smallest = Infinity;
  let below = 0;
  let cells = 0;
  for (const { live } of layers) {
    for (let i = 0; i < live.rows; i++) {
      for (let j = 0; j < live.columns; j++) {
        const expected = expectedCount(live, i, j);
        smallest = Math.min(smallest, expected);
        cells++;
        if (expected < 5) below++;
      }
    }
  }
  return { smallestExpected: smallest, shareBelowFive: below / cells };
}
