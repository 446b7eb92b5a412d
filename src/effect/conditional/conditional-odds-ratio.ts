// The odds ratio given all margins, with the intervals that invert the conditional tests (Fay 2010): each interval
// holds the values that its two-sided rule does not reject.
import { extended, type Effect, type EffectReason, type Interval } from '../contract.js';
import type { EffectSettings, TwoGroups } from '../two-groups.js';
import { bothEnds, conditionalEstimate, exactUpperEnd, midUpperEnd } from './central.js';
import { oddsLaw, spreadOf, type OddsLaw } from './odds-law.js';
import { twoSidedSet } from './two-sided-set.js';

/** Standard deviations of the count beyond which a walk over the law takes longer than one interval is worth: a total of
 *  about 1e10, and of 1e7 for the rules whose set is made of pieces. */
const widestLaw = 50_000;
const widestInPieces = 1_000;

/** Conditional maximum likelihood (Cornfield 1956): 0 to infinity, 1 for none. */
export function conditionalOddsRatio({ first, second }: TwoGroups, settings: EffectSettings): Effect {
  const law = oddsLaw(first.size, second.size, first.events + second.events, first.events);
  const spread = spreadOf(law);
  const estimate: Pick<Effect, 'estimate' | 'reason'> =
    law.lowest === law.highest
      ? { estimate: null, reason: 'only-one-table' }
      : spread > widestLaw
        ? { estimate: null, reason: 'beyond-effort' }
        : { estimate: extended(Math.exp(conditionalEstimate(law))) };
  return {
    name: 'conditional-odds-ratio',
    ...estimate,
    direction: 'first-over-second',
    intervals: methods.map(({ widest, ...method }) => intervalBy(method, law, settings, spread <= widest)),
  };
}

interface Ends {
  readonly lower: number;
  readonly upper: number;
  readonly hasGap?: boolean;
}

interface Method {
  readonly method: string;
  readonly invertsP?: string;
  readonly guaranteed?: false;
  readonly ends: (law: OddsLaw, alpha: number) => Ends;
}

const paired = ([lower, upper]: [number, number]): Ends => ({ lower, upper });

const methods: readonly (Method & { widest: number })[] = [
  {
    method: 'central',
    invertsP: 'doubled',
    widest: widestLaw,
    ends: (law, alpha) => paired(bothEnds(law, (one) => exactUpperEnd(one, alpha / 2))),
  },
  {
    method: 'mid-p',
    guaranteed: false,
    widest: widestLaw,
    ends: (law, alpha) => paired(bothEnds(law, (one) => midUpperEnd(one, alpha / 2))),
  },
  {
    method: 'probability',
    invertsP: 'probability',
    widest: widestInPieces,
    ends: (law, alpha) => twoSidedSet(law, 'probability', alpha),
  },
  {
    method: 'blaker',
    invertsP: 'blaker',
    widest: widestInPieces,
    ends: (law, alpha) => twoSidedSet(law, 'blaker', alpha),
  },
];

function intervalBy(
  { method, invertsP, guaranteed, ends }: Method,
  law: OddsLaw,
  { confidence }: EffectSettings,
  isInReach: boolean,
): Interval {
  const facts = {
    ...(invertsP === undefined ? {} : { invertsP }),
    guaranteed: guaranteed ?? true,
  };
  // One table only: every odds ratio makes it certain, and none can be rejected.
  if (law.lowest === law.highest) {
    return { method, confidence, lower: 0, upper: 'infinity', reason: 'only-one-table', ...facts };
  }
  if (!isInReach) return { method, confidence, lower: null, upper: null, reason: 'beyond-effort', ...facts };
  const { lower, upper, hasGap } = ends(law, 1 - confidence);
  const open: { reason?: EffectReason } = lower === -Infinity || upper === Infinity ? { reason: 'at-boundary' } : {};
  return {
    method,
    confidence,
    lower: extended(Math.exp(lower)),
    upper: extended(Math.exp(upper)),
    ...open,
    ...facts,
    ...(hasGap ? { setHasGap: true } : {}),
  };
}
