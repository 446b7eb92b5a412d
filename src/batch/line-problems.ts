// What can be wrong with a line of a batch before its counts are looked at, in words.
import type { z } from 'zod';
import { dataProblem, type Problem } from '../problem/problem.js';
import { nameHint } from '../problem/suggest.js';
import { lineDeclaration } from './declaration.js';

const fields = Object.keys(lineDeclaration.shape);
const wishes = Object.keys(lineDeclaration.shape.plan.unwrap().shape);
const example = '{"key":"a","counts":[[8,2],[1,9]]}';

/** @param because what the parser says, with the position where it knows it. */
export function notJson(place: string, text: string, because: string): Problem {
  const [, position] = /at position (\d+)/.exec(because) ?? [];
  const isShort = /end of JSON|Unterminated/.test(because) || Number(position) >= text.trimEnd().length;
  return dataProblem({
    code: 'not-json',
    message: `this line is not JSON${isShort ? ' (it ends too early)' : ''}`,
    place: position === undefined || isShort ? place : `${place}:${Number(position) + 1}`,
    hint: `write one object a line, such as ${example}`,
  });
}

/** Neither, or both. */
export const notOneTable = (line: { readonly counts?: unknown }): Problem =>
  line.counts === undefined
    ? dataProblem({ code: 'missing-field', message: 'counts is missing', hint: `for example ${example}` })
    : dataProblem({
        code: 'counts-and-strata',
        message: 'this line has both counts and strata',
        hint: 'give strata alone: their counts are added up',
      });

export const noKey = (): Problem =>
  dataProblem({
    code: 'no-key',
    message: 'this table has no key, and --require-keys is given',
    hint: `name it, as in ${example}`,
  });

/** The first thing that the declaration finds wrong, told with its place in the line. */
export function misfit(value: unknown, [issue]: readonly z.core.$ZodIssue[]): Problem {
  const path = issue!.path.map(String);
  const where = path.reduce((text, part) => (/^\d+$/.test(part) ? `${text}[${part}]` : `${text}.${part}`), '').slice(1);
  const seen = path.reduce<unknown>((inside, part) => (inside as Record<string, unknown> | undefined)?.[part], value);
  if (path.length === 0 && issue!.code === 'invalid_type') {
    return dataProblem({
      code: 'not-a-table',
      message: `${short(value)} is not an object with counts`,
      hint: `write one object a line, such as ${example}`,
    });
  }
  if (issue!.code === 'unrecognized_keys') {
    const name = issue!.keys[0]!;
    return dataProblem({
      code: 'unknown-field',
      message: `there is no field ${short(name)}${path.length === 0 ? '' : ` in ${where}`}`,
      hint: nameHint(name, path.length === 0 ? fields : wishes) || 'keepsum schema batch-line lists the fields',
    });
  }
  if (issue!.code === 'invalid_value' && typeof seen === 'string') {
    return dataProblem({
      code: 'unknown-value',
      message: `${short(seen)} is not a value of ${where}`,
      hint: nameHint(seen, issue!.values.map(String)),
    });
  }
  if (seen === undefined) {
    return dataProblem({ code: 'missing-field', message: `${where} is missing`, hint: `for example ${example}` });
  }
  const isCount = path.includes('counts');
  const negative = isCount && typeof seen === 'number' && seen < 0;
  return dataProblem({
    code: negative ? 'negative-count' : isCount ? 'not-a-count' : 'bad-field',
    message: `${where} is ${short(seen)}`,
    hint: isCount
      ? `counts are rows of whole numbers from 0 to 2^53 - 1, as in ${example}`
      : 'keepsum schema batch-line says what can stand there',
  });
}

const short = (value: unknown): string => {
  const text = value === Infinity || value === -Infinity ? String(value) : (JSON.stringify(value) ?? String(value));
  return text.length > 60 ? `${text.slice(0, 57)}...` : text;
};
