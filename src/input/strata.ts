// Strata share their levels: each is laid out over the lines of the pooled table, where a level that it lacks is an empty line.
import { dataProblem, usageProblem } from '../problem/problem.js';
import { makeTable, type Table, type TableParts } from '../table/table.js';
import type { LabelledCounts } from './level-order.js';
import type { StratumTable } from './read-table.js';

export interface LabelledStratum extends LabelledCounts {
  readonly label: string;
}

/** For each label, its index among others; -1 where it is not. */
export function linesIn(labels: readonly string[], others: readonly string[]): number[] {
  const places = new Map(others.map((label, index) => [label, index]));
  return labels.map((label) => places.get(label) ?? -1);
}

/** Every stratum over the lines of the pooled table. */
export const alignedTo = (
  { rowLabels, columnLabels }: Pick<Table, 'rowLabels' | 'columnLabels'>,
  strata: readonly LabelledStratum[],
): StratumTable[] =>
  strata.map((stratum) => {
    const rows = linesIn(rowLabels, stratum.rowLabels);
    const columns = linesIn(columnLabels, stratum.columnLabels);
    return {
      label: stratum.label,
      counts: rows.map((row) => columns.map((column) => (row < 0 || column < 0 ? 0 : stratum.counts[row]![column]!))),
    };
  });

/** All strata together: their levels in the order in which they first appear. */
export function pooled(strata: readonly LabelledStratum[]): LabelledCounts {
  const rowLabels = [...new Set(strata.flatMap((one) => one.rowLabels))];
  const columnLabels = [...new Set(strata.flatMap((one) => one.columnLabels))];
  const aligned = alignedTo({ rowLabels, columnLabels }, strata);
  const counts = rowLabels.map((_, i) =>
    columnLabels.map((__, j) => aligned.reduce((sum, one) => sum + one.counts[i]![j]!, 0)),
  );
  return { counts, rowLabels, columnLabels };
}

/** Tables by stratum as a program gives them, all over the same lines. */
export interface StrataParts {
  readonly strata: readonly (
    TableParts['counts'] | { readonly label: string; readonly counts: TableParts['counts'] }
  )[];
  readonly rowLabels?: readonly string[];
  readonly columnLabels?: readonly string[];
}

/**
 * The pooled table and its strata from counts in memory.
 * @throws Problem: data (those of makeTable, with the stratum as the place; `strata-shape`), usage (`no-strata`).
 */
export function strataFromParts({ strata, rowLabels, columnLabels }: StrataParts): {
  table: Table;
  strata: StratumTable[];
} {
  const named = strata.map((one, s) => ('counts' in one ? one : { label: `stratum ${s + 1}`, counts: one }));
  const first = named[0]?.counts;
  if (first === undefined) {
    throw usageProblem({
      code: 'no-strata',
      message: 'there are no strata',
      hint: 'give one table of counts for each stratum',
    });
  }
  const seen = new Set<string>();
  for (const { label, counts } of named) {
    if (seen.has(label)) throw sameStratum(label);
    seen.add(label);
    if (counts.length === first.length && counts.every((row) => row.length === first[0]?.length)) continue;
    throw dataProblem({
      code: 'strata-shape',
      message: 'this stratum has another number of rows or columns than the first',
      place: `stratum "${label}"`,
      hint: 'write a level that a stratum lacks as a line of zeros',
    });
  }
  for (const { label, counts } of named) checkCounts(label, counts);
  const sum = first.map((row, i) => row.map((_, j) => named.reduce((all, { counts }) => all + counts[i]![j]!, 0)));
  const table = makeTable({
    counts: sum,
    ...(rowLabels === undefined ? {} : { rowLabels }),
    ...(columnLabels === undefined ? {} : { columnLabels }),
  });
  return { table, strata: named.map(({ label, counts }) => ({ label, counts: counts.map((row) => [...row]) })) };
}

export const sameStratum = (label: string, place?: string): Error =>
  dataProblem({
    code: 'same-stratum',
    message: `two strata have the label "${label}"`,
    ...(place === undefined ? {} : { place }),
    hint: 'give each stratum a name of its own, or add the two together first',
  });

/** Counts whose faults the sum would hide. */
function checkCounts(label: string, counts: TableParts['counts']): void {
  for (const count of counts.flat()) {
    if (Number.isInteger(count) && count >= 0) continue;
    throw dataProblem({
      code: count < 0 ? 'negative-count' : 'not-a-count',
      message: `${String(count)} is not a count`,
      place: `stratum "${label}"`,
      hint: 'counts are whole numbers from 0 upwards',
    });
  }
}
