// Hints on what a table might really be: pairs, ordered levels, weighted counts. They change nothing; each has a code.
import type { Statistic } from '../statistic/contract.js';
import { defaultLabels, type Table } from '../table/table.js';
import type { LiveTable } from '../table/live-table.js';
import { looksOrdered } from './ordered-labels.js';
import type { Note } from './result.js';

/** @param orderDeclared the user has said which sides are ordered. */
export const hintNotes = (table: Table, live: LiveTable, statistic: Statistic, orderDeclared: boolean): Note[] => [
  ...pairedHint(table),
  ...orderedHint(table, live, statistic, orderDeclared),
  ...weightedHint(table),
];

const isNamed = (side: 'row' | 'column', labels: readonly string[]): boolean =>
  !defaultLabels(side, labels.length).every((label, k) => label === labels[k]);

/** The same labels on both sides. */
function pairedHint({ rowLabels, columnLabels }: Table): Note[] {
  if (rowLabels.length < 2 || rowLabels.length !== columnLabels.length) return [];
  const plain = (labels: readonly string[]): string =>
    labels
      .map((label) => label.trim().toLowerCase())
      .sort()
      .join('\n');
  if (plain(rowLabels) !== plain(columnLabels)) return [];
  return [
    {
      code: 'same-labels-on-both-sides',
      text: 'Rows and columns have the same labels. If every unit was judged twice (before and after, by two raters, as matched pairs), this table holds pairs: whether the two judgements differ, or agree (--paired), is another question than whether they are related.',
    },
  ];
}

/** A side with three or more levels that read as an order, under a statistic that knows none. */
function orderedHint(table: Table, live: LiveTable, statistic: Statistic, orderDeclared: boolean): Note[] {
  const usesOrder = statistic.takes?.some((kind) => kind === 'scores' || kind === 'response-scores');
  if (usesOrder || orderDeclared || statistic.own) return [];
  const rows = isNamed('row', table.rowLabels) && looksOrdered(table.rowLabels);
  const columns = isNamed('column', table.columnLabels) && looksOrdered(table.columnLabels);
  // A trend needs an order on one side and an order, or two levels, on the other.
  if (!((rows && (columns || live.columns === 2)) || (columns && live.rows === 2))) return [];
  const sides = rows && columns ? 'rows and of the columns' : rows ? 'rows' : 'columns';
  return [
    {
      code: 'labels-look-ordered',
      text: `The labels of the ${sides} read as ordered levels, and ${statistic.name} takes no notice of order. Where a steady rise or fall is the question, --statistic trend looks for it; the choice belongs before the counts are seen.`,
    },
  ];
}

/** By chance such a common factor turns up in less than one table of a thousand. */
const rareFactor = 1000;
const manyEqual = 50;

/** Every count a multiple of one number, or most of them one large number. */
function weightedHint({ counts }: Table): Note[] {
  const filled = counts.flat().filter((count) => count > 0);
  const factor = filled.reduce(greatestCommonDivisor, 0);
  // Counts that are all the same are a balanced table, not a weighted one.
  const areMultiples = factor > 1 && filled.some((count) => count !== factor);
  if (areMultiples && factor ** (filled.length - 1) >= rareFactor) {
    return [
      {
        code: 'counts-look-weighted',
        text: `Every count is a multiple of ${factor}. If these are weights, percentages or each unit counted several times, p is far too small: the test needs the number of independent units in each cell.`,
      },
    ];
  }
  const most = Math.max(...filled.map((count) => filled.filter((other) => other === count).length));
  const value = filled.find((count) => filled.filter((other) => other === count).length === most)!;
  if (filled.length < 6 || most * 2 < filled.length || value < manyEqual) return [];
  return [
    {
      code: 'counts-look-weighted',
      text: `${most} of the ${filled.length} counts above 0 are ${value}. If these were weighted, capped or filled in, p does not mean what it says: the test needs the number of independent units in each cell.`,
    },
  ];
}

const greatestCommonDivisor = (a: number, b: number): number => (b === 0 ? a : greatestCommonDivisor(b, a % b));
