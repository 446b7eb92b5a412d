// The published JSON Schemas (draft 2020-12) of a batch's lines, derived from their declarations.
import { z } from 'zod';
import { compactDeclaration, errorDeclaration, lineDeclaration, partEndDeclaration } from './declaration.js';

const published = (declaration: z.ZodType, name: string, description: string): object => ({
  ...z.toJSONSchema(declaration, { target: 'draft-2020-12' }),
  $id: `keepsum/${name}/1`,
  title: `keepsum ${name}`,
  description,
});

/** A line that a batch reads. */
export const batchLineJsonSchema = (): object => ({
  ...published(lineDeclaration, 'batch-line', 'One table of a batch, with its own options where it needs them.'),
  oneOf: [{ required: ['counts'] }, { required: ['strata'] }],
});

/** A line that a batch writes for a table that was tested. */
export const compactLineJsonSchema = (): object =>
  published(
    compactDeclaration,
    'compact-line',
    'One analysed table of a batch: counts, statistic, p-values with their errors, notes, and what of the plan differs from the defaults.',
  );

/** A line that a batch writes for a table that could not be tested. */
export const errorLineJsonSchema = (): object =>
  published(errorDeclaration, 'error-line', 'One table of a batch that could not be used, and why.');

/** The line that ends a part of a batch. */
export const partEndJsonSchema = (): object =>
  published(
    partEndDeclaration,
    'part-end',
    'The last line of a part of a batch: how long it is, and what all parts share.',
  );
