// The table as a linear statistic sees it: lines of equal score are one line, the side with fewer scores gives the rows,
// columns stand in the order that costs least.
import type { LinearForm } from '../../../statistic/contract.js';
import type { LiveTable } from '../../../table/live-table.js';

export interface ScoredLine {
  readonly score: number;
  readonly total: number;
}

export interface ScoredSides {
  /** Rising scores, from 0; at most as many as columns. */
  readonly rows: readonly ScoredLine[];
  readonly columns: readonly ScoredLine[];
  readonly total: number;
}

export function scoredSides(live: LiveTable, form: LinearForm): ScoredSides {
  const rows = merged(form.rowScores, live.rowTotals);
  const columns = merged(form.columnScores, live.columnTotals);
  const [few, many] = rows.length <= columns.length ? [rows, columns] : [columns, rows];
  const [first, ...others] = inOrder(many);
  const last = others.pop();
  const between = few.length < 3 ? others : others.flatMap(inChunks);
  return { rows: few, columns: [first!, ...between, ...(last === undefined ? [] : [last])], total: live.total };
}

/**
 * Three rows and more: a column is dealt two units at a time, as columns of the same score. The chances are the same, and
 * a column of C units then takes C/2 x 10 moves from a node (three rows) instead of about C^2 / 2.
 */
function inChunks({ score, total }: ScoredLine): ScoredLine[] {
  return Array.from({ length: Math.ceil(total / 2) }, (_, k) => ({ score, total: Math.min(2, total - 2 * k) }));
}

/** Units of lines with the same score can change places without changing S. */
function merged(scores: Float64Array, totals: Float64Array): ScoredLine[] {
  const byScore = new Map<number, number>();
  scores.forEach((score, k) => byScore.set(score, (byScore.get(score) ?? 0) + totals[k]!));
  return [...byScore].map(([score, total]) => ({ score, total })).sort((a, b) => a.score - b.score);
}

/** The first column starts from one node and the last is forced: the two largest stand there, the rest by score. */
function inOrder(columns: readonly ScoredLine[]): ScoredLine[] {
  const [last, first, ...others] = [...columns].sort((a, b) => b.total - a.total || a.score - b.score);
  return [first, ...others.sort((a, b) => a.score - b.score), last].filter((line) => line !== undefined);
}

/** Smallest and largest S that the margins allow: units of like (or opposite) ranks of score meet. */
export function extremes({ rows, columns }: ScoredSides): { lowest: number; highest: number } {
  const rising = (lines: readonly ScoredLine[]): ScoredLine[] => [...lines].sort((a, b) => a.score - b.score);
  return { lowest: meeting(rising(rows), rising(columns).reverse()), highest: meeting(rising(rows), rising(columns)) };
}

/** S of the table filled from its first corner along the border of what is left. */
function meeting(rows: readonly ScoredLine[], columns: readonly ScoredLine[]): number {
  let sum = 0;
  let j = 0;
  let room = columns[0]!.total;
  for (const { score, total } of rows) {
    for (let left = total; left > 0;) {
      if (room === 0) room = columns[++j]!.total;
      const count = Math.min(left, room);
      sum += score * columns[j]!.score * count;
      left -= count;
      room -= count;
    }
  }
  return sum;
}
