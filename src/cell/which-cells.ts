// Which cells drive an association: measures of every cell, its exact p, and that p adjusted over all cells - exactly, or from the
// draws of the run, or left out with the reason. What is done is settled in counted units before anything is drawn.
import { groupedDigits } from '../numeric/digit-groups.js';
import { localSource, blocksInOrder } from '../null/sampled/block-source.js';
import { rankCounts, type RankTable } from '../null/sampled/ranked-sampler.js';
import { freshSeed } from '../plan/fresh-seed.js';
import type { CellsEcho, Plan, PlanOptions } from '../plan/plan.js';
import { hasOneTableOnly, type LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { AdjustedP } from './adjusted-p.js';
import { cellEntries, type CellEntry } from './cell-entries.js';
import { forecastCellPs } from './cell-p.js';
import { exactAdjustment, forecastExactAdjustment } from './exact-adjustment.js';
import { rankTable } from './rank-table.js';
import { familyExponent } from './residuals.js';
import { fixedAdjustment, followedAdjustment, type SampledAdjustment } from './sampled-adjustment.js';
import { thresholdsOf, thresholdSteps, type Thresholds } from './thresholds.js';

export interface CellInquiry {
  readonly echo: CellsEcho;
  /** The draws of the run are wanted too, judged by these ranks. */
  readonly listener?: { readonly table: RankTable; readonly follower: SampledAdjustment };
  /** Once the draws are made, where there are any. One for each cell of the whole table, row-major. */
  entries(): Promise<CellEntry[]>;
}

/** What is done unasked stays below about a tenth of a second. */
const unasked = { cells: 1000, pWork: 3e6, exactWork: 2e6, steps: 2 ** 16, pairs: 2e4 };
const asked = { cells: Infinity, pWork: Infinity, exactWork: Infinity, steps: 2 ** 22, pairs: 1e6 };
/** Fixed numbers of draws above this are asked for by who wants them fast. */
const mostRankedUnasked = 1e6;
/** Tables drawn for the cells alone, where they are asked for and p is not sampled. */
export const drawsForCells = 100_000;

/** @returns null where cells are not wanted. */
export function inquireCells(table: Table, live: LiveTable, plan: Plan, options: PlanOptions): CellInquiry | null {
  const most = options.cells === true ? { ...asked, pWork: plan.effort, exactWork: plan.effort } : unasked;
  if (options.cells === false || table.rowLabels.length * table.columnLabels.length > most.cells) return null;
  const exponent = familyExponent(plan.statistic, plan.lambda);
  const contributionsTo = exponent === undefined ? 'pearson' : plan.statistic;
  const base = { contributionsTo, ...(options.cells === true ? { asked: true as const } : {}) };
  const hasP = !hasOneTableOnly(live) && forecastCellPs(live) <= most.pWork;
  const answer = (adjusted: (thresholds: Thresholds) => Promise<AdjustedP[]>, found: Thresholds | null) => () =>
    cellEntries(table, live, exponent ?? 1, hasP, found, adjusted);
  const without = (reason: string): CellInquiry => ({
    echo: { ...base, adjustment: 'none', reason },
    entries: answer(() => Promise.resolve([]), null),
  });
  if (hasOneTableOnly(live)) return without('these margins allow one table only');
  if (!hasP) return without('the exact p of the cells is over the bound');
  if (live.rows === 2 && live.columns === 2) {
    return {
      echo: { ...base, adjustment: 'exact', reason: 'all four cells stand or fall together' },
      entries: answer(() => Promise.resolve([]), null),
    };
  }
  const steps = thresholdSteps(live);
  if (steps > most.steps || live.counts.length ** 2 > most.pairs) {
    return without(`the p of every possible count would take ${groupedDigits(steps)} steps; --cells allows more`);
  }
  const thresholds = thresholdsOf(live);
  const work = forecastExactAdjustment(live, thresholds);
  if (work <= most.exactWork) {
    const reason = `exact work is forecast at ${groupedDigits(Math.round(work))} units`;
    return {
      echo: { ...base, adjustment: 'exact', reason },
      entries: answer((found) => Promise.resolve(exactAdjustment(live, found)), thresholds),
    };
  }
  if (plan.method === 'sample') {
    return options.cells !== true && Number(plan.draws) > mostRankedUnasked
      ? without('ranking every cell of so many draws would slow them by a fifth; --cells does it')
      : fromDrawsOfRun();
  }
  if (options.cells !== true) return without('exact work is over the bound for what is done unasked; --cells goes on');
  return fromOwnDraws(plan.seed ?? options.seed ?? freshSeed());

  function fromDrawsOfRun(): CellInquiry {
    const ranks = thresholds.places.length;
    const follower =
      plan.draws === 'auto'
        ? followedAdjustment(ranks, plan.alpha, plan.samplingRisk!)
        : fixedAdjustment(ranks, plan.samplingConfidence);
    return {
      echo: { ...base, adjustment: 'sample', reason: 'from the draws of the run' },
      listener: { table: rankTable(thresholds), follower },
      entries: answer(() => follower.adjusted(), thresholds),
    };
  }

  function fromOwnDraws(seed: string): CellInquiry {
    const reason = 'exact work is over the bound, so random tables are drawn for the cells';
    return {
      echo: { ...base, adjustment: 'sample', reason, draws: drawsForCells, seed },
      entries: answer(async () => {
        const follower = fixedAdjustment(thresholds.places.length, plan.samplingConfidence);
        const sampling = { seed, tableKey: plan.tableKey, draws: drawsForCells };
        const source = localSource(live, [], sampling, rankTable(thresholds));
        for await (const block of blocksInOrder(source, sampling)) {
          follower.add(rankCounts(block.tallies, 0), block.draws);
        }
        return follower.adjusted();
      }, thresholds),
    };
  }
}

/** The ranks that worker threads judge by: a function of the table alone. */
export const ranksFor = (live: LiveTable): RankTable => rankTable(thresholdsOf(live));
