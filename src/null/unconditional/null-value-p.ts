// The unconditional exact p of a stated difference or ratio of two proportions (Chan 1998): the largest probability, over all
// pairs of proportions that the statement allows, of the outcomes whose score lies at least as far out as the one seen.
import { certifiedMaximum } from './certified-maximum.js';
import { constrainedScore, type NullValue, type OutcomeScore } from './constrained-score.js';
import { lineError, lineOf, linePolynomial } from './line-polynomial.js';
import { outcomesWhere, type OutcomeSet, type TwoGroupsSeen } from './outcomes.js';
import type { UnconditionalP } from './unconditional-p.js';

/** upper: the first proportion is larger than stated; lower: smaller; distance: either. */
export type NullValueTail = 'upper' | 'lower' | 'distance';

/** Scores are right to 1e-9; values this near count as tied, which can enlarge p and never makes it smaller. */
const tie = 1e-8;

/** Time: O(firstSize^2 secondSize + firstSize secondSize^2), and about 100 x (firstSize + secondSize)^2 / 2. */
export function nullValueP(seen: TwoGroupsSeen, nullValue: NullValue, tail: NullValueTail): UnconditionalP {
  const { firstSize, secondSize } = seen;
  const line = lineOf(nullValue);
  const coefficients = linePolynomial(setBeyond(seen, constrainedScore(seen, nullValue), tail), line);
  const { upper, lower, at } = certifiedMaximum(coefficients, lineError(firstSize, secondSize));
  const bound = Math.min(1, upper);
  return {
    p: bound,
    log10: Math.min(0, Math.log10(upper)),
    relativeError: upper >= 1 ? Math.max(0, 1 - lower) : upper / lower - 1,
    nuisance: { value: line.second[0] + at * (line.second[1] - line.second[0]), certifiedUpper: bound },
  };
}

/** Outcomes at least as far out by the score as the one seen. */
export function setBeyond(seen: TwoGroupsSeen, score: OutcomeScore, tail: NullValueTail): OutcomeSet {
  const turned = (x1: number, x2: number): number => {
    const value = score(x1, x2);
    return tail === 'distance' ? Math.abs(value) : tail === 'lower' ? -value : value;
  };
  const target = turned(seen.firstEvents, seen.secondEvents);
  const least = Number.isFinite(target) ? target - tie * Math.max(1, Math.abs(target)) : target;
  return outcomesWhere(seen, (x1, x2) => turned(x1, x2) >= least);
}
