// The lines that `keepsum adjust` writes, declared once.
import { z } from 'zod';
import { probability } from './declared/pieces.js';
import { adjustments } from '../family/adjust.js';

export const adjustedDeclaration = z.strictObject({
  key: z.string(),
  family: z.string(),
  /** Members of the family that count. */
  tests: z.int().min(1),
  /** The p that was adjusted; null beside a reason below the smallest double, where 0 was taken. */
  p: probability.nullable(),
  leastAttainable: probability.nullable(),
  /** null where the procedure leaves the member out, because its margins cannot reach the level. */
  adjusted: z.partialRecord(z.enum(adjustments), probability.nullable()),
});

export type AdjustedLine = z.infer<typeof adjustedDeclaration>;

export const adjustedJsonSchema = (): object => ({
  ...z.toJSONSchema(adjustedDeclaration, { target: 'draft-2020-12' }),
  $id: 'keepsum/adjusted/1',
  title: 'keepsum adjusted line',
  description: 'One test of a family with its adjusted p-values.',
});
