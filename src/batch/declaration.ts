// The lines that a batch reads and writes, declared once; types and published schemas are derived from here.
import { z } from 'zod';
import { resultDeclaration } from '../result/declaration.js';
import { clusters } from '../result/declared/clusters.js';
import { count, digest } from '../result/declared/pieces.js';
import { compactWishes, lineWishes } from '../result/declared/wishes.js';

const labels = z.array(z.string());
const counts = z.array(z.array(count));
const impossible = z
  .array(z.array(z.boolean()))
  .describe('cells into which no unit could ever fall, in the shape of counts');
const family = z.string().min(1).describe('the family that keepsum adjust counts the table in');

/** One table to be tested. */
export const lineDeclaration = z.strictObject({
  key: z
    .union([z.string(), z.int()])
    .describe('names the table and its stream of random numbers; default: the number of the line')
    .optional(),
  family: family.optional(),
  counts: counts.describe('rows of counts; left out where there are strata').optional(),
  impossible: impossible.optional(),
  strata: z
    .array(z.strictObject({ label: z.string().optional(), counts }))
    .min(1)
    .describe('tables that share their rows and columns and are held apart')
    .optional(),
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
  family: family.optional(),
  counts: counts.describe('of strata: all together'),
  impossible: impossible.optional(),
  strata: z.array(z.strictObject({ label: z.string(), counts })).optional(),
  clusters: clusters.shape.alike.describe('kinds of clusters, and how many of each lie in each row').optional(),
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
