// The roles of a 2x2 table as indexes into the whole table, empty lines kept, where the plan holds labels.
import type { TwoByTwoCounts } from '../null/unconditional/two-by-two-counts.js';
import type { Plan } from '../plan/plan.js';
import type { Table } from '../table/table.js';

/**
 * The corner (first group, event) is the same cell whichever side the groups are taken to be, so that a direction keeps its
 * meaning: what was the event becomes the first group, and the other way round.
 */
export function wholeTable(
  { counts, rowLabels, columnLabels }: Table,
  plan: Plan,
  groups: 'rows' | 'columns',
): TwoByTwoCounts {
  const [groupLabels, levelLabels] = plan.groups === 'columns' ? [columnLabels, rowLabels] : [rowLabels, columnLabels];
  const event = plan.event === null ? 0 : levelLabels.indexOf(plan.event);
  const first = plan.reference === null ? 0 : 1 - groupLabels.indexOf(plan.reference);
  return (plan.groups ?? 'rows') === groups
    ? { cells: counts, groups, event, first }
    : { cells: counts, groups, event: first, first: event };
}
