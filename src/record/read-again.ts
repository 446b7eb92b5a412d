// The table that a result was made from, rebuilt from the result itself: counts, labels, strata, clusters, and how they were read.
import type { CompactLine } from '../batch/lines.js';
import { strataFromParts } from '../input/strata.js';
import type { Cluster, ReadTable } from '../input/read-table.js';
import { dataProblem } from '../problem/problem.js';
import type { Result } from '../result/result.js';
import { makeTable } from '../table/table.js';

/** @throws Problem (data): those of makeTable, `margins-differ` where totals in the record are not those of its counts. */
export function readAgain({ input, strata, clusters, quasiIndependence }: Result): ReadTable {
  const { source, sha256, missing, levels, counts, rowLabels, columnLabels } = input;
  const facts = {
    source: source as ReadTable['source'],
    sha256,
    missing: missing as ReadTable['missing'],
    notes: [],
    ...(levels === undefined ? {} : { levels: levels as NonNullable<ReadTable['levels']> }),
  };
  if (strata !== undefined) {
    const parts = strata.labels.map((label, k) => ({ label, counts: strata.tables[k]! }));
    const read: ReadTable = { ...strataFromParts({ strata: parts, rowLabels, columnLabels }), ...facts };
    return checked(read, input);
  }
  const impossible = quasiIndependence?.expected.map((row) => row.map((expected) => expected === null));
  const table = makeTable({ counts, rowLabels, columnLabels, ...(impossible === undefined ? {} : { impossible }) });
  return checked({ table, ...facts, ...(clusters === undefined ? {} : { clusters: membersOf(clusters) }) }, input);
}

/** The same for a compact line. @throws Problem (data): those of makeTable, `counts-differ`. */
export function lineAgain(line: CompactLine): ReadTable {
  const { counts, impossible, rowLabels, columnLabels, strata, clusters } = line;
  const facts = { source: { form: 'library' as const }, sha256: null, missing: null, notes: [] };
  const labels = { ...(rowLabels && { rowLabels }), ...(columnLabels && { columnLabels }) };
  const input = { counts, total: counts.flat().reduce((sum, n) => sum + n, 0) };
  if (strata !== undefined) return checked({ ...strataFromParts({ strata, ...labels }), ...facts }, input);
  const table = makeTable({ counts, ...labels, ...(impossible && { impossible }) });
  return checked({ table, ...facts, ...(clusters && { clusters: membersOf({ alike: clusters }) }) }, input);
}

function membersOf({ alike }: Pick<NonNullable<Result['clusters']>, 'alike'>): Cluster[] {
  const members: Cluster[] = [];
  for (const { counts, byRow } of alike) {
    byRow.forEach((number, row) => {
      for (let k = 0; k < number; k++) members.push({ label: String(members.length + 1), row, counts });
    });
  }
  return members;
}

/** Strata and clusters must add up to the counts that the record shows. */
function checked(read: ReadTable, input: Pick<Result['input'], 'counts' | 'total'>): ReadTable {
  const same = JSON.stringify(read.table.counts) === JSON.stringify(input.counts);
  const units = read.clusters?.flatMap(({ counts }) => counts).reduce((a, b) => a + b, 0);
  if (same && (units === undefined || units === input.total)) return read;
  throw dataProblem({
    code: 'counts-differ',
    message: 'the counts of the parts do not add up to those of the whole table',
    hint: 'the record was changed after it was written; run the analysis again',
  });
}
