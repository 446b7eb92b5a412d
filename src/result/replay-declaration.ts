// What a replay finds, declared once.
import { z } from 'zod';
import { count, digest } from './declared/pieces.js';

const difference = z.strictObject({
  field: z.string(),
  /** Left out where one of them has nothing there. */
  recorded: z.unknown().optional(),
  obtained: z.unknown().optional(),
});

export const replayDeclaration = z.strictObject({
  schema: z.literal('keepsum/replay/1'),
  tool: z.strictObject({ name: z.literal('keepsum'), version: z.string() }),
  records: count,
  same: count,
  /** Error lines of a batch, which hold nothing to replay. */
  passedOver: count,
  differing: z.array(
    z.strictObject({
      /** The key of a table, or null. */
      key: z.string().nullable(),
      madeWith: z.string().nullable(),
      differences: z.array(difference),
    }),
  ),
  /** Where the data file was named: whether its bytes are those of the record. */
  against: z.strictObject({ sha256: digest, recorded: digest.nullable(), same: z.boolean() }).optional(),
});

export type ReplayReport = z.infer<typeof replayDeclaration>;

export const replayJsonSchema = (): object => ({
  ...z.toJSONSchema(replayDeclaration, { target: 'draft-2020-12' }),
  $id: 'keepsum/replay/1',
  title: 'keepsum replay',
  description: 'Results made again from their own records and compared digit by digit.',
});
