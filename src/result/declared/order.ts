// What a declared order adds: the questions that use it, each with its p, and which way the counts go.
import { z } from 'zod';
import { asks, orderedSides } from '../../order/questions.js';
import { count, extendedNumber } from './pieces.js';
import { pValue } from './p-value.js';

export const order = z.strictObject({
  ordered: z.enum(orderedSides),
  /** Both sides ordered: as row scores rise, the counts move towards that column. */
  direction: z
    .strictObject({
      correlation: z.number().min(-1).max(1),
      fromRow: z.string(),
      toRow: z.string(),
      towardsColumn: z.string(),
    })
    .optional(),
  /** Asked beside the headline. */
  questions: z.array(
    z.strictObject({
      asks: z.enum(asks),
      statistic: z.strictObject({
        name: z.string(),
        value: extendedNumber.nullable(),
        reason: z.string().optional(),
        degreesOfFreedom: count.optional(),
      }),
      groups: z.enum(['rows', 'columns']).optional(),
      rowScores: z.array(z.number()).optional(),
      columnScores: z.array(z.number()).optional(),
      /** Of the draws, where p was sampled. */
      seed: z.string().optional(),
      p: pValue,
    }),
  ),
});
