// Which lines of a 2x2 table are the groups, which level is the event and which group comes first. Effects of any 2x2 table
// read them, and the statistics that compare two groups.
import { nameHint } from '../problem/suggest.js';
import { usageProblem } from '../problem/problem.js';
import type { Roles, Statistic } from '../statistic/contract.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { PlanOptions } from './plan.js';
import { oneOf } from './settings.js';

export interface NamedRoles extends Roles {
  readonly eventLabel: string;
  readonly firstLabel: string;
  /** null when only one line is left to be a group. */
  readonly referenceLabel: string | null;
}

/** For statistics that know no groups. */
export const noRoles: Roles = { groups: 'rows', event: 0, first: 0 };

/** Two groups and two levels: the whole table, or what its empty lines leave. */
export const isTwoByTwo = (table: Table, live: LiveTable): boolean =>
  (table.rowLabels.length === 2 && table.columnLabels.length === 2) || (live.rows === 2 && live.columns === 2);

/** In a table that is 2x2 as it stands, an empty line is a line; in a larger one it is left out. */
function nameable(table: Table, live: LiveTable): Pick<LiveTable, 'rowIndex' | 'columnIndex'> {
  const whole = table.rowLabels.length === 2 && table.columnLabels.length === 2;
  return whole ? { rowIndex: [0, 1], columnIndex: [0, 1] } : live;
}

/**
 * Groups are rows unless told; the event is the first level of the other side, the first group the first listed. The
 * indexes are those of the live table where that is 2x2.
 * @throws Problem (usage): `not-two-by-two`, `unknown-label`, `empty-line-named`.
 */
export function rolesOf(table: Table, live: LiveTable, statistic: Statistic, options: PlanOptions): NamedRoles {
  if (live.rows > 2 || live.columns > 2) {
    throw usageProblem({
      code: 'not-two-by-two',
      message: `${statistic.name} compares two groups with two outcomes; this table is ${live.rows} x ${live.columns}`,
      place: '--statistic',
      hint: 'use pearson, likelihood-ratio, probability or trend for larger tables, or pick two rows and two columns',
    });
  }
  const { rowIndex, columnIndex } = nameable(table, live);
  const groups = oneOf(options.groups, 'rows', ['rows', 'columns'] as const, '--groups');
  const [groupLabels, groupIndex, eventLabels, eventIndex] =
    groups === 'rows'
      ? [table.rowLabels, rowIndex, table.columnLabels, columnIndex]
      : [table.columnLabels, columnIndex, table.rowLabels, rowIndex];
  const event = options.event === undefined ? 0 : lineNamed(options.event, eventLabels, eventIndex, '--event');
  const reference =
    options.reference === undefined
      ? groupIndex.length - 1
      : lineNamed(options.reference, groupLabels, groupIndex, '--reference');
  const first = groupIndex.length === 2 ? 1 - reference : 0;
  return {
    groups,
    event,
    first,
    eventLabel: eventLabels[eventIndex[event]!]!,
    firstLabel: groupLabels[groupIndex[first]!]!,
    referenceLabel: groupIndex.length === 2 ? groupLabels[groupIndex[reference]!]! : null,
  };
}

/** Index among the live lines of the line with this label. */
function lineNamed(label: string, labels: readonly string[], index: readonly number[], option: string): number {
  const line = labels.indexOf(label);
  if (line < 0) {
    throw usageProblem({
      code: 'unknown-label',
      message: `no line of the table is labelled "${label}"`,
      place: option,
      hint: nameHint(label, labels),
    });
  }
  const live = index.indexOf(line);
  if (live < 0) {
    throw usageProblem({
      code: 'empty-line-named',
      message: `the line labelled "${label}" holds no counts`,
      place: option,
      hint: `name one of: ${index.map((k) => labels[k]).join(', ')}`,
    });
  }
  return live;
}
