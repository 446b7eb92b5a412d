// Exact unconditional limits of a difference or ratio (Chan & Zhang 1999): the values that a one-sided score-ordered exact test
// does not reject, from the first one on. p may rise and fall with the value, so that a limit is not looked for by
// bisection alone: whole stretches of values are proved to be rejected, and the limit is where the proved ones end.
import { staysBelow } from './certified-maximum.js';
import { constrainedScore, type NullValue } from './constrained-score.js';
import { lineOf, linePolynomial } from './line-polynomial.js';
import { setBeyond } from './null-value-p.js';
import type { OutcomeSet, TwoGroupsSeen } from './outcomes.js';

export interface ExactLimits {
  readonly lower: number;
  readonly upper: number;
}

/** Stretches looked at for one limit, usually. */
const usualSteps = 150;
const mostSteps = 1500;
/** The last stretch left undecided is at most this wide; the limit is its outer end. */
const width = 2 ** -35;

/** Counted work of one limit in units of about 30 ns. */
export function limitWork({ firstSize, secondSize }: Pick<TwoGroupsSeen, 'firstSize' | 'secondSize'>): number {
  const outcomes = (firstSize + 1) * (secondSize + 1);
  return Math.round(usualSteps * ((outcomes * (firstSize + secondSize)) / 30 + 8 * outcomes + 100));
}

/**
 * Limits of which each errs with probability at most `risk`, whatever the proportions are (half of 1 - confidence).
 * undefined where more stretches were needed than are allowed.
 */
export function exactLimits(seen: TwoGroupsSeen, of: NullValue['of'], risk: number): ExactLimits | undefined {
  const { firstEvents: x1, firstSize, secondEvents: x2, secondSize } = seen;
  if (of === 'ratio' && x2 === 0 && x1 === 0) return { lower: 0, upper: Infinity };
  const lower = lowerLimit(seen, of, risk);
  const swapped = { firstSize: secondSize, firstEvents: x2, secondSize: firstSize, secondEvents: x1 };
  const other = lowerLimit(swapped, of, risk);
  if (lower === undefined || other === undefined) return undefined;
  // p1 - p2 = -(p2 - p1); p1 / p2 = 1 / (p2 / p1).
  return { lower, upper: of === 'difference' ? 0 - other : other === 0 ? Infinity : 1 / other };
}

/** Values on a scale of 0 to 1 that rises with them: (1 + difference) / 2, or ratio / (1 + ratio). */
const valueAt = (of: NullValue['of'], place: number): number =>
  of === 'difference' ? 2 * place - 1 : place / (1 - place);

function lowerLimit(seen: TwoGroupsSeen, of: NullValue['of'], risk: number): number | undefined {
  if (seen.firstEvents === 0 && of === 'ratio') return 0;
  const sets = new Map<number, OutcomeSet>();
  const setAt = (place: number): OutcomeSet => {
    let set = sets.get(place);
    if (set === undefined) {
      set = setBeyond(seen, constrainedScore(seen, { of, value: valueAt(of, place) }), 'upper');
      sets.set(place, set);
    }
    return set;
  };
  /** Every value between the two places is rejected: their outcomes together have probability at most `risk` at the far one. */
  const isRejected = (from: number, to: number): boolean => {
    const both = withAllBeyond(from === 0 ? setAt(to) : union(setAt(from), setAt(to)));
    return staysBelow(linePolynomial(both, lineOf({ of, value: valueAt(of, to) })), risk);
  };
  let proved = 0;
  let step = 0.125;
  for (let done = 0; done < mostSteps; done++) {
    const to = Math.min(proved + step, 1 - width);
    if (to <= proved) break;
    if (isRejected(proved, to)) {
      proved = to;
      step *= 2;
      for (const place of sets.keys()) if (place < proved) sets.delete(place);
    } else if (step <= width) return valueAt(of, proved);
    else step /= 2;
  }
  return undefined;
}

function union(one: OutcomeSet, other: OutcomeSet): OutcomeSet {
  return { ...one, inside: one.inside.map((here, k) => here | other.inside[k]!) };
}

/** With an outcome, all of more events in the first and fewer in the second group: its probability then rises with the value. */
function withAllBeyond({ firstSize, secondSize, inside }: OutcomeSet): OutcomeSet {
  const closed = inside.slice();
  const rowLength = secondSize + 1;
  for (let x1 = 0; x1 <= firstSize; x1++) {
    for (let x2 = secondSize; x2 >= 0; x2--) {
      const k = x1 * rowLength + x2;
      if ((x1 > 0 && closed[k - rowLength] === 1) || (x2 < secondSize && closed[k + 1] === 1)) closed[k] = 1;
    }
  }
  return { firstSize, secondSize, inside: closed };
}
