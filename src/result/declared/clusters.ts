// Clusters: units that belong together and were permuted whole.
import { z } from 'zod';
import { count } from './pieces.js';

export const clusters = z.strictObject({
  /** The column that names the cluster of each record; null where a program passed them in. */
  from: z.string().nullable(),
  number: count,
  /** Clusters in each row of the table. */
  byRow: z.array(count),
  /** Units of the smallest and the largest cluster. */
  smallest: count,
  largest: count,
  /** Sorts of clusters with the same counts: all that the permutation can tell apart. */
  kinds: count,
  /** Each kind: the counts of one such cluster by column, and how many of them lie in each row. */
  alike: z.array(z.strictObject({ counts: z.array(count), byRow: z.array(count) })),
});
