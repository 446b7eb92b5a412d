// What exact work a table would take, from its margins alone, in counted units: one unit is one cell set in one table.
import { hasOneTableOnly, type LiveTable } from '../table/live-table.js';
import type { BoundStatistic } from '../statistic/contract.js';
import { countTables } from './exact/count-tables.js';
import { forecastWithinLimits } from './exact/within-limits.js';
import { forecastLinear } from './exact/linear/linear-forecast.js';
import { networkStart } from './exact/network/costs.js';
import { forecastNetwork } from './exact/network/forecast.js';

export type ExactEngine = 'two-by-two' | 'enumeration' | 'linear' | 'network' | 'bracket' | 'within-limits';

/** Engines of tests of pairs: one walk, two halves joined, the law of the differences of the margins. */
export type PairsEngine = 'coin-walk' | 'coin-halves' | 'coin-differences';
/** Over strata: the laws of the strata, combined one by one. */
export type StrataEngine = 'convolution';

/** A chain of tables with impossible cells. */
export type ChainEngine = 'chain';

export interface Forecast<Engine = ExactEngine> {
  /** The engine that would do the exact work. */
  readonly engine: Engine;
  readonly workUnits: number;
  readonly tables: number;
  readonly tablesAreCounted: boolean;
  /** What those units take on a usual machine; for display only. */
  readonly seconds: number;
}

/** That of a plan: the last two where not both margins are fixed. */
export type PlannedForecast = Forecast<
  ExactEngine | PairsEngine | StrataEngine | ChainEngine | 'unconditional' | 'multinomial'
>;

export const secondsPerUnit = 3e-8;

/** Default bound on exact work: about two seconds. */
export const standardEffort = 6e7;

/** Exact work may go so many times past its bound, since forecasts err, before it is ended. */
export const mostOverrun = 3;

/** Memory that an exact engine may take; what would take more is out of reach. */
export const mostMemoryBytes = 1.5e9;

/**
 * The cheapest engine that answers, and what it would take.
 * @param bound the statistic at work; some have engines of their own. Left out: what any statistic would take.
 */
export function forecastExact(live: LiveTable, bound?: BoundStatistic | null, statistic?: string): Forecast {
  if (hasOneTableOnly(live)) {
    return { engine: 'enumeration', workUnits: 0, tables: 1, tablesAreCounted: true, seconds: 0 };
  }
  const { tables, counted } = countTables(live);
  const { engine, workUnits } = cheapest(live, tables, counted, bound, statistic);
  return {
    engine,
    workUnits: Math.round(workUnits),
    tables: counted ? tables : Number(tables.toPrecision(3)),
    tablesAreCounted: counted,
    seconds: Number((workUnits * secondsPerUnit).toPrecision(2)),
  };
}

/** Sums over cells, but for those whose law has an engine of its own. */
export const takesNetwork = (bound: BoundStatistic | null | undefined): boolean =>
  bound?.sum !== undefined && bound.linear === undefined;

interface Choice {
  readonly engine: ExactEngine;
  readonly workUnits: number;
}

function cheapest(
  live: LiveTable,
  tables: number,
  counted: boolean,
  bound: BoundStatistic | null | undefined,
  statistic: string | undefined,
): Choice {
  // A statistic known by its values alone has every table listed.
  const anyPlace = bound?.place !== undefined && bound.limits === undefined;
  if (live.rows === 2 && live.columns === 2 && !anyPlace) {
    return { engine: 'two-by-two', workUnits: Math.min(tables, stepsOfTwoByTwo(live)) };
  }
  // An estimate of their number can be several times too low.
  const listing = tables * live.rows * live.columns * (counted ? 1 : 5);
  const choices: Choice[] = [{ engine: 'enumeration', workUnits: listing }];
  if (bound?.linear !== undefined) {
    choices.push({ engine: 'linear', workUnits: forecastLinear(live, bound.linear).workUnits });
  }
  if (bound?.limits !== undefined) {
    choices.push({ engine: 'within-limits', workUnits: forecastWithinLimits(live, bound.limits) });
  }
  if (takesNetwork(bound) && statistic !== undefined) {
    const { workUnits, memoryBytes } = forecastNetwork(live, statistic);
    const fits = memoryBytes <= mostMemoryBytes;
    choices.push({ engine: 'network', workUnits: fits ? networkStart + workUnits : Infinity });
  }
  return choices.reduce((best, choice) => (choice.workUnits < best.workUnits ? choice : best));
}

/** The 2x2 law is walked some ten standard deviations to each side, and as far as the observed table lies (39 at most). */
function stepsOfTwoByTwo(live: LiveTable): number {
  const row = live.rowTotals[0]!;
  const column = live.columnTotals[0]!;
  const { total } = live;
  const mean = (row / total) * column;
  const deviation = Math.sqrt(((mean * (total - row)) / total) * ((total - column) / Math.max(1, total - 1)));
  const reach = Math.min(39, Math.abs(live.counts[0]! - mean) / deviation + 10);
  return deviation * (reach + 12) + 1000;
}
