// What the tally kept apart beside the pooled table: its strata, and its clusters.
import { dataProblem } from '../problem/problem.js';
import type { Table } from '../table/table.js';
import type { LabelledCounts } from './level-order.js';
import type { Cluster, StratumTable } from './read-table.js';
import type { RecordTally } from './record-tally.js';
import { shownValue } from './shown-value.js';
import { alignedTo, linesIn } from './strata.js';
import { isTotalLabel, type TotalsRule } from './total-lines.js';

/**
 * The strata over the lines of the pooled table; undefined where none were asked for.
 * @throws Problem (data) `total-stratum`: records with counts whose stratum is named like a total
 */
export function strataOf(
  tally: RecordTally,
  whole: LabelledCounts,
  table: Table,
  rule: TotalsRule,
  place: string,
): StratumTable[] | undefined {
  if (tally.used!.strataName === null) return undefined;
  const total = tally.used!.countName === null ? undefined : tally.strata.labels.find(isTotalLabel);
  if (total !== undefined && rule !== 'keep') {
    throw dataProblem({
      code: 'total-stratum',
      message: `the stratum ${shownValue(total)} is a total by its label`,
      place,
      hint: 'leave its records out of the file, or add --keep-totals if it is a stratum like the others',
    });
  }
  const parts = tally.strata.labels.map((label, s) => ({
    label,
    counts: whole.rowLabels.map((_, row) =>
      whole.columnLabels.map((__, column) => tally.layers[s]?.[row]?.[column] ?? 0),
    ),
    rowLabels: whole.rowLabels,
    columnLabels: whole.columnLabels,
  }));
  return alignedTo(table, parts);
}

/** The clusters with their rows and counts over the lines of the table; those in lines left out go with them. */
export function clustersOf(tally: RecordTally, whole: LabelledCounts, table: Table): Cluster[] {
  const rows = linesIn(whole.rowLabels, table.rowLabels);
  const columns = linesIn(table.columnLabels, whole.columnLabels);
  return tally.clusters.labels.flatMap((label, cluster) => {
    const row = rows[tally.clusterRows[cluster]!]!;
    const counts = columns.map((column) => tally.clusterCounts[cluster]![column] ?? 0);
    return row < 0 || counts.every((n) => n === 0) ? [] : [{ label, row, counts }];
  });
}
