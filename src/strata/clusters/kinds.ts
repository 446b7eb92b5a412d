// Clusters permuted whole: chance deals the group labels anew over clusters, as many clusters to a group as it has. Clusters with the same
// counts are alike, so what is dealt is a table of groups by kinds of cluster with both margins held - the law of any other table.
import type { Cluster } from '../../input/read-table.js';
import { makeTable, type Table } from '../../table/table.js';

export interface Kinds {
  /** Counts of clusters: a row for each row of the units' table, a column for each kind. */
  readonly table: Table;
  /** For each kind, the counts of one such cluster by column of the units' table. */
  readonly counts: readonly (readonly number[])[];
}

/** Kinds in the order in which they first appear. */
export function kindsOf(clusters: readonly Cluster[], rows: number): Kinds {
  const places = new Map<string, number>();
  const counts: (readonly number[])[] = [];
  const lines = Array.from({ length: rows }, (): number[] => []);
  for (const cluster of clusters) {
    const key = cluster.counts.join();
    let kind = places.get(key);
    if (kind === undefined) {
      kind = counts.push(cluster.counts) - 1;
      places.set(key, kind);
    }
    const line = lines[cluster.row]!;
    line[kind] = (line[kind] ?? 0) + 1;
  }
  return { table: makeTable({ counts: lines.map((line) => counts.map((_, kind) => line[kind] ?? 0)) }), counts };
}
