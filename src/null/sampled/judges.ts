// Judges: where a drawn table stands beside the observed one, by the shortest way that its ordering knows. Near ties are decided
// exactly.
import type { CellLimits, CellSum, Place } from '../../statistic/contract.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Ordering } from '../contract.js';
import { CellValues } from './cell-values.js';
import type { DrawPlan } from './draw-plan.js';
import type { Cells } from './cells.js';
import { ByCorner, ByMemory, type Decide, type Judge } from './remembered-places.js';

/** The judges that a set of orderings needs. */
export interface Panel {
  readonly judges: readonly Judge[];
  /** For each ordering its judge, and whether that one's answer counts as it is or turned round. */
  readonly assigned: readonly { readonly judge: number; readonly direction: 1 | -1 }[];
}

/** Orderings by the same sum share a judge. Tables come in the order of the plan. */
export function panelFor(live: LiveTable, orderings: readonly Ordering[], plan: DrawPlan): Panel {
  const judges: Judge[] = [];
  const bySum = new Map<CellSum, number>();
  const share = orderings.length;
  const assigned = orderings.map((ordering): Panel['assigned'][number] => {
    const { sum } = ordering;
    if (sum === undefined || isTwoByTwo(live)) {
      return { judge: judges.push(judgeFor(live, ordering, plan, share)) - 1, direction: 1 };
    }
    const judge = bySum.get(sum.cells) ?? judges.push(new BySum(live, sum.cells, plan, share)) - 1;
    bySum.set(sum.cells, judge);
    return { judge, direction: sum.direction };
  });
  return { judges, assigned };
}

const isTwoByTwo = (live: LiveTable): boolean => live.rows === 2 && live.columns === 2;

function judgeFor(live: LiveTable, ordering: Ordering, plan: DrawPlan, share: number): Judge {
  const place: Decide = (counts) => ordering.place(counts);
  if (isTwoByTwo(live)) return new ByCorner(live, place, plan, share);
  if (ordering.fold !== undefined) return new ByFold(live, ordering.fold, plan, share);
  if (ordering.limits !== undefined) return new ByLimits(ordering.limits, plan, ordering.name === 'lower' ? -1 : 1);
  return new ByMemory(live, place, plan, share);
}

/** By a sum over cells; asks for an exact decision only where rounding could matter. */
class BySum implements Judge {
  private readonly values: CellValues;
  private readonly nearTies: ByMemory;

  constructor(
    live: LiveTable,
    private readonly cells: CellSum,
    plan: DrawPlan,
    share: number,
  ) {
    this.values = new CellValues(live, cells, plan, share);
    this.nearTies = new ByMemory(live, (counts) => cells.decide(counts), plan, share);
  }

  place(table: Cells): Place {
    const difference = this.values.sum(table) - this.cells.observed;
    const { slack } = this.cells;
    if (difference > slack) return 1;
    if (difference < -slack) return -1;
    return slack === 0 ? 0 : this.nearTies.place(table);
  }
}

/** By an exact sum folded about a centre. */
class ByFold implements Judge {
  private readonly values: CellValues;

  constructor(
    live: LiveTable,
    private readonly fold: NonNullable<Ordering['fold']>,
    plan: DrawPlan,
    share: number,
  ) {
    this.values = new CellValues(live, fold.cells, plan, share);
  }

  place(table: Cells): Place {
    const { low, high } = this.fold;
    const sum = this.values.sum(table);
    return sum > high || sum < low ? 1 : sum < high && sum > low ? -1 : 0;
  }
}

/** By what the cells may hold. */
class ByLimits implements Judge {
  private readonly limits: CellLimits;

  constructor(
    limits: CellLimits,
    { positions }: DrawPlan,
    private readonly outside: 1 | -1,
  ) {
    this.limits = {
      lowest: Float64Array.from(positions, (position) => limits.lowest[position]!),
      highest: Float64Array.from(positions, (position) => limits.highest[position]!),
      lowestTies: Uint8Array.from(positions, (position) => limits.lowestTies[position]!),
      highestTies: Uint8Array.from(positions, (position) => limits.highestTies[position]!),
    };
  }

  place(table: Cells): Place {
    const { lowest, highest, lowestTies, highestTies } = this.limits;
    let ties = false;
    for (let cell = 0; cell < table.length; cell++) {
      const count = table[cell]!;
      if (count < lowest[cell]! || count > highest[cell]!) return this.outside;
      ties ||=
        (count === lowest[cell] && lowestTies[cell] === 1) || (count === highest[cell] && highestTies[cell] === 1);
    }
    return ties ? 0 : this.outside === 1 ? -1 : 1;
  }
}
