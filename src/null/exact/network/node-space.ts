// Nodes of the network: vectors of row sums used up by some columns. Numbers them (mixed radix over all rows but the last,
// whose sum follows from the others), and lists those worth visiting.
import { logFactorial } from '../../../numeric/log-factorial.js';
import { nodeCodes } from './node-codes.js';
import { NodeIndex } from './node-index.js';
import type { OrientedTable } from './oriented-table.js';

export class NodeSpace {
  readonly rows: number;
  /** Interchangeable rows stand side by side: blocks [from, to) of more than one row. A node is then held in rising order. */
  readonly blocks: readonly (readonly [from: number, to: number])[];
  /** First row of the block that a row is in (the row itself outside blocks). */
  readonly blockOf: Int32Array;
  /** A node's number is the sum of these over its rows, [row][count]. */
  readonly codes: readonly Float64Array[];
  private readonly size: number;

  /** @param allAlike every row may be exchanged with every other (else: rows of equal total). */
  constructor(
    private readonly table: OrientedTable,
    private readonly allAlike: boolean,
  ) {
    const { rows, rowTotals } = table;
    this.rows = rows;
    const blocks: [number, number][] = [];
    for (let from = 0, to = 1; from < rows; from = to++) {
      while (to < rows && (allAlike || rowTotals[to] === rowTotals[from])) to++;
      if (to - from > 1) blocks.push([from, to]);
    }
    // Without a code that fits, rows are told apart after all: more nodes, the same answer.
    const coded = nodeCodes(rowTotals, blocks);
    this.blocks = coded === null ? [] : blocks;
    const { codes, size } = coded ?? nodeCodes(rowTotals, [])!;
    this.codes = codes;
    this.size = size;
    this.blockOf = Int32Array.from(rowTotals, (_, row) => row);
    for (const [from, to] of this.blocks) this.blockOf.fill(from, from, to);
  }

  newIndex(): NodeIndex {
    return new NodeIndex(this.size);
  }

  numberOf(sums: ArrayLike<number>): number {
    let number = 0;
    for (let i = 0; i < this.rows; i++) number += this.codes[i]![sums[i]!]!;
    return number;
  }

  /**
   * Calls visit for the vectors of row sums that add up to `size` and fit the rows, interchangeable rows in rising order,
   * leaving out those whose chance exp(logFloor) undercuts. Returns a bound on the chance of all left out.
   * With all rows alike a vector stands for every arrangement of it, so that nothing is left out by chance.
   */
  visit(size: number, logFloor: number, visit: (sums: Float64Array) => void): number {
    const { rows, table, blockOf } = this;
    const { rowTotals } = table;
    const sums = new Float64Array(rows);
    const left = new Float64Array(rows + 1);
    const logs = new Float64Array(rows + 1);
    const roomAfter = new Float64Array(rows + 1);
    for (let i = rows - 1; i >= 0; i--) roomAfter[i] = roomAfter[i + 1]! + rowTotals[i]!;
    const byChance = !this.allAlike && logFloor > -Infinity;
    const tables = byChance ? this.logTables(roomAfter, size) : null;
    let leftOut = 0;
    left[0] = size;
    let row = 0;
    sums[0] = Math.max(0, size - roomAfter[1]!) - 1;
    while (row >= 0) {
      const amount = left[row]!;
      const n = ++sums[row]!;
      if (n > rowTotals[row]! || n > amount) {
        row--;
        continue;
      }
      if (tables !== null) {
        const log = logs[row]! + tables.choose[row]![n]!;
        if (log + tables.after[row]![amount - n]! < logFloor) {
          leftOut += Math.exp(log + tables.after[row]![amount - n]!);
          continue;
        }
        logs[row + 1] = log;
      }
      if (row === rows - 1) {
        visit(sums);
        row--;
        continue;
      }
      left[row + 1] = amount - n;
      row++;
      const least = blockOf[row] === row ? 0 : sums[row - 1]!;
      sums[row] = Math.max(least, left[row]! - roomAfter[row + 1]!) - 1;
    }
    return leftOut * this.blocks.reduce((product, [from, to]) => product * Math.exp(logFactorial(to - from)), 1);
  }

  /** ln of the ways to choose from each row, and from all rows after it over all ways to choose `size` from the table. */
  private logTables(roomAfter: Float64Array, size: number): { choose: Float64Array[]; after: Float64Array[] } {
    const { rowTotals, total } = this.table;
    const logs = (from: number): Float64Array =>
      Float64Array.from({ length: Math.min(from, size) + 1 }, (_, n) => logChoose(from, n));
    const whole = logChoose(total, size);
    return {
      choose: rowTotals.map(logs),
      after: rowTotals.map((_, row) => logs(roomAfter[row + 1]!).map((log) => log - whole)),
    };
  }

  /** In how many ways interchangeable rows can be put to give this vector when it is in rising order. */
  arrangementsOf(sums: ArrayLike<number>): number {
    let ways = 1;
    for (const [from, to] of this.blocks) {
      let run = 1;
      for (let i = from; i < to; i++) {
        run = i > from && sums[i] === sums[i - 1] ? run + 1 : 1;
        ways = (ways * (i - from + 1)) / run;
      }
    }
    return ways;
  }
}

const logChoose = (n: number, k: number): number => logFactorial(n) - logFactorial(k) - logFactorial(n - k);
