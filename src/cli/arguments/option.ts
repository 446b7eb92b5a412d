// How an option is declared: one entry, from which parsing, checking, help and suggestions follow.
import type { CheckValue } from './check-value.js';

/** Headings of the help, in the order of the flow. */
export const stages = [
  'Reading the tables',
  'Reading the table',
  'The test',
  'The tables',
  'How p is found',
  'The results',
  'The report',
  'Other',
] as const;
export type Stage = (typeof stages)[number];

export interface OptionDeclaration<T> {
  readonly stage: Stage;
  /** One letter, for the common few. */
  readonly short?: string;
  /** Stands for the value in the help; a switch has none. */
  readonly placeholder?: string;
  readonly words: string;
  /** May be given several times: the value is a list, and `check` gives one of one entry. */
  readonly gathers?: true;
  /** Switches are given '' and answer true. */
  readonly check: CheckValue<T>;
}

/** By camel-case name: `twoSidedRule` is `--two-sided-rule`. */
export type Declarations = Readonly<Record<string, OptionDeclaration<unknown>>>;

/** What was given, checked; options not given are absent. */
export type Values<D extends Declarations> = { readonly [K in keyof D]?: ReturnType<D[K]['check']> };

export const valued = <T>(
  stage: Stage,
  placeholder: string,
  check: CheckValue<T>,
  words: string,
  short?: string,
): OptionDeclaration<T> => ({ stage, placeholder, check, words, ...(short === undefined ? {} : { short }) });

/** Given as often as there is something to say. */
export const repeatable = <T>(
  stage: Stage,
  placeholder: string,
  check: CheckValue<T>,
  words: string,
): OptionDeclaration<readonly T[]> => ({
  stage,
  placeholder,
  words,
  gathers: true,
  check: (text, flag) => [check(text, flag)],
});

export const toggle = (stage: Stage, words: string, short?: string): OptionDeclaration<true> => ({
  stage,
  words,
  check: () => true,
  ...(short === undefined ? {} : { short }),
});

/** `twoSidedRule` -> `--two-sided-rule`. */
export const flagOf = (name: string): string => `--${name.replace(/[A-Z]/g, (capital) => `-${capital.toLowerCase()}`)}`;
