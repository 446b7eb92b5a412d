// Cells: which of them drive the association. One entry for each cell of the table, row-major, empty lines too.
import { z } from 'zod';
import { cellReasons } from '../../cell/cell-reasons.js';
import { sequentialRule } from '../../pvalue/sequential/contract.js';
import { count, level, probability } from './pieces.js';

const rounding = z.strictObject({ kind: z.literal('rounding'), relative: z.number().min(0) });

const drawn = {
  /** Draws whose smallest p was at most that of the cell. */
  atLeast: count,
  draws: count,
  estimate: probability,
  interval: z.tuple([probability, probability]),
};

const error = z.discriminatedUnion('kind', [
  rounding,
  z.strictObject({ kind: z.literal('sampling'), ...drawn, confidence: level }),
  z.strictObject({ kind: z.literal('sequential'), rule: z.literal(sequentialRule), level, risk: level, ...drawn }),
]);

export const cell = z.strictObject({
  row: z.string(),
  column: z.string(),
  count,
  expected: z.number().min(0),
  /** Adds up over all cells to the statistic that the plan names (`cells.contributionsTo`). */
  contribution: z.number().min(0),
  pearsonResidual: z.number().nullable(),
  adjustedResidual: z.number().nullable(),
  /** Exact: P(|adjusted residual| at least the observed) given the margins. null beside a reason. */
  p: probability.nullable(),
  log10P: z.number().nullable(),
  reason: z.enum(cellReasons).optional(),
  /** By the smallest p of all cells: single-step. null beside a reason. */
  adjustedP: probability.nullable(),
  adjustedReason: z.enum(cellReasons).optional(),
  /** How adjustedP was found. */
  method: z.enum(['exact', 'sample']).nullable(),
  /** Of adjustedP. */
  errors: z.array(error),
});

/** What was settled about the cells, as the plan echoes it. */
export const cellsEcho = z.strictObject({
  /** The statistic that the contributions add up to. */
  contributionsTo: z.string(),
  /** Asked for, however long. */
  asked: z.literal(true).optional(),
  adjustment: z.enum(['exact', 'sample', 'none']),
  reason: z.string(),
  /** Where tables are drawn for the cells alone. */
  draws: count.optional(),
  seed: z.string().optional(),
});
