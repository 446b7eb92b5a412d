// Nodes of the network: vectors of row sums used up by some columns. Numbers them (mixed radix over all rows but the last,
// whose sum follows from the others), and lists those worth visiting.
import { logFactorial } from '../../../numeric/log-factorial.js';
import type { OrientedTable } from './oriented-table.js';

/** Beyond this many possible numbers, nodes are looked up in a hash table instead of a plain one. */
const largestPlainTable = 2 ** 22;

export class NodeSpace {
  readonly rows: number;
  /** Multiplier of each row in a node's number; 0 for the last row. */
  readonly strides: Float64Array;
  readonly size: number;
  /** Interchangeable rows stand side by side: blocks [from, to) of more than one row. A node is then held in rising order. */
  readonly blocks: readonly (readonly [from: number, to: number])[];
  private readonly sorted: Float64Array;

  /** @param allAlike every row may be exchanged with every other (else: rows of equal total). */
  constructor(
    private readonly table: OrientedTable,
    private readonly allAlike: boolean,
  ) {
    const { rows, rowTotals } = table;
    this.rows = rows;
    this.strides = new Float64Array(rows);
    let size = 1;
    for (let i = 0; i < rows - 1; i++) {
      this.strides[i] = size;
      size *= rowTotals[i]! + 1;
    }
    this.size = size;
    this.sorted = new Float64Array(rows);
    const blocks: [number, number][] = [];
    for (let from = 0, to = 1; from < rows; from = to++) {
      while (to < rows && (allAlike || rowTotals[to] === rowTotals[from])) to++;
      if (to - from > 1) blocks.push([from, to]);
    }
    this.blocks = blocks;
  }

  newIndex(): NodeIndex {
    return this.size <= largestPlainTable ? new PlainIndex(this.size) : new HashedIndex();
  }

  /** Number of a node after putting interchangeable rows in rising order. */
  numberOf(sums: ArrayLike<number>): number {
    const { sorted, strides } = this;
    for (let i = 0; i < this.rows; i++) sorted[i] = sums[i]!;
    for (const [from, to] of this.blocks) {
      for (let i = from + 1; i < to; i++) {
        const x = sorted[i]!;
        let at = i;
        for (; at > from && sorted[at - 1]! > x; at--) sorted[at] = sorted[at - 1]!;
        sorted[at] = x;
      }
    }
    let number = 0;
    for (let i = 0; i < this.rows - 1; i++) number += sorted[i]! * strides[i]!;
    return number;
  }

  /**
   * Calls visit for the vectors of row sums that add up to `size` and fit the rows, interchangeable rows in rising order,
   * leaving out those whose chance exp(logFloor) undercuts. Returns a bound on the chance of all left out.
   * With all rows alike a vector stands for every arrangement of it, so that nothing is left out by chance.
   */
  visit(size: number, logFloor: number, visit: (sums: Float64Array) => void): number {
    const { rows, table } = this;
    const { rowTotals } = table;
    const sums = new Float64Array(rows);
    const roomAfter = new Float64Array(rows + 1);
    for (let i = rows - 1; i >= 0; i--) roomAfter[i] = roomAfter[i + 1]! + rowTotals[i]!;
    const risesFrom = new Int8Array(rows);
    for (const [from, to] of this.blocks) risesFrom.fill(1, from + 1, to);
    const arrangements = this.blocks.reduce((product, [from, to]) => product * Math.exp(logFactorial(to - from)), 1);
    const whole = logChoose(table.total, size);
    const byChance = !this.allAlike && logFloor > -Infinity;
    let leftOut = 0;

    const descend = (row: number, left: number, logSoFar: number): void => {
      const least = Math.max(risesFrom[row] === 1 ? sums[row - 1]! : 0, left - roomAfter[row + 1]!);
      const most = Math.min(rowTotals[row]!, left);
      if (row === rows - 1) {
        if (least > left || left > most) return;
        sums[row] = left;
        visit(sums);
        return;
      }
      for (let n = least; n <= most; n++) {
        sums[row] = n;
        if (!byChance) {
          descend(row + 1, left - n, 0);
          continue;
        }
        const log = logSoFar + logChoose(rowTotals[row]!, n);
        const chance = log + logChoose(roomAfter[row + 1]!, left - n) - whole;
        if (chance < logFloor) leftOut += Math.exp(chance);
        else descend(row + 1, left - n, log);
      }
    };
    descend(0, size, 0);
    return leftOut * arrangements;
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

/** From a node's number to its place in a level, -1 when it is not there. */
export interface NodeIndex {
  get(number: number): number;
  set(number: number, place: number): void;
}

class PlainIndex implements NodeIndex {
  private readonly places: Int32Array;
  constructor(size: number) {
    this.places = new Int32Array(size).fill(-1);
  }
  get(number: number): number {
    return this.places[number]!;
  }
  set(number: number, place: number): void {
    this.places[number] = place;
  }
}

/** Open addressing; numbers are spread by Knuth's multiplicative hash of their low and high halves. */
class HashedIndex implements NodeIndex {
  private mask = 2 ** 16 - 1;
  private numbers = new Float64Array(this.mask + 1).fill(-1);
  private places = new Int32Array(this.mask + 1);
  private used = 0;

  private slot(number: number): number {
    const high = Math.floor(number / 2 ** 32);
    let at = (Math.imul((number - high * 2 ** 32) | 0, 0x9e3779b1) ^ Math.imul(high + 1, 0x85ebca6b)) >>> 0;
    at = (at ^ (at >>> 15)) & this.mask;
    while (this.numbers[at] !== number && this.numbers[at] !== -1) at = (at + 1) & this.mask;
    return at;
  }

  get(number: number): number {
    const at = this.slot(number);
    return this.numbers[at] === -1 ? -1 : this.places[at]!;
  }

  set(number: number, place: number): void {
    if (2 * ++this.used > this.mask) this.enlarge();
    const at = this.slot(number);
    this.numbers[at] = number;
    this.places[at] = place;
  }

  private enlarge(): void {
    const { numbers, places } = this;
    this.mask = this.mask * 2 + 1;
    this.numbers = new Float64Array(this.mask + 1).fill(-1);
    this.places = new Int32Array(this.mask + 1);
    numbers.forEach((number, at) => {
      if (number === -1) return;
      const to = this.slot(number);
      this.numbers[to] = number;
      this.places[to] = places[at]!;
    });
  }
}
