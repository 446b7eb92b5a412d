// Adjusted over all cells by the smallest p of a table (single-step min-p: Westfall & Young 1993): P(smallest p of a random table
// at most the cell's own). Under complete independence the chance that any cell at all has adjusted p <= a is at most a.
import type { SequentialError, SamplingError } from '../pvalue/contract.js';

export type AdjustedError =
  | { kind: 'rounding'; relative: number }
  | Pick<SamplingError, 'kind' | 'atLeast' | 'draws' | 'estimate' | 'interval' | 'confidence'>
  | Pick<SequentialError, 'kind' | 'rule' | 'level' | 'risk' | 'atLeast' | 'draws' | 'estimate' | 'interval'>;

/** For one threshold. */
export interface AdjustedP {
  /** null beside a reason. */
  readonly p: number | null;
  readonly reason?: 'underflow' | 'over-bound';
  readonly method: 'exact' | 'sample' | null;
  readonly error?: AdjustedError;
}
