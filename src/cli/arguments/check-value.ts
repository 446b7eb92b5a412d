// From the text of an option's value to a checked value. Strict: a value that is not wholly right is refused,
// with the option, the value seen and what to type instead.
import { usageProblem, type Problem } from '../../problem/problem.js';
import { oneOf as oneOfNames } from '../../plan/settings.js';

/** Turns the text given for a flag (such as `--draws`) into a value, or throws a usage problem naming the flag. */
export type CheckValue<T> = (text: string, flag: string) => T;

export const anyText: CheckValue<string> = (text, flag) => {
  if (text !== '') return text;
  throw usageProblem({
    code: 'empty-value',
    message: 'the value is empty',
    place: flag,
    hint: `write a value after ${flag}, or leave the option out`,
  });
};

/** A check that knows its closed list of names, for completions. */
export type NamedCheck<T> = CheckValue<T> & { readonly names: readonly string[] };

export const withNames = <T>(names: readonly string[], check: CheckValue<T>): NamedCheck<T> =>
  Object.assign((text: string, flag: string) => check(text, flag), { names });

/** The names that a check allows; undefined where the value is free. */
export const namesOf = (check: CheckValue<unknown>): readonly string[] | undefined =>
  'names' in check ? (check as NamedCheck<unknown>).names : undefined;

/** One of a closed list of names. */
export const oneOf = <T extends string>(allowed: readonly T[]): NamedCheck<T> =>
  withNames(allowed, (text, flag) => oneOfNames(text, allowed[0]!, allowed, flag));

/** A whole number in digits, or with a power of ten such as 1e6 or 2.5e6; both ends included, no upper end: Infinity. */
export const wholeNumber =
  (least: number, most: number, example: string): CheckValue<number> =>
  (text, flag) => {
    const value = /^\d+(\.\d+)?(e\+?\d{1,3})?$/i.test(text) && !/\.\d+$/.test(text) ? Number(text) : NaN;
    if (Number.isInteger(value) && value >= least && value <= most) return value;
    const range = most === Infinity ? `from ${least} upwards` : `from ${least} to ${shown(most)}`;
    throw badNumber(text, flag, `a whole number ${range}`, `${flag} ${example}`);
  };

/** A number strictly between 0 and 1. */
export const betweenZeroAndOne =
  (example: string): CheckValue<number> =>
  (text, flag) => {
    const value = /^(\d+\.?\d*|\.\d+)(e-?\d{1,3})?$/i.test(text) ? Number(text) : NaN;
    if (value > 0 && value < 1) return value;
    const percent = /^(\d+\.?\d*|\.\d+)%?$/.exec(text);
    const share = percent === null ? NaN : Number(percent[1]) / 100;
    // 95 and 95% are meant as 0.95; a plain 2 is more likely a slip than two per cent.
    const meant = share > 0 && share < 1 && (text.endsWith('%') || share >= 0.5) ? String(share) : example;
    throw badNumber(text, flag, 'a number between 0 and 1', `${flag} ${meant}`);
  };

const badNumber = (text: string, flag: string, wanted: string, example: string): Problem =>
  usageProblem({ code: 'bad-number', message: `"${text}" is not ${wanted}`, place: flag, hint: `write ${example}` });

/** Long powers of ten are easier to read as 1e12. */
const shown = (bound: number): string => (bound >= 1e7 ? bound.toExponential().replace('e+', 'e') : String(bound));
