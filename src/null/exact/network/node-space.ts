// Nodes of the network: vectors of row sums used up by some columns. Numbers them (mixed radix over all rows but the last,
// whose sum follows from the others), and lists those worth visiting.
import { nodeCodes } from './node-codes.js';
import { OutOfReach } from '../out-of-reach.js';
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
    readonly table: OrientedTable,
    readonly allAlike: boolean,
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
    const plain = coded ?? nodeCodes(rowTotals, []);
    if (plain === null) throw new OutOfReach('memory', Infinity);
    const { codes, size } = plain;
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
