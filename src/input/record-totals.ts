// Records with counts are often a cross-table written long, totals included; the same rule holds for them. Records that
// count once each cannot hold a total, so nobody asks there.
import type { LabelledCounts, Side } from './level-order.js';
import type { InputNote } from './read-table.js';
import type { TotalLines, TotalsRule, TotalsView } from './total-lines.js';
import {
  findTotals,
  keptTotalsNote,
  leaveOutTotals,
  noTotalsNote,
  onlyTotals,
  totalLineProblem,
} from './total-lines.js';

export interface SettledTotals {
  readonly counts: LabelledCounts;
  readonly leftOut: readonly Side[];
  readonly notes: readonly InputNote[];
}

/** @param withCounts whether the records bring counts of their own */
export function settleRecordTotals(
  whole: LabelledCounts,
  withCounts: boolean,
  rule: TotalsRule,
  place: string,
): SettledTotals {
  const view: TotalsView = {
    values: whole.counts,
    texts: whole.counts.map((row) => row.map(String)),
    rowLabels: whole.rowLabels,
    columnLabels: whole.columnLabels,
  };
  const found: TotalLines = withCounts ? findTotals(view) : { rows: [], columns: [], by: 'label' };
  if (found.rows.length + found.columns.length === 0) {
    return { counts: whole, leftOut: [], notes: rule === 'drop' ? [noTotalsNote] : [] };
  }
  if (rule === 'refuse') throw totalLineProblem(found, view, place);
  if (rule === 'keep') return { counts: whole, leftOut: [], notes: [keptTotalsNote(found, view)] };
  if (found.rows.length === view.rowLabels.length || found.columns.length === view.columnLabels.length) {
    throw onlyTotals(view, place);
  }
  const { kept, notes } = leaveOutTotals(view, found);
  const leftOut: Side[] = [
    ...(found.rows.length > 0 ? ['row' as const] : []),
    ...(found.columns.length > 0 ? ['column' as const] : []),
  ];
  return { counts: kept, leftOut, notes };
}
