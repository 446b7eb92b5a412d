// The lines that a batch reads and writes, declared once; types and published schemas are derived from here.
import { z } from 'zod';
import { resultDeclaration } from '../result/declaration.js';
import { count, digest } from '../result/declared/pieces.js';
import { compactWishes, lineWishes } from '../result/declared/wishes.js';

const labels = z.array(z.string());
const counts = z.array(z.array(count));

/** One table to be tested. */
export const lineDeclaration = z.strictObject({
  key: z
    .union([z.string(), z.int()])
    .describe('names the table and its stream of random numbers; default: the number of the line')
    .optional(),
  counts: counts.describe('rows of counts'),
  rowLabels: labels.optional(),
  columnLabels: labels.optional(),
  plan: lineWishes.describe('options of this table, over those of the run').optional(),
});

/** Of a batch's part: "3/16". */
const shard = z.string().regex(/^\d+\/\d+$/);

/** What a table's line says unless whole results were asked for. */
export const compactDeclaration = z.strictObject({
  key: z.string(),
  shard: shard.optional(),
  counts,
  /** Where the data brought labels. */
  rowLabels: labels.optional(),
  columnLabels: labels.optional(),
  statistic: resultDeclaration.shape.statistic,
  pValues: resultDeclaration.shape.pValues,
  notes: resultDeclaration.shape.notes,
  plan: compactWishes.describe('what differs from the defaults; with the seed where tables were drawn'),
});

/** What stands in place of a table that could not be used. */
export const errorDeclaration = z.strictObject({
  key: z.string(),
  shard: shard.optional(),
  error: z.strictObject({
    code: z.string(),
    message: z.string(),
    place: z.string().describe('the line or file, and where in it'),
    hint: z.string(),
  }),
});

/** The last line of a batch's part: without it the part is not whole. */
export const partEndDeclaration = z.strictObject({
  part: shard,
  lines: count.describe('of results in this part'),
  tables: count.describe('of the whole run'),
  input: digest.describe('SHA-256 of the tables of the whole run'),
  run: z.looseObject({ version: z.string(), seed: z.string() }).describe('settings that all parts share'),
});
