// How much one count can change: p of the tables one count away from the observed one (Dupont 1986).
import { z } from 'zod';
import { count, probability } from './pieces.js';

const cell = z.strictObject({ row: z.string(), column: z.string() });

const moved = z.strictObject({
  /** Exact; null when below the smallest double. */
  p: probability.nullable(),
  log10P: z.number().nullable(),
  /** The cell that one count was taken from, and the one in the same row or column that it was put into. */
  from: cell,
  to: cell,
});

export const fragility = z.strictObject({
  /** Tables one count away that were looked at: every move within a row or within a column. */
  moves: count,
  smallest: moved,
  largest: moved,
});
