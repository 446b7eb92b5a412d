// The two groups of a 2x2 table with their events, and what the measures that compare them share.
import type { NamedRoles } from '../plan/roles.js';
import type { Table } from '../table/table.js';
import { extended, type Effect, type EffectReason, type Interval } from './contract.js';

export interface Group {
  /** Units with the event, and all units; either may be 0. */
  readonly events: number;
  readonly size: number;
}

export interface TwoGroups {
  readonly first: Group;
  readonly second: Group;
}

export interface EffectSettings {
  /** Level of the intervals, in (0, 1). */
  readonly confidence: number;
  /** Where the study fixed both group sizes: counted work that their exact unconditional intervals may take. */
  readonly exactWork?: number;
}

/** Effects use the whole table: a group without units stays one. @param named roles of two groups. */
export function twoGroupsOf(table: Table, { groups, eventLabel, firstLabel, referenceLabel }: NamedRoles): TwoGroups {
  const byRows = groups === 'rows';
  const groupLabels = byRows ? table.rowLabels : table.columnLabels;
  const event = (byRows ? table.columnLabels : table.rowLabels).indexOf(eventLabel);
  const group = (label: string): Group => {
    const line = groupLabels.indexOf(label);
    return byRows
      ? { events: table.counts[line]![event]!, size: table.rowTotals[line]! }
      : { events: table.counts[event]![line]!, size: table.columnTotals[line]! };
  };
  return { first: group(firstLabel), second: group(referenceLabel!) };
}

/** Why nothing can be compared, if so. */
export const emptyGroup = ({ first, second }: TwoGroups): EffectReason | undefined =>
  first.size === 0 || second.size === 0 ? 'empty-group' : undefined;

/** An interval without limits. */
export const noInterval = (method: string, { confidence }: EffectSettings, reason: EffectReason): Interval => ({
  method,
  confidence,
  lower: null,
  upper: null,
  reason,
  guaranteed: false,
});

/** An interval of an approximate method; an infinite limit names its reason. */
export const approximateInterval = (
  method: string,
  { confidence }: EffectSettings,
  [lower, upper]: readonly [number, number],
  whenInfinite: EffectReason = 'zero-cell',
): Interval => ({
  method,
  confidence,
  lower: extended(lower),
  upper: extended(upper),
  ...(Number.isFinite(lower) && Number.isFinite(upper) ? {} : { reason: whenInfinite }),
  guaranteed: false,
});

/** The estimate of an effect, or why there is none. */
export const estimateOf = (value: number | EffectReason): Pick<Effect, 'estimate' | 'reason'> =>
  typeof value === 'number' ? { estimate: extended(value) } : { estimate: null, reason: value };

/** Events of both groups together: none and nothing but. */
export const noEvents = ({ first, second }: TwoGroups): boolean => first.events + second.events === 0;
export const onlyEvents = ({ first, second }: TwoGroups): boolean =>
  first.events === first.size && second.events === second.size;
