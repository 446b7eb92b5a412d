// Which values of S are less extreme than the observed one, for every rule: always a stretch of neighbours. Its ends are found exactly.
import type { OrderingName } from '../../null/contract.js';
import { cornerCounts } from './corner-counts.js';
import type { SumLaw } from './sum-law.js';

export interface Split {
  /** The less extreme values, both ends included; to = from - 1 where there are none. */
  readonly from: number;
  readonly to: number;
  /** Values exactly as extreme as the observed one, itself included: neighbours of that stretch. */
  readonly ties: readonly number[];
}

export function lessExtreme(law: SumLaw, observed: number, name: OrderingName): Split {
  switch (name) {
    case 'upper':
      return { from: law.lowest, to: observed - 1, ties: [observed] };
    case 'lower':
      return { from: observed + 1, to: law.highest, ties: [observed] };
    case 'distance':
      return byDistance(law, observed);
    case 'probability':
      return byProbability(law, observed);
    case 'blaker':
      throw new Error('plans over strata refuse this rule');
  }
}

/** The most probable value, or one within rounding of it. */
export function modeOf(law: SumLaw): number {
  const { law: plain, peak } = law.under(1);
  return plain.from + plain.high.indexOf(peak);
}

/** |s - E| with E = sum of first x events / total, compared in whole numbers. */
function byDistance(law: SumLaw, observed: number): Split {
  let numerator = 0n;
  let denominator = 1n;
  for (const { first, events, total } of law.strata) {
    numerator = numerator * BigInt(total) + BigInt(first) * BigInt(events) * denominator;
    denominator *= BigInt(total);
  }
  // The mirror image of the observed value, 2 E - s.
  const mirror = 2n * numerator - BigInt(observed) * denominator;
  const floor = mirror / denominator - (mirror % denominator < 0n ? 1n : 0n);
  const isWhole = floor * denominator === mirror;
  const other = Number(floor);
  if (isWhole && other === observed) return { from: observed, to: observed - 1, ties: [observed] };
  const ties = isWhole && other >= law.lowest && other <= law.highest ? [observed, other] : [observed];
  return mirror < BigInt(observed) * denominator
    ? { from: other + 1, to: observed - 1, ties }
    : { from: observed + 1, to: isWhole ? other - 1 : other, ties };
}

/** Quotients nearer to 1 than this may be equal: double-doubles cannot tell. */
const doubt = 2 ** -80;

/** P(S = s) rises to its mode and falls beyond it, so the other end is found by bisection. */
function byProbability(law: SumLaw, observed: number): Split {
  const target = law.mass(observed, observed, 1);
  const symmetric = law.strata.every(({ first, second, events, others }) => first === second || events === others);
  let exact: ((s: number) => bigint) | undefined;
  const compare = (s: number): number => {
    if (s === observed || (symmetric && s === law.lowest + law.highest - observed)) return 0;
    if (!law.isCommon(s) && law.isCommon(observed)) return -1;
    const difference = law.mass(s, s, 1).relativeDifference(target);
    if (Math.abs(difference) > doubt) return difference;
    exact ??= cornerCounts(law.strata);
    return Number(exact(s) > exact(observed)) - Number(exact(s) < exact(observed));
  };
  const inSupport = (s: number): boolean => s >= law.lowest && s <= law.highest;
  const mode = modeOf(law);
  const middle = [mode, mode - 1, mode + 1].filter(inSupport);
  const inside = middle.find((s) => compare(s) > 0);
  if (inside === undefined) {
    const ties = [...new Set([...middle.filter((s) => compare(s) === 0), observed])];
    const from = Math.max(...ties);
    return { from, to: from - 1, ties };
  }
  const direction = observed < inside ? 1 : -1;
  let more = inside;
  let less = direction > 0 ? law.highest + 1 : law.lowest - 1;
  while (Math.abs(less - more) > 1) {
    const half = more + Math.trunc((less - more) / 2);
    if (compare(half) > 0) more = half;
    else less = half;
  }
  const ties = inSupport(less) && compare(less) === 0 ? [observed, less] : [observed];
  return direction > 0 ? { from: observed + 1, to: more, ties } : { from: more, to: observed - 1, ties };
}
