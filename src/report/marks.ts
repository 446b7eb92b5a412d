// Which cells of the table carry a sign beside their count: those that stand out after adjustment over all cells.
import type { Result } from '../result/result.js';

export type Mark = '' | '+' | '-';

/** One for each cell, rows by columns. */
export type Marks = readonly (readonly Mark[])[];

/** More than expected is plus, fewer minus; undefined where no adjusted p is at most alpha. */
export function marksOf({ input, cells = [], plan }: Pick<Result, 'input' | 'cells' | 'plan'>): Marks | undefined {
  const standing = cells.filter(({ adjustedP }) => adjustedP !== null && adjustedP <= plan.alpha);
  if (standing.length === 0) return undefined;
  const signs = new Map(
    standing.map(({ row, column, count, expected }) => [placeOf(row, column), count > expected ? '+' : '-'] as const),
  );
  return input.rowLabels.map((row) => input.columnLabels.map((column) => signs.get(placeOf(row, column)) ?? ''));
}

const placeOf = (row: string, column: string): string => JSON.stringify([row, column]);

/** What the signs mean. */
export const legendWords = ({ plan }: Pick<Result, 'plan'>): string =>
  `Marked cells hold more (+) or fewer (-) than expected: adjusted p <= ${plan.alpha}.`;
