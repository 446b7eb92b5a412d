// One reported p-value before it is part of a result; the fields are those of the result's declaration.
import type { Tail, TwoSidedRule } from '../plan/plan.js';
import type { sequentialRule, StopReason } from './sequential/contract.js';

export interface RoundingError {
  kind: 'rounding';
  relative: number;
}

export interface SamplingError {
  kind: 'sampling';
  atLeast: number;
  draws: number;
  estimate: number;
  standardError: number | null;
  reason?: 'no-spread-seen';
  interval: [number, number];
  confidence: number;
  tails?: { upper: number; lower: number };
}

/** Drawn until it was settled: what a stopping rule knows, and why it stopped. */
export interface SequentialError {
  kind: 'sequential';
  rule: typeof sequentialRule;
  level: number;
  risk: number;
  stoppedBecause: StopReason;
  atLeast: number;
  draws: number;
  estimate: number;
  interval: [number, number];
  drawsToSettle: number | null;
  tails?: { upper: number; lower: number };
}

/** p is a proved upper bound of a maximum over unknown proportions. */
export interface MaximumError {
  kind: 'nuisance-maximum';
  relative: number;
}

/** The exact p lies between these for certain; the p reported is the upper one. */
export interface BracketError {
  kind: 'bracket';
  lower: number;
  upper: number;
}

/** From a chain of tables that depend on one another. */
export interface ChainError {
  kind: 'chain';
  form: 'serial';
  chains: number;
  tables: number;
  atLeast: number;
  stepsBetween: number;
  moves: number;
}

export interface ApproximationError {
  kind: 'approximation';
}

type NullMeasure = 'difference' | 'ratio' | 'odds-ratio';

export interface PValueEntry {
  tail: Tail;
  rule?: TwoSidedRule;
  orderedBy: string;
  method: 'exact' | 'sample' | 'asymptotic' | 'unconditional';
  statistic: string;
  p: number | null;
  log10P: number | null;
  reason?: 'underflow';
  strict: number | null;
  mid: number | null;
  tied: number | null;
  point?: number;
  leastAttainable?: number;
  degreesOfFreedom?: number;
  /** Asymptotic entries of a statistic that is not on the scale of its limiting law: the value on that scale. */
  value?: number;
  /** Where an unconditional p is largest, and the proved bound of it. */
  nuisance?: { value: number; second?: number; certifiedUpper: number };
  /** What p is tested against where that is not "none": one value, or two that equivalence lies between. */
  nullValue?: { of: NullMeasure; value: number } | { of: NullMeasure; between: [number, number] };
  guaranteed: boolean;
  errors: (
    RoundingError | SamplingError | SequentialError | BracketError | MaximumError | ChainError | ApproximationError
  )[];
}

/** What a p-value is asked for: a tail, and for two tails a rule. */
export interface Question {
  readonly tail: Tail;
  readonly rule: TwoSidedRule | null;
  readonly statistic: string;
}

/** The words for "as extreme": the statistic itself, its distance from the centre, or probability. */
export function orderedBy({ tail, rule, statistic }: Question): string {
  if (tail === 'both' && rule === 'distance') return `distance of ${statistic} from its centre`;
  if (tail === 'both' && rule === 'probability') return `probability of the value of ${statistic}`;
  if (tail === 'both' && rule === 'blaker') return `smaller tail of ${statistic}`;
  return statistic;
}

/** The smallest double with all its digits; below it a p is given by its logarithm only. */
export const smallestDouble = 2.2250738585072014e-308;
