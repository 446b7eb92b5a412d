// What chance alone does with the statistic, summed up in bins: for a picture, never for a p.
import { z } from 'zod';
import { count, extendedNumber, probability } from './pieces.js';

const bin = z.strictObject({
  /** Ends of the bin; those of the outermost may be infinite. A value on an end is held by the bin on its tail's side. */
  from: extendedNumber,
  to: extendedNumber,
  /** Probability given the margins. */
  mass: probability,
  /** The part of it that is at least as extreme as the observed table. */
  inTail: probability,
  /** What the limiting law would put there. */
  approximation: probability.optional(),
});

export const nullSummary = z.strictObject({
  statistic: z.string(),
  /** The statistic of the observed table. */
  observed: extendedNumber,
  /** Which tables count as at least as extreme; for the doubled rule the smaller of the two tails. */
  tail: z.enum(['upper', 'lower', 'both']),
  orderedBy: z.enum(['upper', 'lower', 'distance', 'probability', 'blaker']),
  method: z.enum(['exact', 'sample']),
  /** Tables that were visited or drawn. */
  tables: count,
  /** Where they were drawn. */
  seed: z.string().optional(),
  /** The limiting law behind `approximation`. The normal one is standard, or has the mean and deviation of these tables. */
  limit: z
    .discriminatedUnion('law', [
      z.strictObject({ law: z.literal('chi-square'), degreesOfFreedom: count }),
      z.strictObject({ law: z.literal('normal'), mean: z.number(), standardDeviation: z.number().min(0) }),
    ])
    .optional(),
  bins: z.array(bin),
});
