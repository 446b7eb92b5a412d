// One case of the self check: a table, how it is asked, and where in its result each known answer stands.
import type { PlanOptions } from '../plan/plan.js';

/** A step into a result: a field, a place in a list, or the one entry of a list that has these fields. */
export type Step = string | number | Readonly<Record<string, string>>;

export interface ReferenceAnswer {
  /** In words: "two-tailed p". */
  readonly what: string;
  readonly path: readonly Step[];
  readonly expected: number;
  /** Largest relative difference that agrees; 0: equal. */
  readonly tolerance: number;
}

export interface ReferenceCase {
  readonly id: string;
  readonly title: string;
  /** Where the counts come from. */
  readonly source: string;
  /** How the answers were found. */
  readonly origin: string;
  readonly counts?: readonly (readonly number[])[];
  readonly strata?: readonly (readonly (readonly number[])[])[];
  readonly options: PlanOptions;
  readonly answers: readonly ReferenceAnswer[];
}
