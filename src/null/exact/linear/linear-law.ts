// The law of a linear statistic as deep as a question needs it: what lies below a threshold is left out, the threshold is
// set from the observed value, and lowered where the answer turns out smaller than foreseen.
import type { LinearForm, Place } from '../../../statistic/contract.js';
import type { LiveTable } from '../../../table/live-table.js';
import type { Meter } from '../meter.js';
import { dealColumns, type DealtLaw } from './deal.js';
import { usesHashMaps } from './linear-forecast.js';
import { moments } from './moments.js';
import { upscale } from './node.js';
import { scoredSides, type ScoredLine, type ScoredSides } from './scored-sides.js';
import { wholeCounts } from './whole-counts.js';

/** Share of the foreseen p below which moves are left out; what they add up to is measured, not assumed. */
const negligible = 1e-22;

/** Laws from the cheapest that may do to the complete one. */
export function* laws(live: LiveTable, form: LinearForm, meter?: Meter): Generator<DealtLaw> {
  const sides = scoredSides(live, form);
  const sparse = usesHashMaps(live, form);
  const least = negligible * foreseen(live, form) * upscale;
  if (least > 0) yield dealColumns(sides, least, sparse, meter);
  yield wholeLaw(live, form, meter);
}

/** The law with nothing left out. */
export const wholeLaw = (live: LiveTable, form: LinearForm, meter?: Meter): DealtLaw =>
  dealColumns(scoredSides(live, form), 0, usesHashMaps(live, form), meter);

/** A probability below the p of most orderings, by the normal law of S. */
function foreseen(live: LiveTable, form: LinearForm): number {
  const { mean, deviation } = moments(live, form);
  const z = deviation === 0 ? 0 : (form.observed - mean) / deviation;
  return Math.exp(-(z * z) / 2 - 3);
}

/**
 * Place of each value of S by its probability: rarer than the observed value is above. Doubles decide where they can;
 * mirror images of a symmetric law tie; the rest is settled in whole numbers.
 */
export function placesByProbability(live: LiveTable, form: LinearForm, dealt: DealtLaw): Map<number, Place> {
  const sides = scoredSides(live, form);
  const values = new Map<number, number>();
  dealt.law.forEach((sum, value) => {
    if (value > 0) values.set(sum, value);
  });
  const observed = values.get(form.observed)!;
  const doubt = 4 * dealt.roundings * 2 ** -53 * observed + 2 * dealt.leftOut;
  const mirror = form.low + form.high - form.observed;
  const symmetric = isSymmetric(sides);
  let exact: Map<number, bigint> | undefined;
  const places = new Map<number, Place>();
  for (const [sum, value] of values) {
    if (sum === form.observed || (symmetric && sum === mirror)) places.set(sum, 0);
    else if (Math.abs(value - observed) > doubt) places.set(sum, value < observed ? 1 : -1);
    else {
      exact ??= wholeCounts(sides);
      const [ours, theirs] = [exact.get(sum)!, exact.get(form.observed)!];
      places.set(sum, ours < theirs ? 1 : ours > theirs ? -1 : 0);
    }
  }
  return places;
}

/** A side that reads the same from both ends makes the law of S symmetric about its mean. */
export function isSymmetric({ rows, columns }: ScoredSides): boolean {
  const palindrome = (lines: readonly ScoredLine[]): boolean => {
    const sorted = [...lines].sort((a, b) => a.score - b.score);
    const highest = sorted.at(-1)!.score;
    return sorted.every(({ score, total }, k) => {
      const other = sorted[sorted.length - 1 - k]!;
      return other.score === highest - score && other.total === total;
    });
  };
  return palindrome(rows) || palindrome(columns);
}
