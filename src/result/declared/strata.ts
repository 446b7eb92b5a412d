// Strata: the tables that were held apart, and what tells whether that mattered.
import { z } from 'zod';
import { count, extendedNumber, probability } from './pieces.js';

export const strata = z.strictObject({
  /** The column or the name that tells them apart; null where there is none. */
  from: z.string().nullable(),
  labels: z.array(z.string()),
  /** tables[stratum][row][column], over all lines of the pooled table (input.counts). */
  tables: z.array(z.array(z.array(count))),
  totals: z.array(count),
  /** False where the margins of a stratum leave one table only: it says nothing. */
  decides: z.array(z.boolean()),
  /** 2x2: a d / (b c) of each stratum, null where it has no value (0 / 0). */
  oddsRatios: z.array(extendedNumber.nullable()).optional(),
  /** Woolf's (1955) interval of each, at the plan's confidence; null where a cell is empty. */
  oddsRatioIntervals: z.array(z.tuple([z.number(), z.number()]).nullable()).optional(),
  /** The same of all strata thrown together. */
  pooledOddsRatio: extendedNumber.nullable().optional(),
  /** The one of Mantel & Haenszel (1959) over strata. */
  commonOddsRatio: extendedNumber.nullable().optional(),
  /** The statistic of the pooled table taken as one stratum, and its asymptotic p; null where it has none. */
  pooled: z.strictObject({ value: z.number(), p: probability.nullable() }),
});
