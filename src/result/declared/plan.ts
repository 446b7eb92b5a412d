// The plan as it was carried out: every choice, its reason, and what decides every digit.
import { z } from 'zod';
import { orderedSides } from '../../order/questions.js';
import { cellsEcho } from './cell.js';
import { compactWishes } from './wishes.js';
import { nullValue } from './p-value.js';
import { count, digest, level } from './pieces.js';

const forecast = z.strictObject({
  /** The exact engine that would answer. */
  engine: z.enum([
    'two-by-two',
    'enumeration',
    'linear',
    'network',
    'bracket',
    'within-limits',
    'coin-walk',
    'coin-halves',
    'coin-differences',
    'convolution',
    'unconditional',
    'multinomial',
    'chain',
  ]),
  workUnits: z.number().min(0),
  tables: z.number().min(0),
  tablesAreCounted: z.boolean(),
  seconds: z.number().min(0),
});

export const plan = z.strictObject({
  statistic: z.string(),
  /** Rows and columns are two answers of the same units. */
  paired: z.literal(true).optional(),
  /** SHA-256 of the module of a statistic of the user's own. */
  statisticDigest: digest.optional(),
  tail: z.enum(['upper', 'lower', 'both']),
  twoSidedRule: z.enum(['distance', 'probability', 'doubled', 'blaker']).nullable(),
  method: z.enum(['exact', 'sample', 'asymptotic']),
  methodAsked: z.enum(['auto', 'exact', 'sample', 'asymptotic']),
  methodReason: z.string(),
  forecast,
  groups: z.enum(['rows', 'columns']).nullable(),
  event: z.string().nullable(),
  reference: z.string().nullable(),
  /** For statistics that take scores: one for each line of the table, empty ones too. */
  rowScores: z.array(z.number()).optional(),
  columnScores: z.array(z.number()).optional(),
  /** Over strata, where scores are ranks: within each stratum, or of all strata together. */
  rowRanks: z.enum(['midranks', 'pooled-midranks']).optional(),
  columnRanks: z.enum(['midranks', 'pooled-midranks']).optional(),
  /** Exponent of the power-divergence family, in lowest terms. */
  lambda: z
    .string()
    .regex(/^-?\d+(\/\d+)?$/)
    .optional(),
  /** The sides whose lines were declared to be in order. */
  ordered: z.enum(orderedSides).optional(),
  /** The lines that were compared with each other, or with the one named. */
  compare: z.enum(['rows', 'columns']).optional(),
  control: z.string().optional(),
  /** What the study fixed; or what chance leaves as it is: margins of every stratum, the clusters, the pairs. */
  fixed: z.enum(['both', 'rows', 'columns', 'total', 'strata', 'clusters', 'pairs']),
  /** For two groups of fixed size: what makes an outcome as extreme as the observed one. */
  outcomeOrder: z.enum(['statistic', 'conditional-p']).optional(),
  /** Gamma of Berger & Boos (1994), added to p. */
  nuisanceRisk: level.optional(),
  /** What p is tested against instead of none. */
  nullValue: nullValue.optional(),
  /** `auto`: until p is settled against alpha, by the rule that the error of the p-value names. */
  draws: z.union([count, z.literal('auto')]).nullable(),
  mostDraws: count.optional(),
  samplingRisk: level.optional(),
  relativeError: z.number().min(0).lt(1).optional(),
  /** Resampled tables of a bootstrap interval, where one was asked for. */
  bootstrap: count.optional(),
  seed: z.string().nullable(),
  tableKey: z.string(),
  /** Part of a run: every `of`-th block of draws, from the `index`-th on. */
  shard: z.strictObject({ index: z.int().min(1), of: z.int().min(1) }).optional(),
  generator: z.string().nullable(),
  blockSize: count.nullable(),
  effort: z.number().positive(),
  alpha: level,
  confidence: level,
  samplingConfidence: level,
  cells: cellsEcho.optional(),
  /** The wishes that all of this was settled from, defaults left out: with them and the counts the result can be made again. */
  asked: compactWishes.optional(),
});
