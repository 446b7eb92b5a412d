// The options of `analyse` as lines and records hold them, declared once, by the same names. The compiler sees to it that none is
// left out.
import { z } from 'zod';
import { fixedSides, outcomeOrders } from '../../plan/design.js';
import { methods, tails, twoSidedRules, type PlanOptions } from '../../plan/plan.js';
import { digest, level } from './pieces.js';
import { pairedNames } from '../../statistic/paired.js';
import { statisticNames } from '../../statistic/registry.js';
import { stratifiedNames } from '../../statistic/stratified.js';

const scores = z.union([z.string(), z.array(z.number())]);
const draws = z.union([z.int().min(1).max(1e12), z.literal('auto')]);

/** A statistic of the user's own and the table's key come from elsewhere than a line's plan. */
type FromElsewhere = 'statisticDigest' | 'tableKey';

const options = {
  statistic: z.enum([...statisticNames, ...pairedNames, ...stratifiedNames]),
  paired: z.boolean(),
  tail: z.enum(tails),
  twoSidedRule: z.enum(twoSidedRules),
  groups: z.enum(['rows', 'columns']),
  event: z.string(),
  reference: z.string(),
  rowScores: scores,
  columnScores: scores,
  lambda: z.union([z.string(), z.number()]),
  ordered: z.enum(['rows', 'columns', 'both']),
  cells: z.boolean(),
  nullSummary: z.boolean(),
  compare: z.enum(['rows', 'columns']),
  control: z.string(),
  fixed: z.enum(fixedSides),
  outcomeOrder: z.enum(outcomeOrders),
  nuisanceRisk: level,
  nullValue: z.string().min(1),
  method: z.enum(methods),
  draws,
  mostDraws: z.int().min(1000).max(1e12),
  samplingRisk: level,
  relativeError: level,
  bootstrap: z.int().min(100).max(1e6),
  shard: z.strictObject({ index: z.int().min(1), of: z.int().min(1) }),
  seed: z.string().min(1),
  effort: z.number().positive(),
  alpha: level,
  confidence: level,
  samplingConfidence: level,
} as const satisfies Record<Exclude<keyof PlanOptions, FromElsewhere>, z.ZodType>;

/** Options that a line may give; each is left out where its default will do. A part is of a whole run, never of one table in it. */
export const lineWishes = z.strictObject(options).omit({ shard: true }).partial();

/** The same as a compact line gives them back, where a statistic may be the user's own, known by name and digest. */
export const compactWishes = z.strictObject({ ...options, statistic: z.string(), statisticDigest: digest }).partial();
