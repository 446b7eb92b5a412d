// How far the counts of changed pairs support the chi-square approximation: under symmetry half of n_ij + n_ji is expected either way.
import type { ExpectationCheck } from '../table/expectation-check.js';
import type { DiscordantPair } from './square-table.js';

/** Cochran's (1954) advice read for the cells off the diagonal: none below 1, at most a fifth below 5; for two levels, none below 5. */
export function expectationsOfChange(pairs: readonly DiscordantPair[]): ExpectationCheck {
  const expected = pairs.map(({ there, back }) => (there + back) / 2);
  const smallest = expected.length === 0 ? 0 : Math.min(...expected);
  const shareBelowFive = expected.length === 0 ? 1 : expected.filter((e) => e < 5).length / expected.length;
  const met = smallest >= 1 && shareBelowFive <= 1 / 5;
  return {
    smallestExpected: smallest,
    shareBelowFive,
    cochranAdvice: met ? 'met' : 'not-met',
    cochranSentence: met
      ? "Cochran's (1954) advice, read for the cells off the diagonal under symmetry, leaves room for the approximation here."
      : "The counts expected off the diagonal under symmetry fall short of Cochran's (1954) advice (none below 1, at most a fifth of them below 5): do not lean on the approximation.",
  };
}
