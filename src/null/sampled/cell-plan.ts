// Chooses the sampler of each cell that is drawn from its conditional law, within the memory that look-up tables may take.
import { mostOutcome, type GuidedLaws, type VaryingLaw } from './hypergeometric/guide.js';
import { leastVarianceForRejection } from './hypergeometric/rejection.js';
import { leastOf, mostOf, rangeAround, spreadOf, varianceOf, type Range } from './hypergeometric/spread.js';
import type { TrialGrid } from './hypergeometric/trial.js';
import { guideBorders, guideEntries, isWide, trialChances } from './limits.js';

export const cellSamplers = ['guide', 'trial', 'inversion', 'rejection'] as const;
export type CellSampler = (typeof cellSamplers)[number];

/** Which of the two numbers that can vary a look-up goes by. */
export type Key = 'marked' | 'drawn';

/** How one cell is drawn from its conditional law, and the forecast of its work. */
export type CellPlan = { readonly work: number } & (
  | { readonly sampler: 'guide'; readonly key: Key; readonly laws: GuidedLaws }
  | { readonly sampler: 'trial'; readonly key: Key; readonly laws: GuidedLaws; readonly grid: TrialGrid }
  | { readonly sampler: 'inversion' | 'rejection' }
);

/** Nanoseconds on a usual machine, measured once: units of a forecast, not promises. */
const work = {
  guide: 13,
  trial: 27,
  failedTrial: 15,
  inversion: 42,
  wideInversion: 280,
  inversionPerDeviation: 3.3,
  rejection: 30,
  wideRejection: 70,
  rejectionOverDeviation: 85,
} as const;

/** Look-up tables reach so many deviations; what lies beyond (one draw in millions) is drawn without them. */
const usualReach = 5.5;
/** Outcomes of any law that a table holds lie within so many deviations of the expected count, and as many units more. */
const outcomeReach = 14;
const outcomeMargin = 10;

const leastShares = 64;
const mostShares = 4096;

export class CellPlanner {
  private readonly total: number;
  private readonly wide: boolean;
  /** Units in the rows (columns) from each one on. */
  private readonly rowsFrom: readonly number[];
  private readonly columnsFrom: readonly number[];
  private entriesLeft = guideEntries;
  private bordersLeft = guideBorders;
  private chancesLeft = trialChances;

  constructor(
    private readonly rowTotals: readonly number[],
    private readonly columnTotals: readonly number[],
    private readonly prefer: string | undefined,
    private readonly reach = usualReach,
  ) {
    this.rowsFrom = sumsFrom(rowTotals);
    this.columnsFrom = sumsFrom(columnTotals);
    this.total = this.rowsFrom[0]!;
    this.wide = isWide(this.total);
  }

  /** Plans of the cells of all rows but the last, from row `first` on, without the last column. */
  planRows(first: number): CellPlan[][] {
    const rows = Array.from({ length: this.rowTotals.length - 1 - first }, (_, k) => first + k);
    return rows.map((i) => this.columnTotals.slice(0, -1).map((_, j) => this.planCell(i, j)));
  }

  private planCell(i: number, j: number): CellPlan {
    const deviation = this.conditionalDeviation(i, j);
    const plans: CellPlan[] = [
      {
        sampler: 'inversion',
        work: (this.wide ? work.wideInversion : work.inversion) + work.inversionPerDeviation * deviation,
      },
    ];
    if (deviation ** 2 >= leastVarianceForRejection) {
      plans.push({
        sampler: 'rejection',
        work: (this.wide ? work.wideRejection : work.rejection) + work.rejectionOverDeviation / deviation,
      });
    }
    const guided = this.guidedCell(i, j, deviation);
    if (guided !== null) plans.push(guided);
    const tried = this.triedCell(i, j, deviation);
    if (tried !== null) plans.push(tried);
    const chosen =
      plans.find((plan) => plan.sampler === this.prefer) ??
      plans.reduce((best, plan) => (plan.work < best.work ? plan : best));
    this.setAside(chosen);
    return chosen;
  }

  /** Deviation of the cell's count given the cells before it, when those are as expected. */
  private conditionalDeviation(i: number, j: number): number {
    const rowsLeft = this.rowsFrom[i]!;
    const columnsLeft = this.columnsFrom[j]!;
    const left = rowsLeft * (columnsLeft / this.total);
    const marked = rowsLeft * (this.columnTotals[j]! / this.total);
    const drawn = columnsLeft * (this.rowTotals[i]! / this.total);
    return Math.sqrt(varianceOf(left, marked, drawn));
  }

