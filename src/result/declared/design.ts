// The panel of designs: p under each of them, in the direction and by the rule of the headline.
import { z } from 'zod';
import { nuisance } from './p-value.js';
import { probability } from './pieces.js';

export const designLine = z.strictObject({
  fixed: z.enum(['both', 'rows', 'columns', 'total']),
  /** What the run took to be fixed; the line is then the headline. */
  assumed: z.boolean(),
  statistic: z.string(),
  /** null beside a reason when it was not worked out. */
  orderedBy: z.string().nullable(),
  method: z.enum(['exact', 'sample', 'asymptotic', 'unconditional']).nullable(),
  p: probability.nullable(),
  log10P: z.number().nullable(),
  reason: z.enum(['underflow', 'over-bound']).optional(),
  /** Counted work that was forecast, where it was over the small bound of the panel. */
  workUnits: z.number().min(0).optional(),
  nuisance: nuisance.optional(),
});
