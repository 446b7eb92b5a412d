// How much the expected counts of a table support the usual approximations: facts, and Cochran's (1954) advice in words.
import { expectedCount, type LiveTable } from './live-table.js';

export interface ExpectationCheck {
  readonly smallestExpected: number;
  /** Share of cells with an expected count below 5, 0 to 1. */
  readonly shareBelowFive: number;
  readonly cochranAdvice: 'met' | 'not-met';
  readonly cochranSentence: string;
}

/**
 * Cochran (1954): r x c, no expected count below 1 and at most a fifth of the cells below 5; 2x2, exact if n < 20, or if
 * n <= 40 with an expected count below 5.
 */
export function checkExpectations(live: LiveTable): ExpectationCheck {
  const expected: number[] = [];
  for (let i = 0; i < live.rows; i++) for (let j = 0; j < live.columns; j++) expected.push(expectedCount(live, i, j));
  return adviceFor(expected, live.rows === 2 && live.columns === 2, live.total);
}

/** The same from expected counts, at least one. `total` matters to a 2x2 table only. */
export function adviceFor(expected: readonly number[], twoByTwo: boolean, total = 0): ExpectationCheck {
  const smallest = expected.reduce((least, e) => Math.min(least, e), Infinity);
  const below = expected.filter((e) => e < 5).length;
  const cells = expected.length;
  const met = twoByTwo ? !(total < 20 || (total <= 40 && smallest < 5)) : smallest >= 1 && below <= cells / 5;
  return {
    smallestExpected: smallest,
    shareBelowFive: below / cells,
    cochranAdvice: met ? 'met' : 'not-met',
    cochranSentence: twoByTwo ? adviceOnTwoByTwo(met) : adviceOnLarger(met),
  };
}

const adviceOnTwoByTwo = (met: boolean): string =>
  met
    ? "Cochran's (1954) advice for a 2x2 table (exact below 20 units, or up to 40 with an expected count below 5) leaves room for the approximation here."
    : "By Cochran's (1954) advice a 2x2 table this small (below 20 units, or up to 40 with an expected count below 5) calls for an exact p.";

const adviceOnLarger = (met: boolean): string =>
  met
    ? "Cochran's (1954) advice (no expected count below 1, at most a fifth of the cells below 5) leaves room for the approximation here."
    : "The expected counts fall short of Cochran's (1954) advice (none below 1, at most a fifth of the cells below 5): do not lean on the approximation.";
