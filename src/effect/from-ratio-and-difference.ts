// Two measures that are other readings of a risk difference and a risk ratio, with the intervals that these lend them:
// the number needed to treat (Laupacis et al. 1988; intervals after Altman 1998) and the attributable fraction among
// the exposed (Levin 1953).
import { asNumber, extended, type Effect, type Interval } from './contract.js';

/**
 * 1 / (p1 - p2): with so many units in the first group instead of the second, one more has the event; negative: one
 * fewer. Values near 0 cannot be: from -1 down and from 1 up; infinity stands for no difference.
 */
export function numberNeeded(difference: Effect): Effect {
  return {
    ...difference,
    name: 'number-needed-to-treat',
    ...(difference.estimate === null ? {} : { estimate: extended(reciprocal(asNumber(difference.estimate))) }),
    intervals: difference.intervals.map(reciprocalInterval),
  };
}

const reciprocal = (x: number): number => (x === 0 ? Infinity : 1 / x);

/** From L to U of the difference: 1/U to 1/L; with 0 inside, from 1/U up through infinity to 1/L (Altman 1998). */
function reciprocalInterval(interval: Interval): Interval {
  if (interval.lower === null || interval.upper === null) return interval;
  const [low, high] = [asNumber(interval.lower), asNumber(interval.upper)];
  const holdsZero = low <= 0 && high >= 0;
  return {
    ...interval,
    lower: extended(high === 0 ? Infinity : 1 / high),
    upper: extended(low === 0 ? -Infinity : 1 / low),
    ...(holdsZero ? { throughInfinity: true, reason: 'difference-may-be-zero' as const } : {}),
  };
}

/** 1 - p2 / p1, the share of the first group's events that the second group's rate would not have brought: -infinity to 1. */
export function attributableFraction(ratio: Effect): Effect {
  const { estimate, reason } = ratio;
  return {
    estimate,
    ...(reason === undefined ? {} : { reason }),
    name: 'attributable-fraction',
    ...(estimate === null ? {} : { estimate: extended(1 - 1 / asNumber(estimate)) }),
    intervals: ratio.intervals.map((interval) =>
      interval.lower === null || interval.upper === null
        ? interval
        : {
            ...interval,
            lower: extended(1 - 1 / asNumber(interval.lower)),
            upper: extended(1 - 1 / asNumber(interval.upper)),
          },
    ),
  };
}
