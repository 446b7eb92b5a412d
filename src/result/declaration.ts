// The one reported shape, declared once. Its TypeScript type and the published JSON Schema come from here.
// A new field is added here first; reports read nothing that is not declared.
import { z } from 'zod';
import { sequentialRule, stopReasons } from '../pvalue/sequential/contract.js';

const count = z.int().min(0).describe('a whole number from 0 to 2^53 - 1');
const probability = z.number().min(0).max(1);
/** A number, or the word for an infinite one. */
const extendedNumber = z.union([z.number(), z.enum(['infinity', '-infinity'])]);

const source = z.strictObject({
  form: z.enum(['inline', 'cross-table', 'records', 'library']),
  /** As detected or told, for files and standard input. */
  delimiter: z.enum(['comma', 'semicolon', 'tab', 'pipe']).optional(),
  headerRow: z.boolean().optional(),
  labelColumn: z.boolean().optional(),
  /** Lines named as totals that were left out. */
  totalsLeftOut: z.array(z.enum(['row', 'column'])).optional(),
  rowsFrom: z.string().optional(),
  columnsFrom: z.string().optional(),
  countFrom: z.string().nullable().optional(),
});

const missing = z.strictObject({
  rule: z.enum(['drop', 'level', 'fail']),
  /** Records read. */
  records: count,
  /** Records with the row value, the column value, or both missing. */
  missingRow: count,
  missingColumn: count,
  missingBoth: count,
  /** What the left-out records counted for. */
  dropped: count,
});

const input = z.strictObject({
  source,
  sha256: z
    .string()
    .regex(/^[0-9a-f]{64}$/)
    .nullable(),
  rowLabels: z.array(z.string()),
  columnLabels: z.array(z.string()),
  counts: z.array(z.array(count)),
  total: count,
  rowTotals: z.array(count),
  columnTotals: z.array(count),
  emptyRows: z.array(z.string()),
  emptyColumns: z.array(z.string()),
  missing: missing.nullable(),
});

const forecast = z.strictObject({
  /** The exact engine that would answer. */
  engine: z.enum(['two-by-two', 'enumeration', 'linear', 'network', 'within-limits']),
  workUnits: z.number().min(0),
  tables: z.number().min(0),
  tablesAreCounted: z.boolean(),
  seconds: z.number().min(0),
});

const plan = z.strictObject({
  statistic: z.string(),
  /** SHA-256 of the module of a statistic of the user's own. */
  statisticDigest: z
    .string()
    .regex(/^[0-9a-f]{64}$/)
    .optional(),
  tail: z.enum(['upper', 'lower', 'both']),
  twoSidedRule: z.enum(['distance', 'probability', 'doubled']).nullable(),
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
  /** Exponent of the power-divergence family, in lowest terms. */
  lambda: z
    .string()
    .regex(/^-?\d+(\/\d+)?$/)
    .optional(),
  fixed: z.enum(['both']),
  /** `auto`: until p is settled against alpha, by the rule that the error of the p-value names. */
  draws: z.union([count, z.literal('auto')]).nullable(),
  mostDraws: count.optional(),
  samplingRisk: z.number().gt(0).lt(1).optional(),
  relativeError: z.number().min(0).lt(1).optional(),
  seed: z.string().nullable(),
  tableKey: z.string(),
  generator: z.string().nullable(),
  blockSize: count.nullable(),
  effort: z.number().positive(),
  alpha: z.number().gt(0).lt(1),
  confidence: z.number().gt(0).lt(1),
  samplingConfidence: z.number().gt(0).lt(1),
});

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
  confidence: z.number().gt(0).lt(1),
  /** For the doubled rule: draws at least as extreme in each tail. */
  tails: z.strictObject({ upper: count, lower: count }).optional(),
});

const sequentialError = z.strictObject({
  kind: z.literal('sequential'),
  rule: z.literal(sequentialRule),
  /** 1 - risk: the probability that the intervals of all looks hold the true p. */
  level: z.number().gt(0).lt(1),
  risk: z.number().gt(0).lt(1),
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

const approximationError = z.strictObject({ kind: z.literal('approximation') });

const pValue = z.strictObject({
  tail: z.enum(['upper', 'lower', 'both']),
  rule: z.enum(['distance', 'probability', 'doubled']).optional(),
  /** What makes a table "as extreme" as the observed one. */
  orderedBy: z.string(),
  method: z.enum(['exact', 'sample', 'asymptotic']),
  statistic: z.string(),
  /** The guaranteed p; null beside a reason when it is below the smallest double. */
  p: probability.nullable(),
  log10P: z.number().nullable(),
  reason: z.enum(['underflow']).optional(),
  strict: probability.nullable(),
  mid: probability.nullable(),
  tied: probability.nullable(),
  /** Probability of the observed table itself, where the null gives it. */
  point: probability.optional(),
  degreesOfFreedom: count.optional(),
  /** Asymptotic entries of a statistic that is not on the scale of its limiting law: the value on that scale. */
  value: z.number().optional(),
  /** True when rejecting at p <= a errs at most with probability a under the null. */
  guaranteed: z.boolean(),
  errors: z.array(z.discriminatedUnion('kind', [roundingError, samplingError, sequentialError, approximationError])),
});

const diagnostics = z.strictObject({
  smallestExpected: z.number().positive(),
  /** Share of cells with an expected count below 5. */
  shareBelowFive: probability,
  /** Cochran (1954): does the chi-square approximation deserve trust here? */
  cochranAdvice: z.enum(['met', 'not-met']),
  cochranSentence: z.string(),
  /** Tables with these margins, when counted. */
  tables: z.number().optional(),
});

const group = z.strictObject({ label: z.string(), events: count, size: count, proportion: probability.nullable() });

export const resultDeclaration = z.strictObject({
  schema: z.literal('keepsum/result/1'),
  tool: z.strictObject({ name: z.literal('keepsum'), version: z.string() }),
  input,
  plan,
  statistic: z.strictObject({
    name: z.string(),
    /** null beside a reason when these margins leave it undefined. */
    value: extendedNumber.nullable(),
    reason: z.enum(['empty-group']).optional(),
    degreesOfFreedom: count.optional(),
    /** 2x2 statistics: the two proportions compared, first minus second. */
    groups: z.tuple([group, group]).optional(),
    event: z.string().optional(),
  }),
  pValues: z.array(pValue).min(1),
  diagnostics,
  sentence: z.string(),
  methods: z.string(),
  notes: z.array(z.strictObject({ code: z.string(), text: z.string() })),
});
