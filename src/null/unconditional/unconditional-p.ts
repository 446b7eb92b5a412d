// The unconditional exact p of two independent groups: the largest probability, over the common proportion, of the outcomes at
// least as extreme as the one seen (Barnard 1945, 1947; Suissa & Shuster 1985; ordered by conditional p: Boschloo 1970).
import { setByConditionalP } from './by-conditional-p.js';
import { setByStatistic, type OutcomeStatistic } from './by-statistic.js';
import { certifiedMaximum, onPart } from './certified-maximum.js';
import { nuisanceInterval } from './nuisance-interval.js';
import type { OutcomeSet, TwoGroupsSeen } from './outcomes.js';
import { pooledPolynomial } from './pooled-polynomial.js';

/** Two-sided: by distance from 0, by the two-tailed conditional p, or twice the smaller one-sided p. */
export type UnconditionalTail = 'upper' | 'lower' | 'distance' | 'probability' | 'doubled';

export interface UnconditionalOrder {
  readonly by: OutcomeStatistic | 'conditional-p';
  readonly tail: UnconditionalTail;
}

export interface UnconditionalP {
  /** The proved upper bound of the maximum; with a risk, that risk added. At most 1; 0 where log10 alone can tell. */
  readonly p: number;
  readonly log10: number;
  /** How far p can lie above the true maximum, relative. */
  readonly relativeError: number;
  readonly nuisance: {
    /** The proportion at which the largest probability was seen. */
    readonly value: number;
    /** The bound itself, before any risk is added. */
    readonly certifiedUpper: number;
  };
}

/**
 * @param risk gamma of Berger & Boos (1994), 0 for the whole range of the nuisance proportion.
 * Time: O(firstSize secondSize) for the set, and about 100 x (firstSize + secondSize)^2 / 2 for the maximum.
 */
export function unconditionalP(seen: TwoGroupsSeen, order: UnconditionalOrder, risk = 0): UnconditionalP {
  if (order.tail !== 'doubled') return maximumOver(outcomeSet(seen, order.by, order.tail), seen, risk);
  const upper = maximumOver(outcomeSet(seen, order.by, 'upper'), seen, risk);
  const lower = maximumOver(outcomeSet(seen, order.by, 'lower'), seen, risk);
  const smaller = upper.log10 <= lower.log10 ? upper : lower;
  return {
    ...smaller,
    p: Math.min(1, 2 * smaller.p),
    log10: Math.min(0, smaller.log10 + Math.log10(2)),
  };
}

export function outcomeSet(
  seen: TwoGroupsSeen,
  by: UnconditionalOrder['by'],
  tail: Exclude<UnconditionalTail, 'doubled'>,
): OutcomeSet {
  if (by === 'conditional-p') {
    if (tail !== 'distance') return setByConditionalP(seen, tail);
  } else if (tail !== 'probability') return setByStatistic(seen, by, tail);
  throw new Error(`no outcomes are ordered by ${by} with the tail ${tail}`);
}

function maximumOver(set: OutcomeSet, seen: TwoGroupsSeen, risk: number): UnconditionalP {
  const { coefficients, lnScale, relativeError } = pooledPolynomial(set);
  const events = seen.firstEvents + seen.secondEvents;
  const total = seen.firstSize + seen.secondSize;
  const [from, to] = risk === 0 ? [0, 1] : nuisanceInterval(events, total, risk);
  const part = risk === 0 ? coefficients : onPart(coefficients, from, to);
  const { upper, lower, at } = certifiedMaximum(part, relativeError + (risk === 0 ? 0 : 6 * total * 2 ** -53));
  const scale = Math.exp(lnScale);
  const bound = Math.min(1, upper * scale);
  return {
    p: Math.min(1, bound + risk),
    log10: risk === 0 ? Math.min(0, (Math.log(upper) + lnScale) / Math.LN10) : Math.log10(Math.min(1, bound + risk)),
    relativeError: bound === 1 && upper * scale - 1 < 1e-9 ? Math.max(0, 1 - lower * scale) : upper / lower - 1,
    nuisance: { value: from + at * (to - from), certifiedUpper: bound },
  };
}
