// Reference answers from a file, in the shape of those that ship: for whoever has cases of their own to be held against.
import { z } from 'zod';
import { dataProblem } from '../problem/problem.js';
import { count } from '../result/declared/pieces.js';
import type { ReferenceCase } from './reference-case.js';

const counts = z.array(z.array(count));

const answersDeclaration = z
  .array(
    z
      .strictObject({
        id: z.string().min(1),
        title: z.string(),
        source: z.string().describe('where the counts come from'),
        origin: z.string().describe('how the answers were found'),
        counts: counts.optional(),
        strata: z.array(counts).optional(),
        options: z.looseObject({}).describe('as in the plan of a line of a batch'),
        answers: z
          .array(
            z.strictObject({
              what: z.string(),
              path: z
                .array(z.union([z.string(), z.int(), z.record(z.string(), z.string())]))
                .describe(
                  'steps into the result: a field, a place in a list, or the entry of a list with these fields',
                ),
              expected: z.number(),
              tolerance: z.number().min(0).describe('largest relative difference that agrees'),
            }),
          )
          .min(1),
      })
      .refine(({ counts: one, strata }) => (one === undefined) !== (strata === undefined), 'either counts or strata'),
  )
  .min(1);

/** @throws Problem (data): `not-json`, `no-reference-answers`. */
export function readAnswers(text: string, place: string): readonly ReferenceCase[] {
  let parsed: unknown;
  try {
    parsed = JSON.parse(text);
  } catch {
    throw dataProblem({
      code: 'not-json',
      message: 'this is not JSON',
      place,
      hint: 'give a list of cases; keepsum schema reference-answers says what each holds',
    });
  }
  const read = answersDeclaration.safeParse(parsed);
  if (read.success) return read.data as unknown as readonly ReferenceCase[];
  const [issue] = read.error.issues;
  throw dataProblem({
    code: 'no-reference-answers',
    message: `these are no reference answers: ${issue!.path.join('.') || 'the whole'}: ${issue!.message}`,
    place,
    hint: 'keepsum schema reference-answers says what each case holds',
  });
}

/** JSON Schema (draft 2020-12) of what `keepsum selfcheck --answers` reads. */
export const referenceAnswersJsonSchema = (): object => ({
  ...z.toJSONSchema(answersDeclaration, { target: 'draft-2020-12' }),
  $id: 'keepsum/reference-answers/1',
  title: 'keepsum reference answers',
  description: 'Cases with known answers that a self check is held against.',
});
