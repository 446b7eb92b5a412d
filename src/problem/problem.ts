// What can go wrong, as one typed error: two lines for a person (what and where; then a hint), a code for a program.
// Every stage throws these; only the command line turns them into text and an exit status.

/** Which exit status a problem ends with: 1 the data cannot be used, 2 wrong usage, 3 exact work over the stated bound. */
export type ProblemKind = 'data' | 'usage' | 'effort';

const exitStatusOf: Record<ProblemKind, number> = { data: 1, usage: 2, effort: 3 };

export interface ProblemParts {
  /** Stable identifier in kebab-case, e.g. `negative-count`. */
  readonly code: string;
  /** What is wrong, with the value seen; one sentence without a closing full stop. */
  readonly message: string;
  /** Where: `file:line:column`, `row "treated"`, `--draws`; left out when the whole input is meant. */
  readonly place?: string;
  /** What to type or do next. */
  readonly hint: string;
}

export class Problem extends Error {
  readonly kind: ProblemKind;
  readonly code: string;
  readonly place: string | undefined;
  readonly hint: string;

  constructor(kind: ProblemKind, parts: ProblemParts) {
    super(parts.message);
    this.name = 'Problem';
    this.kind = kind;
    this.code = parts.code;
    this.place = parts.place;
    this.hint = parts.hint;
  }

  get exitStatus(): number {
    return exitStatusOf[this.kind];
  }
}

export const dataProblem = (parts: ProblemParts): Problem => new Problem('data', parts);
export const usageProblem = (parts: ProblemParts): Problem => new Problem('usage', parts);
export const effortProblem = (parts: ProblemParts): Problem => new Problem('effort', parts);
