// Lists the nodes of a level worth a list. Nodes too improbable to matter are left out with their mass; nodes whose every
// table lies above the observed one are told apart by the lower bounds. Along each line of nodes (one count moved between
// the last two rows) the walk goes outward from the most probable node, so that both kinds end a line: chance falls
// outward, and the multipliers of a bound stay valid for every node of the line, so that its slope says what lies beyond.
import { logFactorial } from '../../../numeric/log-factorial.js';
import { perBoundedCell } from './costs.js';
import type { Network } from './network.js';
import type { NodeSpace } from './node-space.js';

export interface NodeVisitor {
  /** A node whose tables may lie on either side. The arrays are used again. */
  open(sums: Float64Array, left: Float64Array, leastBefore: number, leastAfter: number): void;
  /** A node whose tables all lie above the observed one; called only where the high side is summed. */
  above(sums: Float64Array, left: Float64Array): void;
}

/** Visits the nodes after the columns `done` (`rest` are the others); returns a bound on the chance of those left out. */
export function visitNodes(
  network: Network,
  done: readonly number[],
  rest: readonly number[],
  visitor: NodeVisitor,
): number {
  const { table, space, side, bounds, allAlike, logFloor, meter } = network;
  const { rows, rowTotals, total, columnTotals } = table;
  const size = done.reduce((sum, j) => sum + columnTotals[j]!, 0);
  const limit = network.encoding.observedValue + network.margin;
  const sums = new Float64Array(rows);
  const left = new Float64Array(rows);
  const amounts = new Float64Array(rows + 1);
  const logs = new Float64Array(rows + 1);
  const roomAfter = new Float64Array(rows + 1);
  for (let i = rows - 1; i >= 0; i--) roomAfter[i] = roomAfter[i + 1]! + rowTotals[i]!;
  const chances = allAlike ? null : chanceTables(rowTotals, roomAfter, size);
  let leftOut = 0;
  let bounded = 0;

  /** Outward from `from`; `to` is the last node of the line in this direction. */
  const walk = (from: number, to: number, isAbove: boolean): boolean => {
    const row = rows - 2;
    const direction = to >= from ? 1 : -1;
    let beyond = isAbove;
    let beyondBack = false;
    for (let n = from; direction * (to - n) >= 0; n += direction) {
      const lastSum = amounts[row]! - n;
      if (chances !== null) {
        const log = logs[row]! + chances.choose[row]![n]! + chances.choose[row + 1]![lastSum]!;
        if (log < logFloor) {
          leftOut += Math.exp(log) * (Math.abs(to - n) + 1);
          break;
        }
      }
      sums[row] = n;
      sums[row + 1] = lastSum;
      left[row] = rowTotals[row]! - n;
      left[row + 1] = rowTotals[row + 1]! - lastSum;
      if (!beyond) {
        bounded++;
        const leastAfter = bounds.least(rest, total - size, left);
        const slopeAfter = bounds.slopeBetween(row, row + 1);
        const leastBefore = bounds.least(done, size, sums);
        if (leastBefore + leastAfter <= limit) {
          visitor.open(sums, left, leastBefore, leastAfter);
          continue;
        }
        const slope = bounds.slopeBetween(row, row + 1) - slopeAfter;
        if (n === from) beyondBack = slope * direction < 0;
        beyond = slope * direction > 0;
      }
      if (side === 'high') visitor.above(sums, left);
      else if (beyond) break;
    }
    return beyondBack;
  };

  const line = (): void => {
    const row = rows - 2;
    const amount = amounts[row]!;
    const joined = space.blockOf[row + 1] !== row + 1;
    const least = Math.max(row > 0 && space.blockOf[row] !== row ? sums[row - 1]! : 0, amount - rowTotals[row + 1]!);
    const most = Math.min(rowTotals[row]!, joined ? Math.floor(amount / 2) : amount);
    if (least > most) return;
    // Mode of the hypergeometric law of one row's share.
    const mode = Math.floor(((amount + 1) * (rowTotals[row]! + 1)) / (rowTotals[row]! + rowTotals[row + 1]! + 2));
    const start = Math.max(least, Math.min(most, mode));
    const belowIsAbove = walk(start, most, false);
    if (start > least) walk(start - 1, least, belowIsAbove);
    meter.spend(bounded * rows * table.columns * perBoundedCell);
    bounded = 0;
  };

  amounts[0] = size;
  let row = 0;
  sums[0] = Math.max(0, size - roomAfter[1]!) - 1;
  if (rows === 2) line();
  while (rows > 2 && row >= 0) {
    const n = ++sums[row]!;
    const amount = amounts[row]!;
    if (n > rowTotals[row]! || n > amount) {
      row--;
      continue;
    }
    if (chances !== null) {
      const log = logs[row]! + chances.choose[row]![n]!;
      if (log + chances.after[row]![amount - n]! < logFloor) {
        leftOut += Math.exp(log + chances.after[row]![amount - n]!);
        continue;
      }
      logs[row + 1] = log;
    }
    left[row] = rowTotals[row]! - n;
    amounts[row + 1] = amount - n;
    if (row === rows - 3) {
      line();
      continue;
    }
    row++;
    sums[row] = Math.max(space.blockOf[row] === row ? 0 : n, amount - n - roomAfter[row + 1]!) - 1;
  }
  return leftOut * space.blocks.reduce((product, [from, to]) => product * Math.exp(logFactorial(to - from)), 1);
}

/** ln of the ways to choose from each row (over all ways, in the first), and from all rows after it together. */
function chanceTables(
  rowTotals: readonly number[],
  roomAfter: Float64Array,
  size: number,
): { choose: Float64Array[]; after: Float64Array[] } {
  const whole = logChoose(roomAfter[0]!, size);
  const logs = (from: number, over: number): Float64Array =>
    Float64Array.from({ length: Math.min(from, size) + 1 }, (_, n) => logChoose(from, n) - over);
  return {
    choose: rowTotals.map((rowTotal, row) => logs(rowTotal, row === 0 ? whole : 0)),
    after: rowTotals.map((_, row) => logs(roomAfter[row + 1]!, 0)),
  };
}

const logChoose = (n: number, k: number): number => logFactorial(n) - logFactorial(k) - logFactorial(n - k);

/** Every vector of row sums that adds up to `size`, interchangeable rows in rising order, with the ways to arrange it. */
export function visitAll(
  space: NodeSpace,
  size: number,
  visit: (sums: Float64Array, left: Float64Array, ways: number) => void,
): void {
  const { rows, blockOf } = space;
  const { rowTotals } = space.table;
  const sums = new Float64Array(rows);
  const left = new Float64Array(rows);
  const amounts = new Float64Array(rows + 1);
  const roomAfter = new Float64Array(rows + 1);
  for (let i = rows - 1; i >= 0; i--) roomAfter[i] = roomAfter[i + 1]! + rowTotals[i]!;
  amounts[0] = size;
  sums[0] = Math.max(0, size - roomAfter[1]!) - 1;
  for (let row = 0; row >= 0;) {
    const n = ++sums[row]!;
    const amount = amounts[row]!;
    if (n > rowTotals[row]! || n > amount) {
      row--;
      continue;
    }
    left[row] = rowTotals[row]! - n;
    if (row === rows - 1) {
      visit(sums, left, space.arrangementsOf(sums));
      row--;
      continue;
    }
    amounts[row + 1] = amount - n;
    row++;
    sums[row] = Math.max(blockOf[row] === row ? 0 : n, amount - n - roomAfter[row + 1]!) - 1;
  }
}