  /** In the first row only what is left of the row varies, in the first column only what is left of the column. */
  private guidedCell(i: number, j: number, deviation: number): CellPlan | null {
    if (i > 0 && j > 0) return null;
    const row = this.rowTotals[i]!;
    const column = this.columnTotals[j]!;
    const total = i === 0 ? this.columnsFrom[j]! : this.rowsFrom[i]!;
    const key = i === 0 ? 'drawn' : 'marked';
    const varying = i === 0 ? this.range(total, row) : this.range(total, column);
    const fixed = i === 0 ? column : row;
    const laws = this.lawsWithin(i, j, deviation, varying, { kind: 'hypergeometric', total, fixed });
    return laws === null ? null : { sampler: 'guide', key, laws, work: work.guide };
  }

  private triedCell(i: number, j: number, deviation: number): CellPlan | null {
    if (this.wide) return null;
    const row = this.rowTotals[i]!;
    const column = this.columnTotals[j]!;
    const rowsLeft = this.rowsFrom[i]!;
    const columnsLeft = this.columnsFrom[j]!;
    // Proposals are spared on the side that has more units still to come.
    const key = columnsLeft - column >= rowsLeft - row ? 'marked' : 'drawn';
    const toCome = key === 'marked' ? columnsLeft - column : rowsLeft - row;
    const share = key === 'marked' ? row / rowsLeft : column / columnsLeft;
    const varying = key === 'marked' ? this.range(rowsLeft, column) : this.range(columnsLeft, row);
    const grid: TrialGrid = {
      share,
      mostUnits: this.total,
      units: key === 'marked' ? this.range(rowsLeft, toCome) : this.range(columnsLeft, toCome),
      taken: rangeAround(spreadOf(this.total, toCome, key === 'marked' ? row : column), this.reach),
    };
    if (grid.units.length * grid.taken.length > this.chancesLeft) return null;
    const laws = this.lawsWithin(i, j, deviation, varying, { kind: 'binomial', share });
    const proposals = Math.sqrt(this.total / toCome);
    const cost = proposals * work.trial + (proposals - 1) * work.failedTrial;
    return laws === null ? null : { sampler: 'trial', key, laws, grid, work: cost };
  }

  /** Laws of the outcome at (i, j) with as many shares as memory allows, if that is enough; else null. */
  private lawsWithin(i: number, j: number, deviation: number, varying: Range, law: VaryingLaw): GuidedLaws | null {
    if (varying.length < 1) return null;
    const spread = spreadOf(this.total, this.rowTotals[i]!, this.columnTotals[j]!);
    const around = rangeAround(spread, outcomeReach);
    const from = Math.max(0, around.from - outcomeMargin);
    const most = Math.min(this.rowTotals[i]!, this.columnTotals[j]!, around.from + around.length - 1 + outcomeMargin);
    const outcomes = { from, length: most - from + 1 };
    const wanted = 2 ** Math.ceil(Math.log2(48 * deviation + leastShares));
    const affordable = 2 ** Math.floor(Math.log2(this.entriesLeft / varying.length));
    const shares = Math.min(wanted, affordable, mostShares);
    const fits =
      (varying.from + varying.length) * shares < 2 ** 31 &&
      most <= mostOutcome &&
      outcomes.length * varying.length <= this.bordersLeft &&
      shares >= Math.max(leastShares, 8 * deviation);
    return fits ? { law, varying, outcomes, shares } : null;
  }

  private setAside(plan: CellPlan): void {
    if (plan.sampler !== 'guide' && plan.sampler !== 'trial') return;
    const { varying, outcomes, shares } = plan.laws;
    this.entriesLeft -= varying.length * shares;
    this.bordersLeft -= varying.length * outcomes.length;
    if (plan.sampler === 'trial') this.chancesLeft -= plan.grid.units.length * plan.grid.taken.length;
  }

  /** Where the count of a block lies that so many of one side share with so many of the other. */
  private range(one: number, other: number): Range {
    const around = rangeAround(spreadOf(this.total, one, other), this.reach);
    const from = Math.max(around.from, leastOf(this.total, one, other));
    return { from, length: Math.min(around.from + around.length - 1, mostOf(one, other)) - from + 1 };
  }
}

function sumsFrom(totals: readonly number[]): number[] {
  const sums = [...totals];
  for (let k = totals.length - 2; k >= 0; k--) sums[k]! += sums[k + 1]!;
  return sums;
}
