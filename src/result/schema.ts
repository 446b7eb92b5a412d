// The published JSON Schema (draft 2020-12) of a result, derived from the one declaration; nothing is kept by hand.
import { z } from 'zod';
import { resultDeclaration } from './declaration.js';

/** The schema that every JSON result satisfies, as a plain object ready to be written out. */
export function resultJsonSchema(): object {
  return {
    ...z.toJSONSchema(resultDeclaration, { target: 'draft-2020-12' }),
    $id: 'keepsum/result/1',
    title: 'keepsum result',
    description:
      'One analysed table of counts: input, plan, statistic, p-values with their errors, words for a report.',
  };
}
