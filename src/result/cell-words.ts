// The words for cells that reports and the methods paragraph share.
import type { ResultBeforeWords } from './describe.js';
import { shortStatisticWords } from './describe.js';
import { quoted } from './label-words.js';
import { countWords } from './number-words.js';
import type { Result } from './result.js';

export type Cell = NonNullable<Result['cells']>[number];

/** Cells with a p, those of a 2x2 table told apart: their four residuals differ in sign alone. */
export const cellsWithP = ({ cells = [] }: ResultBeforeWords): Cell[] => cells.filter(({ log10P }) => log10P !== null);

export const isFourCells = (cells: readonly Cell[]): boolean => cells.length === 4;

/** "as often as the smallest p of a random table is at most that of the cell". */
export function adjustmentWords({ plan, cells = [] }: ResultBeforeWords): string {
  const drawn = cells.flatMap(({ errors }) => errors).find((error) => error.kind !== 'rounding');
  if (drawn === undefined) return plan.cells?.adjustment === 'exact' ? 'exact' : '';
  const whose = plan.cells?.seed === undefined ? 'the same' : '';
  const seed = plan.cells?.seed === undefined ? '' : `, seed ${quoted(plan.cells.seed)}`;
  return `from ${[whose, countWords(drawn.draws)].filter((word) => word !== '').join(' ')} random tables${seed}`;
}

/** For the methods paragraph; undefined where no cell has a p. */
export function cellsMethods(result: ResultBeforeWords): string | undefined {
  const { plan } = result;
  const cells = cellsWithP(result);
  if (plan.cells === undefined || cells.length === 0) return undefined;
  const own =
    'For each cell the adjusted residual (Haberman 1973) is given with its exact two-sided p: the probability, given both margins, of an absolute ' +
    'adjusted residual at least as large';
  if (isFourCells(cells)) return `${own}; in a 2x2 table all four cells have the same.`;
  if (plan.cells.adjustment === 'none') return `${own}, not adjusted for their number.`;
  const drawn = cells.some(({ errors }) => errors.some(({ kind }) => kind === 'sequential'))
    ? ', with limits that hold at every look'
    : '';
  return (
    `${own}; adjusted over all cells it is the probability that the smallest such p of a table is at most as small (single-step; ` +
    `Westfall & Young 1993), ${adjustmentWords(result)}${drawn}, which controls the probability of any false finding when rows and ` +
    `columns are completely independent. Contributions are those to ${shortStatisticWords(plan.cells.contributionsTo)}.`
  );
}
