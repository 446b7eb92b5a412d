// Which cells drive it: the few that stand out, the furthest first; all of them are in the json format.
import { adjustmentWords, cellsWithP, isFourCells, type Cell } from '../../result/cell-words.js';
import { shortStatisticWords } from '../../result/describe.js';
import { quoted, shown } from '../../result/label-words.js';
import { countWords, digits, percentWords, probabilityWords, tinyWords } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Block, Grid } from '../page.js';

/** Cells shown, at most. */
const mostShown = 6;

export function cellsBlocks(result: Result): Block[] {
  const { plan, cells = [] } = result;
  const all = cellsWithP(result);
  if (plan.cells === undefined || cells.some(({ reason }) => reason === 'only-one-table')) return [];
  if (all.length === 0) return [plain(`The cells have no p of their own: ${plan.cells.reason}.`)];
  if (isFourCells(all)) return [plain(fourCells(all[0]!))];
  const isAdjusted = plan.cells.adjustment !== 'none';
  const inOrder = [...all].sort(
    (a, b) => a.log10P! - b.log10P! || Math.abs(b.adjustedResidual!) - Math.abs(a.adjustedResidual!),
  );
  const judged = (cell: Cell): number => (isAdjusted ? (cell.adjustedP ?? 0) : (cell.p ?? 0));
  const standing = inOrder.filter((cell) => judged(cell) <= plan.alpha);
  const which = isAdjusted ? 'adjusted p' : 'p';
  if (standing.length === 0) {
    const [first] = inOrder;
    return [
      plain(
        `No cell stands out: the smallest ${which} is ${adjustedWords(first!, isAdjusted)} (${nameOf(first!)}, adjusted residual ${residual(first!)}).`,
      ),
      ...notAdjusted(result),
    ];
  }
  const shownCells = standing.slice(0, mostShown);
  const count = standing.length === 1 ? 'One cell' : `${countWords(standing.length)} cells`;
  const more = standing.length > mostShown ? ` The ${mostShown} furthest from expectation:` : '';
  return [
    plain(
      `${count} of ${countWords(all.length)} ${standing.length === 1 ? 'has' : 'have'} ${which} of at most ${plan.alpha}.${more}`,
    ),
    gridOf(shownCells, isAdjusted),
    plain(shareWords(shownCells, all, plan.cells.contributionsTo)),
    plain(
      isAdjusted
        ? `The p of a cell is exact and its own alone; adjusted over all cells (${adjustmentWords(result)}) it is the chance that the ` +
            'smallest p of a table is as small (Westfall & Young 1993). That holds under complete independence; where some cell departs, it promises nothing of the others.'
        : 'The p of a cell is exact and its own alone: among many cells some are small by chance.',
    ),
    ...notAdjusted(result),
  ];
}

const plain = (text: string): Block => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

const notAdjusted = ({ plan }: Result): Block[] =>
  plan.cells?.adjustment === 'none' ? [plain(`Not adjusted over all cells: ${plan.cells.reason}.`)] : [];

function fourCells(cell: Cell): string {
  const distance = digits(Math.abs(cell.adjustedResidual!), 3);
  return (
    `All four cells lie equally far from expectation: their adjusted residuals (Haberman 1973) are ${distance}, with ` +
    `${Math.sign(cell.adjustedResidual!) >= 0 ? 'more' : 'fewer'} than expected in ${nameOf(cell)}; one that far has exact p ${ownWords(cell)}.`
  );
}

/** What these cells add to the statistic. */
function shareWords(some: readonly Cell[], all: readonly Cell[], name: string): string {
  const sum = (cells: readonly Cell[]): number => cells.reduce((all, { contribution }) => all + contribution, 0);
  const share = percentWords(Math.min(1, sum(some) / sum(all)));
  return `Residuals are adjusted ones (Haberman 1973). ${some.length === 1 ? 'This cell makes' : 'Together these cells make'} up ${share} of ${shortStatisticWords(name)}.`;
}

function gridOf(cells: readonly Cell[], isAdjusted: boolean): Grid {
  return {
    kind: 'grid',
    headings: ['cell', 'count', 'expected', 'residual', 'p', ...(isAdjusted ? ['adjusted p'] : [])],
    rows: cells.map((cell) => [
      `${quoted(cell.row)}, ${quoted(cell.column)}`,
      countWords(cell.count),
      digits(cell.expected, 3),
      residual(cell),
      ownWords(cell),
      ...(isAdjusted ? [adjustedWords(cell, true)] : []),
    ]),
  };
}

const nameOf = ({ row, column }: Cell): string => `row ${quoted(row)}, column ${quoted(column)}`;

/** More than expected is plus, fewer is minus. */
const residual = ({ adjustedResidual }: Cell): string =>
  `${adjustedResidual! > 0 ? '+' : ''}${adjustedResidual === 0 ? '0' : digits(adjustedResidual!, 3)}`;

const ownWords = ({ p, log10P }: Cell): string => (p === null ? tinyWords(log10P!) : probabilityWords(p));

function adjustedWords(cell: Cell, isAdjusted: boolean): string {
  if (!isAdjusted) return ownWords(cell);
  if (cell.adjustedP === null) return 'too small for a number';
  return cell.method === 'sample' ? digits(cell.adjustedP, 2) : probabilityWords(cell.adjustedP);
}
