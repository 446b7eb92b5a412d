// What exact work a table would take, from its margins alone, in counted units: one unit is one cell set in one table.
import { hasOneTableOnly, type LiveTable } from '../table/live-table.js';
import type { BoundStatistic } from '../statistic/contract.js';
import { countTables } from './exact/count-tables.js';
import { forecastLinear } from './exact/linear/linear-forecast.js';

export interface Forecast {
  readonly workUnits: number;
  readonly tables: number;
  readonly tablesAreCounted: boolean;
  /** What those units take on a usual machine; for display only. */
  readonly seconds: number;
}

const secondsPerUnit = 3e-8;

/** Default bound on exact work: about two seconds. */
export const standardEffort = 6e7;

/** @param bound the statistic at work; some have engines of their own. Left out: what any statistic would take. */
export function forecastExact(live: LiveTable, bound?: BoundStatistic | null): Forecast {
  if (hasOneTableOnly(live)) return { workUnits: 0, tables: 1, tablesAreCounted: true, seconds: 0 };
  const { tables, counted } = countTables(live);
  // A statistic known by its values alone has every table listed.
  const anyPlace = bound?.place !== undefined && bound.limits === undefined;
  const twoByTwo = live.rows === 2 && live.columns === 2 && !anyPlace;
  const listing = twoByTwo ? Math.min(tables, stepsOfTwoByTwo(live)) : tables * live.rows * live.columns;
  const linear = bound?.linear === undefined ? Infinity : forecastLinear(live, bound.linear).workUnits;
  const workUnits = Math.round(Math.min(listing, linear));
  return {
    workUnits,
    tables: counted ? tables : Number(tables.toPrecision(3)),
    tablesAreCounted: counted,
    seconds: Number((workUnits * secondsPerUnit).toPrecision(2)),
  };
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
