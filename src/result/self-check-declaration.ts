// The shape of a validation report, declared once: its type and published JSON Schema come from here.
import { z } from 'zod';
import { count, extendedNumber } from './declared/pieces.js';

const answer = z.strictObject({
  /** In words: "two-tailed p". */
  what: z.string(),
  expected: z.number(),
  /** null where the result has no such number; `reason` says why. */
  obtained: extendedNumber.nullable(),
  /** |obtained - expected| / |expected|; the plain difference where 0 is expected; null without a number. */
  difference: z.number().min(0).nullable(),
  /** Largest difference that agrees; 0: the numbers must be equal. */
  tolerance: z.number().min(0),
  agrees: z.boolean(),
  reason: z.string().optional(),
});

const checkedCase = z.strictObject({
  id: z.string(),
  title: z.string(),
  /** Where the counts come from. */
  source: z.string(),
  /** How the expected answers were found. */
  origin: z.string(),
  /** Name of the statistic asked for, or the word `default`. */
  statistic: z.string(),
  agrees: z.boolean(),
  answers: z.array(answer).min(1),
});

export const selfCheckDeclaration = z.strictObject({
  schema: z.literal('keepsum/selfcheck/1'),
  tool: z.strictObject({ name: z.literal('keepsum'), version: z.string() }),
  /** What it ran on. */
  machine: z.strictObject({ runtime: z.string(), engine: z.string(), system: z.string(), architecture: z.string() }),
  /** SHA-256 of the reference answers that were used. */
  answersSha256: z.string().regex(/^[0-9a-f]{64}$/),
  verdict: z.enum(['agrees', 'differs']),
  casesRun: count,
  answersCompared: count,
  answersDiffering: count,
  cases: z.array(checkedCase).min(1),
});

export type SelfCheck = z.infer<typeof selfCheckDeclaration>;
export type CheckedCase = SelfCheck['cases'][number];
export type CheckedAnswer = CheckedCase['answers'][number];

/** JSON Schema (draft 2020-12) of `keepsum selfcheck --format json`. */
export const selfCheckJsonSchema = (): object => ({
  ...z.toJSONSchema(selfCheckDeclaration, { target: 'draft-2020-12' }),
  $id: 'keepsum/selfcheck/1',
  title: 'keepsum selfcheck',
  description: 'Reference answers worked out on this machine: expected, obtained, difference and verdict of each.',
});
