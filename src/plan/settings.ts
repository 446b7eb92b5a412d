// Checks the numbers and names a user may set, one by one, before anything is planned.
import { nameHint } from '../problem/suggest.js';
import { usageProblem, type Problem } from '../problem/problem.js';

/** A value between 0 and 1, both excluded. @throws Problem (usage) `not-a-share`. */
export function share(value: number | undefined, standard: number, option: string): number {
  if (value === undefined) return standard;
  if (value > 0 && value < 1) return value;
  throw usageProblem({
    code: 'not-a-share',
    message: `${String(value)} is not a number between 0 and 1`,
    place: option,
    hint: `for example ${option} ${standard}`,
  });
}

/** A whole number in a range. @throws Problem (usage) `out-of-range`. */
export function wholeNumber(value: number, lowest: number, highest: number, option: string): number {
  if (Number.isInteger(value) && value >= lowest && value <= highest) return value;
  throw usageProblem({
    code: 'out-of-range',
    message: `${String(value)} is not a whole number from ${lowest} to ${highest}`,
    place: option,
    hint: `for example ${option} ${Math.max(lowest, 100_000)}`,
  });
}

/** A positive finite number. @throws Problem (usage) `out-of-range`. */
export function positive(value: number | undefined, standard: number, option: string): number {
  if (value === undefined) return standard;
  if (value > 0 && Number.isFinite(value)) return value;
  throw usageProblem({
    code: 'out-of-range',
    message: `${String(value)} is not a positive number`,
    place: option,
    hint: `for example ${option} ${standard}`,
  });
}

/** One of a list of names. @throws Problem (usage) `unknown-value`, with a suggestion. */
export function oneOf<Name extends string>(
  value: string | undefined,
  standard: Name,
  allowed: readonly Name[],
  option: string,
): Name {
  if (value === undefined) return standard;
  const found = allowed.find((name) => name === value);
  if (found !== undefined) return found;
  throw usageProblem({
    code: 'unknown-value',
    message: `"${value}" is not a value of ${option}`,
    place: option,
    hint: nameHint(value, allowed),
  });
}

/** For an option that the chosen analysis would leave without effect: said, not ignored. */
export const unused = (option: string, why: string, hint: string): Problem =>
  usageProblem({ code: 'option-without-effect', message: `${option} has no effect ${why}`, place: option, hint });
