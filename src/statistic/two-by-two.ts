// The four counts of a 2x2 table as two groups with and without the event, whichever side the groups are on.
import type { LiveTable } from '../table/live-table.js';
import type { Roles } from './contract.js';

export interface TwoGroups {
  /** Row-major index of the cell (first group, event). */
  readonly corner: number;
  /** Sizes of the first and second group. */
  readonly first: number;
  readonly second: number;
  /** Units with the event, and all units. */
  readonly events: number;
  readonly total: number;
}

export function twoGroups(live: LiveTable, roles: Roles): TwoGroups {
  const groupTotals = roles.groups === 'rows' ? live.rowTotals : live.columnTotals;
  const levelTotals = roles.groups === 'rows' ? live.columnTotals : live.rowTotals;
  return {
    corner: roles.groups === 'rows' ? roles.first * 2 + roles.event : roles.event * 2 + roles.first,
    first: groupTotals[roles.first]!,
    second: groupTotals[1 - roles.first]!,
    events: levelTotals[roles.event]!,
    total: live.total,
  };
}

/** a n - (first size)(events), exactly: the corner count's distance from its mean, times the total. */
export const scaledDeviation = (groups: TwoGroups, corner: number): bigint =>
  BigInt(corner) * BigInt(groups.total) - BigInt(groups.first) * BigInt(groups.events);

export const magnitude = (x: bigint): bigint => (x < 0n ? -x : x);

export const order = (a: bigint, b: bigint): -1 | 0 | 1 => (a > b ? 1 : a < b ? -1 : 0);
