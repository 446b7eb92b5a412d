// Which columns go to which half, and how much work that makes: a count of partial tables from the margins and the observed
// value. The tables not above the observed one fill an ellipsoid around the expected table, by whose volume they are
// counted (as Gail & Mantel 1977 count tables by a normal law); few small counts are counted as arrangements.
import type { OrientedTable } from './oriented-table.js';

export interface Split {
  readonly first: readonly number[];
  readonly second: readonly number[];
}

/** ln of the number of ways to set one column, as far as they are likely: sizes columns against each other. */
function columnSpread(table: OrientedTable, column: number): number {
  const { rowTotals, columnTotals, total, rows } = table;
  let log = 0;
  for (let i = 0; i < rows - 1; i++) {
    const expected = (rowTotals[i]! * columnTotals[column]!) / total;
    log += Math.log(1 + Math.min(columnTotals[column]!, rowTotals[i]!, 3 * Math.sqrt(expected)));
  }
  return log;
}

/** Halves of about equal spread; within each the smallest column comes last, where the lists are longest. */
export function splitColumns(table: OrientedTable): Split {
  const spread = table.columnTotals.map((_, j) => columnSpread(table, j));
  const whole = spread.reduce((sum, x) => sum + x, 0);
  const order = spread.map((_, j) => j).sort((a, b) => spread[b]! - spread[a]! || a - b);
  const chosen = table.columns <= 16 ? bestSubset(spread, whole / 2) : greedySubset(order, spread, whole / 2);
  const larger = order.filter((j) => chosen.has(j));
  const smaller = order.filter((j) => !chosen.has(j));
  const sumOf = (columns: readonly number[]): number => columns.reduce((sum, j) => sum + spread[j]!, 0);
  return sumOf(larger) >= sumOf(smaller) ? { first: larger, second: smaller } : { first: smaller, second: larger };
}

function bestSubset(spread: readonly number[], half: number): Set<number> {
  let best = 1;
  let distance = Infinity;
  for (let subset = 1; subset < 2 ** (spread.length - 1); subset++) {
    let sum = 0;
    for (let j = 0; j < spread.length; j++) if ((subset >> j) & 1) sum += spread[j]!;
    if (Math.abs(sum - half) < distance) {
      distance = Math.abs(sum - half);
      best = subset;
    }
  }
  return new Set(spread.map((_, j) => j).filter((j) => (best >> j) & 1));
}

function greedySubset(order: readonly number[], spread: readonly number[], half: number): Set<number> {
  const chosen = new Set<number>();
  let sum = 0;
  for (const j of order) {
    if (sum + spread[j]! > half && chosen.size > 0) continue;
    chosen.add(j);
    sum += spread[j]!;
  }
  return chosen;
}
