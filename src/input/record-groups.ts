// What the tally kept apart beside the pooled table: its strata, and its clusters.
import { dataProblem } from '../problem/problem.js';
import type { Table } from '../table/table.js';
import type { LabelledCounts } from './level-order.js';
import type { Cluster, StratumTable } from './read-table.js';
import type { RecordTally } from './record-tally.js';
import { shownValue } from './shown-value.js';
import { alignedTo, linesIn } from './strata.js';
import { isTotalLabel, type TotalsRule } from './total-lines.js';

/** @throws Problem (data) `total-stratum`: records with counts whose stratum is named like a total */
export function refuseTotalStratum({ used, strata }: RecordTally, rule: TotalsRule, place: string): void {
  const total = used!.countName === null ? undefined : strata.labels.find(isTotalLabel);
  if (total === undefined || rule === 'keep') return;
  throw dataProblem({
    code: 'total-stratum',
    message: `the stratum ${shownValue(total)} is a total by its label`,
    place,
    hint: 'leave its records out of the file, or add --keep-totals if it is a stratum like the others',
  });
}

/** The strata over the lines of the pooled table. @param layers[stratum][row][column] over the lines as they came; holes are 0. */
export function strataOver(
  labels: readonly string[],
  layers: readonly (readonly (readonly number[])[])[],
  whole: Omit<LabelledCounts, 'counts'>,
  table: Table,
): StratumTable[] {
  const parts = labels.map((label, s) => ({
    label,
    counts: whole.rowLabels.map((_, row) => whole.columnLabels.map((__, column) => layers[s]?.[row]?.[column] ?? 0)),
    rowLabels: whole.rowLabels,
    columnLabels: whole.columnLabels,
  }));
  return alignedTo(table, parts);
}

/** Clusters with their rows and counts over the lines of the table; those in lines left out go with them. */
export function clustersOver(
  clusters: readonly Cluster[],
  whole: Omit<LabelledCounts, 'counts'>,
  table: Table,
): Cluster[] {
  const rows = linesIn(whole.rowLabels, table.rowLabels);
  const columns = linesIn(table.columnLabels, whole.columnLabels);
  return clusters.flatMap(({ label, row: before, counts: all }) => {
    const row = rows[before]!;
    const counts = columns.map((column) => all[column] ?? 0);
    return row < 0 || counts.every((n) => n === 0) ? [] : [{ label, row, counts }];
  });
}

/** Of all records; undefined where no strata were asked for. @throws Problem (data) `total-stratum` */
export function strataOf(
  tally: RecordTally,
  whole: LabelledCounts,
  table: Table,
  rule: TotalsRule,
  place: string,
): StratumTable[] | undefined {
  if (tally.used!.strataName === null) return undefined;
  refuseTotalStratum(tally, rule, place);
  return strataOver(tally.strata.labels, tally.layers, whole, table);
}

export const clustersOf = (tally: RecordTally, whole: LabelledCounts, table: Table): Cluster[] =>
  clustersOver(
    tally.clusters.labels.map((label, k) => ({ label, row: tally.clusterRows[k]!, counts: tally.clusterCounts[k]! })),
    whole,
    table,
  );
