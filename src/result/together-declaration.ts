// Several outcomes of the same subjects, tested together: the reported shape, declared once.
import { z } from 'zod';
import { effect } from './declared/effect.js';
import { count, digest, level, probability } from './declared/pieces.js';

const drawnP = z.strictObject({
  /** (atLeast + 1) / (draws + 1), guaranteed. */
  p: probability,
  atLeast: count,
  estimate: probability,
  /** Clopper-Pearson, of the estimate. */
  interval: z.tuple([probability, probability]),
});

export const togetherDeclaration = z.strictObject({
  schema: z.literal('keepsum/together/1'),
  tool: z.strictObject({ name: z.literal('keepsum'), version: z.string() }),
  input: z.strictObject({
    sha256: digest.nullable(),
    groups: z.array(z.string()),
    /** Subjects used. */
    total: count,
    missing: z.strictObject({ rule: z.enum(['fail', 'drop', 'level']), records: count, dropped: count }),
  }),
  plan: z.strictObject({
    statistic: z.literal('pearson'),
    draws: count,
    seed: z.string(),
    generator: z.string(),
    blockSize: count,
    samplingConfidence: level,
  }),
  outcomes: z.array(
    z.strictObject({
      label: z.string(),
      levels: z.array(z.string()),
      /** Groups by levels. */
      counts: z.array(z.array(count)),
      statistic: z.number().min(0),
      /** Tau of the outcome from the group; left out where all subjects share a level. */
      effect: effect.optional(),
      /** Of this outcome alone, from the same draws. */
      alone: drawnP,
      /** Step-down, by the largest statistic of those ranked no higher. */
      maxT: drawnP,
      /** Step-down, by the smallest p of those ranked no higher. */
      minP: drawnP,
    }),
  ),
  sentence: z.string(),
  methods: z.string(),
  notes: z.array(z.strictObject({ code: z.string(), text: z.string() })),
});

export type TogetherResult = z.infer<typeof togetherDeclaration>;

export const togetherJsonSchema = (): object => ({
  ...z.toJSONSchema(togetherDeclaration, { target: 'draft-2020-12' }),
  $id: 'keepsum/together/1',
  title: 'keepsum together',
  description: 'Several outcomes of the same subjects against one grouping, with p-values adjusted over all of them.',
});
