// Exact cuts of a linear statistic for every ordering of its values: the whole law, then a sum for each place.
import { WideSum } from '../../../numeric/wide-number.js';
import { effortProblem } from '../../../problem/problem.js';
import type { LinearForm, Place } from '../../../statistic/contract.js';
import { trend } from '../../../statistic/trend.js';
import { liveTable, type LiveTable } from '../../../table/live-table.js';
import { makeTable } from '../../../table/table.js';
import type { ExactCut, Ordering, OrderingName } from '../../contract.js';
import { orderingFor } from '../../ordering.js';
import { cutFrom, type Masses } from '../exact-answer.js';
import type { Meter } from '../meter.js';
import { exactTwoByTwo } from '../two-by-two.js';
import type { DealtLaw } from './deal.js';
import { laws, placesByProbability } from './linear-law.js';
import { upscaleBits } from './node.js';
import { placesBySmallerTail } from './smaller-tail.js';
import { extremes, scoredSides, type ScoredSides } from './scored-sides.js';

const unit = 2 ** -53;
/** What is left out may change no mass by more than this part of it. */
const tolerated = 1e-14;
/** Below 2^-1850 a mass may have lost digits to the range of doubles. */
const deepestLog2 = -1850;

/**
 * Cuts for orderings of one linear form. Time: as forecast by linear-forecast.ts. Memory: two stages of the network, 8
 * bytes a value. Relative error of every mass as stated in the cut, below 1e-12.
 * @throws Problem (effort) `beyond-doubles` for masses below 1e-550, which this engine does not hold.
 */
export function exactLinear(live: LiveTable, orderings: readonly Ordering[], meter?: Meter): ExactCut[] {
  const form = orderings[0]!.linear!;
  const sides = scoredSides(live, form);
  if (sides.rows.length === 1) return orderings.map(({ name }) => everythingTies(name));
  if (sides.columns.length === 2) return cutsOfCorner(sides, form, orderings);
  let cuts: ExactCut[] | undefined;
  for (const dealt of laws(live, form, meter)) {
    cuts = cutsOf(live, sides, form, dealt, orderings);
    if (cuts !== undefined) return cuts;
  }
  throw effortProblem({
    code: 'beyond-doubles',
    message: 'the exact p is below 1e-550, deeper than this statistic is worked out',
    place: '--method exact',
    hint: 'use --method asymptotic, or --method sample for a guaranteed bound',
  });
}

/** Undefined when more was left out than the smallest mass asked for can bear. */
function cutsOf(
  live: LiveTable,
  sides: ScoredSides,
  form: LinearForm,
  dealt: DealtLaw,
  orderings: readonly Ordering[],
): ExactCut[] | undefined {
  if (dealt.law.at(form.observed) === 0) return undefined;
  const whole = new WideSum();
  whole.add(1, upscaleBits);
  let smallest = Infinity;
  let anyEmpty = false;
  const all = orderings.map(({ name }): Masses => {
    const placeOf = placing(live, form, dealt, name);
    const places = { '-1': new WideSum(), '0': new WideSum(), '1': new WideSum() };
    dealt.law.forEach((sum, value) => {
      if (value === 0) return;
      const mass = places[placeOf(sum)];
      // WideSum takes numbers of moderate size.
      if (value > 2 ** 400) mass.add(value * 2 ** -500, 500);
      else mass.add(value, 0);
    });
    for (const place of [-1, 0, 1] as const) {
      if (places[place].isZero) anyEmpty ||= !isBeyondAll(sides, form, name, place);
      else smallest = Math.min(smallest, places[place].log2);
    }
    return { below: places[-1], tied: places[0], above: places[1], whole };
  });
  const shortBy = dealt.leftOut === 0 ? 0 : 2 ** (Math.log2(dealt.leftOut) - smallest);
  if (shortBy > tolerated || (anyEmpty && dealt.leftOut > 0) || smallest - upscaleBits < deepestLog2) return undefined;
  // The sums over values are carried in double-double.
  return all.map((masses, o) => cutFrom(orderings[o]!.name, masses, (dealt.roundings + 4) * unit + shortBy));
}

/** Whether nothing can stand there, whatever the law: beyond the largest and smallest values that the margins allow. */
function isBeyondAll(sides: ScoredSides, form: LinearForm, name: OrderingName, place: Place): boolean {
  const { lowest, highest } = extremes(sides);
  if (name === 'probability' || name === 'blaker' || place === 0) return false;
  if (name === 'distance') return place === 1 && highest <= form.high && lowest >= form.low;
  return (name === 'upper') === (place === 1) ? form.observed === highest : form.observed === lowest;
}

function placing(live: LiveTable, form: LinearForm, dealt: DealtLaw, name: OrderingName): (sum: number) => Place {
  const { observed, low, high } = form;
  switch (name) {
    case 'upper':
      return (sum) => (sum > observed ? 1 : sum < observed ? -1 : 0);
    case 'lower':
      return (sum) => (sum < observed ? 1 : sum > observed ? -1 : 0);
    case 'distance':
      return (sum) => (sum > high || sum < low ? 1 : sum < high && sum > low ? -1 : 0);
    case 'probability': {
      const places = placesByProbability(live, form, dealt);
      return (sum) => places.get(sum)!;
    }
    case 'blaker': {
      const places = placesBySmallerTail(live, form, dealt);
      return (sum) => places.get(sum)!;
    }
  }
}

/** All scores of a side are equal: S has one value. */
function everythingTies(ordering: OrderingName): ExactCut {
  const none = { value: 0, log10: -Infinity };
  const all = { value: 1, log10: 0 };
  return { kind: 'exact', ordering, below: none, tied: all, above: none, atLeast: all, relativeError: 0 };
}

/** Two scores on each side: S is the cell of a 2x2 table of merged lines, whose law is walked at any total. */
function cutsOfCorner(sides: ScoredSides, form: LinearForm, orderings: readonly Ordering[]): ExactCut[] {
  const [row, column] = [sides.rows, sides.columns].map((lines) => lines.find(({ score }) => score === 1)!.total);
  const both = form.observed;
  const counts = [
    [sides.total - row! - column! + both, column! - both],
    [row! - both, both],
  ];
  const merged = liveTable(makeTable({ counts }));
  const bound = trend.bind(merged, { groups: 'rows', event: 0, first: 0 });
  return [
    ...exactTwoByTwo(
      merged,
      orderings.map(({ name }) => orderingFor(merged, bound, name)),
    ).cuts,
  ];
}
