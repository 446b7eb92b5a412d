// The shape of a planned study's power, declared once: its type and published JSON Schema come from here.
import { z } from 'zod';
import { powerOrders, twoGroupTests } from '../power/design.js';
import { count, level, probability } from './declared/pieces.js';

const group = z.strictObject({
  label: z.string(),
  /** Probability of each outcome; with one outcome named (the event) just that one. */
  probabilities: z.array(probability).min(1),
});

const answer = z.strictObject({
  /** Units in each group; null where only the total is fixed. */
  sizes: z.array(count).nullable(),
  total: count,
  /** Probability that the test rejects. */
  power: probability,
  /** Exact: the largest probability to reject when all groups are alike. */
  size: probability.optional(),
  error: z.discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('rounding'), absolute: z.number().min(0) }),
    z.strictObject({
      kind: z.literal('sampling'),
      rejected: count,
      tables: count,
      standardError: z.number().min(0),
      /** Clopper-Pearson. */
      interval: z.tuple([probability, probability]),
      confidence: level,
    }),
  ]),
});

export const powerDeclaration = z.strictObject({
  schema: z.literal('keepsum/power/1'),
  tool: z.strictObject({ name: z.literal('keepsum'), version: z.string() }),
  plan: z.strictObject({
    groups: z.array(group).min(2),
    /** rows: group sizes are fixed; total: only their sum. */
    fixed: z.enum(['rows', 'total']),
    method: z.enum(['exact', 'simulation']),
    /** Two groups with one event each. */
    test: z.enum(twoGroupTests).optional(),
    order: z.enum(powerOrders).optional(),
    tail: z.enum(['upper', 'lower', 'both']),
    twoSidedRule: z.enum(['distance', 'probability', 'doubled']).nullable(),
    /** Simulation: the statistic and how each p is found. */
    statistic: z.string().optional(),
    pMethod: z.enum(['auto', 'exact', 'sample', 'asymptotic']).optional(),
    tables: count.optional(),
    draws: count.optional(),
    effort: z.number().positive().optional(),
    seed: z.string().nullable(),
    alpha: level,
    wanted: level.optional(),
    ratio: z.number().positive().optional(),
  }),
  answers: z.array(answer),
  /** Where sizes were searched for. */
  smallest: z
    .strictObject({
      /** Index into answers, null where no sizes looked at reach it. */
      reached: count.nullable(),
      steady: count.nullable(),
      lookedAtFrom: count,
      lookedAtTo: count,
    })
    .optional(),
  sentence: z.string(),
  methods: z.string(),
  notes: z.array(z.strictObject({ code: z.string(), text: z.string() })),
});

export type PowerResult = z.infer<typeof powerDeclaration>;
export type PowerAnswer = PowerResult['answers'][number];

/** JSON Schema (draft 2020-12) of `keepsum power --format json`. */
export const powerJsonSchema = (): object => ({
  ...z.toJSONSchema(powerDeclaration, { target: 'draft-2020-12' }),
  $id: 'keepsum/power/1',
  title: 'keepsum power',
  description: 'The power of a planned study: plan, power at given sizes or the smallest sizes that reach a power.',
});
