// Exact cuts of a 2x2 table, any total. On each side of the mean every ordering is monotone in the corner count (the
// statistics are convex in it or rise with it; the law is unimodal), so its borders are found by bisection with exact
// comparisons, and one walk over the law serves all orderings.
import { WideSum } from '../../numeric/wide-number.js';
import type { Place } from '../../statistic/contract.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Ordering } from '../contract.js';
import { cutFrom, type ExactAnswer } from './exact-answer.js';
import { cornerLaw, walk, type CornerLaw, type Stretch } from './two-by-two-law.js';

/** A maximal run of corner counts on one side with the same place in an ordering. */
interface Run {
  readonly from: number;
  readonly to: number;
  readonly place: Place;
}

/**
 * Cuts for each ordering, and the probability of the observed table.
 * Time: at most the number of possible corner counts, and for large totals about (|z| + 20) standard deviations of the
 * corner count, |z| the observed deviation in those units. Memory: constant. Relative error of every mass below 1e-14.
 */
export function exactTwoByTwo(live: LiveTable, orderings: readonly Ordering[]): ExactAnswer {
  const law = cornerLaw(live.rowTotals[0]!, live.columnTotals[0]!, live.total);
  const observed = live.counts[0]!;
  const whole = new WideSum();
  const observedMass = new WideSum();
  const masses = orderings.map(() => ({ '-1': new WideSum(), '0': new WideSum(), '1': new WideSum() }));
  // The side that holds the observed table is walked first: afterwards the mass that an early stop must not disturb is known.
  const sides: (1 | -1)[] = observed <= law.middle ? [-1, 1] : [1, -1];
  for (const direction of sides) {
    const runsOf = orderings.map((ordering) => runsOnSide(law, direction, (k) => ordering.place(tableAt(law, k))));
    const stretches = cutIntoStretches(law, direction, runsOf, observed);
    const placeOf = stretches.map(({ from }) => runsOf.map((runs) => runs.find((run) => contains(run, from))!.place));
    const massOf = (ordering: number, place: Place, upTo: number): number => {
      let log2 = masses[ordering]![place].log2;
      for (let s = 0; s <= upTo; s++) {
        if (placeOf[s]![ordering] === place) log2 = Math.max(log2, stretches[s]!.mass.log2);
      }
      return log2;
    };
    walk(law, direction, stretches, (current, log2Rest) => {
      for (let s = current; s < stretches.length; s++) {
        for (let o = 0; o < orderings.length; o++) {
          if (log2Rest > massOf(o, placeOf[s]![o]!, current) - 70) return false;
        }
      }
      return true;
    });
    stretches.forEach(({ from, to, mass }, s) => {
      whole.addSum(mass);
      if (from === observed && to === observed) observedMass.addSum(mass);
      placeOf[s]!.forEach((place, o) => masses[o]![place].addSum(mass));
    });
  }
  return {
    cuts: orderings.map((ordering, o) =>
      cutFrom(ordering.name, { below: masses[o]![-1], tied: masses[o]![0], above: masses[o]![1], whole }, 1e-14),
    ),
    point: observedMass.over(whole),
    tables: law.highest - law.lowest + 1,
  };
}

/** Row-major counts of the table with corner count k. */
const tableAt = ({ row, column, total }: CornerLaw, k: number): number[] => [
  k,
  row - k,
  column - k,
  total - row - column + k,
];

const contains = (run: Run, k: number): boolean => (k - run.from) * (k - run.to) <= 0;

/** Ends of one side in walking order; undefined when nothing lies there. */
function sideEnds(law: CornerLaw, direction: 1 | -1): { from: number; to: number } | undefined {
  if (direction < 0) return { from: law.middle, to: law.lowest };
  return law.middle < law.highest ? { from: law.middle + 1, to: law.highest } : undefined;
}

/** Runs of equal place on one side, by bisection for the end of each run (places are monotone along a side). */
function runsOnSide(law: CornerLaw, direction: 1 | -1, placeAt: (k: number) => Place): Run[] {
  const ends = sideEnds(law, direction);
  if (ends === undefined) return [];
  const runs: Run[] = [];
  let from = ends.from;
  for (;;) {
    const place = placeAt(from);
    let inside = from;
    let beyond = ends.to + direction;
    while (Math.abs(beyond - inside) > 1) {
      const half = inside + Math.trunc((beyond - inside) / 2);
      if (placeAt(half) === place) inside = half;
      else beyond = half;
    }
    runs.push({ from, to: inside, place });
    if (inside === ends.to) return runs;
    from = inside + direction;
  }
}

/** The coarsest stretches that respect the runs of every ordering and keep the observed table apart. */
function cutIntoStretches(
  law: CornerLaw,
  direction: 1 | -1,
  runsOf: readonly (readonly Run[])[],
  observed: number,
): Stretch[] {
  const ends = sideEnds(law, direction);
  if (ends === undefined) return [];
  const starts = [ends.from];
  for (const runs of runsOf) for (const run of runs) insert(starts, run.from, direction);
  if ((observed - ends.from) * (observed - ends.to) <= 0) {
    insert(starts, observed, direction);
    if (observed !== ends.to) insert(starts, observed + direction, direction);
  }
  return starts.map((from, s) => ({
    from,
    to: s + 1 < starts.length ? starts[s + 1]! - direction : ends.to,
    mass: new WideSum(),
  }));
}

/** Into a list in walking order, once; a handful of starts, most of them the last one. */
function insert(starts: number[], start: number, direction: 1 | -1): void {
  let at = starts.length;
  while (at > 0 && (starts[at - 1]! - start) * direction > 0) at--;
  if (starts[at - 1] !== start) starts.splice(at, 0, start);
}
