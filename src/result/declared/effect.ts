// Effects: how strong the association is, with the intervals that say how well that is known.
import { z } from 'zod';
import { effectReasons } from '../../effect/contract.js';
import { count, extendedNumber, level } from './pieces.js';

const interval = z.strictObject({
  /** Name of the method, with its source in the methods paragraph. */
  method: z.string(),
  confidence: level,
  /** null beside a reason when it does not exist. */
  lower: extendedNumber.nullable(),
  upper: extendedNumber.nullable(),
  reason: z.enum(effectReasons).optional(),
  /** The two-sided rule or test whose p-values this interval inverts: value v lies inside when p(v) > 1 - confidence. */
  invertsP: z.string().optional(),
  /** The values not rejected form more than one piece; the interval is their hull. */
  setHasGap: z.boolean().optional(),
  /** False when coverage of the stated level is not promised. */
  guaranteed: z.boolean().optional(),
  /** The interval runs from `lower` up to infinity and from minus infinity up to `upper` (Altman 1998). */
  throughInfinity: z.boolean().optional(),
  /** Resampled tables behind it. */
  draws: count.optional(),
});

export const effect = z.strictObject({
  name: z.string(),
  estimate: extendedNumber.nullable(),
  reason: z.enum(effectReasons).optional(),
  groups: z.enum(['rows', 'columns']).optional(),
  event: z.string().optional(),
  direction: z.literal('first-minus-second').or(z.literal('first-over-second')).optional(),
  /** Which side is foretold from the other; `either` for the symmetric form. */
  predicts: z.enum(['rows', 'columns', 'either']).optional(),
  intervals: z.array(interval),
});
