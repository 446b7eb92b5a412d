// Lines compared two by two, adjusted for being many.
import { z } from 'zod';
import { count, extendedNumber, probability } from './pieces.js';
import { pValue } from './p-value.js';

export const comparisons = z.strictObject({
  side: z.enum(['rows', 'columns']),
  /** Each against this one; left out when every two were compared. */
  control: z.string().optional(),
  adjustment: z.literal('holm'),
  pairs: z.array(
    z.strictObject({
      first: z.string(),
      second: z.string(),
      statistic: z.strictObject({
        name: z.string(),
        value: extendedNumber.nullable(),
        reason: z.string().optional(),
        degreesOfFreedom: count.optional(),
      }),
      /** Of the draws, where p was sampled; their table key is made of the two labels. */
      seed: z.string().optional(),
      p: pValue,
      adjustedP: probability.nullable(),
    }),
  ),
});
