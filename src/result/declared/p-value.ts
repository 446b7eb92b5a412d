// One p-value: what it is of, the number, and each error that it carries.
import { z } from 'zod';
import { nullValueMeasures } from '../../plan/null-value-measures.js';
import { sequentialRule, stopReasons } from '../../pvalue/sequential/contract.js';
import { count, level, probability } from './pieces.js';

const roundingError = z.strictObject({ kind: z.literal('rounding'), relative: z.number().min(0) });

const samplingError = z.strictObject({
  kind: z.literal('sampling'),
  /** Draws at least as extreme as the observed table. */
  atLeast: count,
  draws: count,
  estimate: probability,
  /** null with a reason when every draw fell on the same side, so that none can be estimated. */
  standardError: z.number().min(0).nullable(),
  reason: z.enum(['no-spread-seen']).optional(),
  /** Clopper-Pearson. */
  interval: z.tuple([probability, probability]),
  confidence: level,
  /** For the doubled rule: draws at least as extreme in each tail. */
  tails: z.strictObject({ upper: count, lower: count }).optional(),
});

const sequentialError = z.strictObject({
  kind: z.literal('sequential'),
  rule: z.literal(sequentialRule),
  /** 1 - risk: the probability that the intervals of all looks hold the true p. */
  level: level,
  risk: level,
  /** Why drawing stopped; the same for all p-values of one run. */
  stoppedBecause: z.enum(stopReasons),
  /** Draws at least as extreme as the observed table; the smaller of the two tails for the doubled rule. */
  atLeast: count,
  draws: count,
  estimate: probability,
  interval: z.tuple([probability, probability]),
  /** More draws that would settle p against alpha if the share seen were the true one; 0 when settled, null when none would. */
  drawsToSettle: count.nullable(),
  /** For the doubled rule: draws at least as extreme in each tail. */
  tails: z.strictObject({ upper: count, lower: count }).optional(),
});

const bracketError = z.strictObject({
  kind: z.literal('bracket'),
  /** Certified, rounding included: the exact p lies from lower to upper, and the p reported is upper. */
  lower: probability,
  upper: probability,
});

/** p is a proved upper bound of a maximum over unknown proportions, and lies at most this far above it. */
const maximumError = z.strictObject({ kind: z.literal('nuisance-maximum'), relative: z.number().min(0) });

export const nuisance = z.strictObject({
  /** The proportion common to both groups; with the total alone fixed, that of the first row; for pairs, that of a change. */
  value: probability,
  /** With the total alone fixed: the proportion of the first column. */
  second: probability.optional(),
  certifiedUpper: probability,
});

/** One stated value, or two that equivalence lies between. */
export const nullValue = z.union([
  z.strictObject({ of: z.enum(nullValueMeasures), value: z.number() }),
  z.strictObject({ of: z.enum(nullValueMeasures), between: z.tuple([z.number(), z.number()]) }),
]);

/** Tables of a chain depend on one another: p is valid, but no error of drawing is known. */
const chainError = z.strictObject({
  kind: z.literal('chain'),
  form: z.literal('serial'),
  chains: count,
  /** Tables compared with the observed one, and those of them at least as extreme. */
  tables: count,
  atLeast: count,
  stepsBetween: count,
  /** Moves that connect all tables. */
  moves: count,
});

const approximationError = z.strictObject({ kind: z.literal('approximation') });

export const pValue = z.strictObject({
  tail: z.enum(['upper', 'lower', 'both']),
  rule: z.enum(['distance', 'probability', 'doubled', 'blaker']).optional(),
  /** What makes a table "as extreme" as the observed one. */
  orderedBy: z.string(),
  method: z.enum(['exact', 'sample', 'asymptotic', 'unconditional']),
  statistic: z.string(),
  /** The guaranteed p, for a bracket its upper limit; null beside a reason when it is below the smallest double. */
  p: probability.nullable(),
  log10P: z.number().nullable(),
  reason: z.enum(['underflow']).optional(),
  /** These three are plain estimates where p is sampled or known in a bracket only. */
  strict: probability.nullable(),
  mid: probability.nullable(),
  tied: probability.nullable(),
  /** Probability of the observed table itself, where the null gives it. */
  point: probability.optional(),
  /** Of the p asked for, where found cheaply: the smallest p of any table with these margins. */
  leastAttainable: probability.optional(),
  degreesOfFreedom: count.optional(),
  /** Asymptotic entries of a statistic that is not on the scale of its limiting law: the value on that scale. */
  value: z.number().optional(),
  /** Unconditional entries: the unknown proportions at which p is largest, and the proved bound of that maximum. */
  nuisance: nuisance.optional(),
  /** What p is tested against, where that is not "none": a difference (first minus second), ratio or odds ratio (first over second). */
  nullValue: nullValue.optional(),
  /** True when rejecting at p <= a errs at most with probability a under the null. */
  guaranteed: z.boolean(),
  errors: z.array(
    z.discriminatedUnion('kind', [
      roundingError,
      samplingError,
      sequentialError,
      bracketError,
      maximumError,
      chainError,
      approximationError,
    ]),
  ),
});
