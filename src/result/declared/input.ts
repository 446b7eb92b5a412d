// What was read and how: the counts with their labels and margins.
import { z } from 'zod';
import { count, digest } from './pieces.js';

const source = z.strictObject({
  form: z.enum(['inline', 'cross-table', 'records', 'library']),
  /** As detected or told, for files and standard input. */
  delimiter: z.enum(['comma', 'semicolon', 'tab', 'pipe']).optional(),
  headerRow: z.boolean().optional(),
  labelColumn: z.boolean().optional(),
  /** Lines named as totals that were left out. */
  totalsLeftOut: z.array(z.enum(['row', 'column'])).optional(),
  rowsFrom: z.string().optional(),
  columnsFrom: z.string().optional(),
  countFrom: z.string().nullable().optional(),
  /** What tells the strata apart; null for blocks of a file that were given no name. */
  strataFrom: z.string().nullable().optional(),
  clusterFrom: z.string().optional(),
});

const missing = z.strictObject({
  rule: z.enum(['drop', 'level', 'fail']),
  /** Records read. */
  records: count,
  /** Records with the row value, the column value, or both missing. */
  missingRow: count,
  missingColumn: count,
  missingBoth: count,
  /** Records with row and column but no stratum, or no cluster; where these were asked for. */
  missingStratum: count.optional(),
  missingCluster: count.optional(),
  /** What the left-out records counted for. */
  dropped: count,
});

const levels = z.strictObject({
  /** In the order in which they were made. */
  changes: z.array(
    z.strictObject({
      action: z.enum(['merge', 'keep', 'drop']),
      side: z.enum(['rows', 'columns']),
      into: z.string().optional(),
      labels: z.array(z.string()).min(1),
    }),
  ),
  /** Counts of the levels that were not kept. */
  leftOut: count,
});

export const input = z.strictObject({
  source,
  sha256: digest.nullable(),
  rowLabels: z.array(z.string()),
  columnLabels: z.array(z.string()),
  counts: z.array(z.array(count)),
  /** Cells into which no unit could ever fall, in the shape of counts; left out where there are none. */
  impossible: z.array(z.array(z.boolean())).optional(),
  total: count,
  rowTotals: z.array(count),
  columnTotals: z.array(count),
  emptyRows: z.array(z.string()),
  emptyColumns: z.array(z.string()),
  missing: missing.nullable(),
  /** What was done to the levels before anything else; labels and counts are those after it. */
  levels: levels.optional(),
});
