// Which cells of a table with impossible ones can vary, the margins held, and how they fall apart into blocks. A cell holds 0 in every table
// with these margins exactly when its row and its column lie in different strong components of the graph with an arrow from row to
// column for every possible cell and one back for every counted cell (Hoffman's circulation argument): then no swap can reach it.
import type { Table } from './table.js';

export interface FreeBlock {
  /** Indexes into the whole table. */
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  /** Row-major indexes of its possible cells. */
  readonly cells: readonly number[];
  /** Cells - rows - columns + 1 (Goodman 1968). */
  readonly degreesOfFreedom: number;
}

export interface FreeCells {
  readonly blocks: readonly FreeBlock[];
  /** Possible cells that these margins hold at 0, those of empty lines included. */
  readonly heldAtZero: readonly number[];
  readonly degreesOfFreedom: number;
}

export function freeCells({ counts, rowLabels, columnLabels, impossible }: Table): FreeCells {
  const rows = rowLabels.length;
  const width = columnLabels.length;
  const can = (i: number, j: number): boolean => !impossible?.[i]?.[j];
  const next = (node: number): number[] => {
    const found: number[] = [];
    if (node < rows) for (let j = 0; j < width; j++) if (can(node, j)) found.push(rows + j);
    if (node >= rows) for (let i = 0; i < rows; i++) if (counts[i]![node - rows]! > 0) found.push(i);
    return found;
  };
  const reach = Array.from({ length: rows + width }, (_, node) => reachedFrom(node, next, rows + width));
  const together = (a: number, b: number): boolean => reach[a]![b] === 1 && reach[b]![a] === 1;
  const blocks: FreeBlock[] = [];
  const heldAtZero: number[] = [];
  const done = new Set<number>();
  for (let first = 0; first < rows; first++) {
    for (let j = 0; j < width; j++) if (can(first, j) && !together(first, rows + j)) heldAtZero.push(first * width + j);
    if (done.has(first)) continue;
    const own = Array.from({ length: rows + width }, (_, node) => node).filter((node) => together(first, node));
    const inRows = own.filter((node) => node < rows);
    const inColumns = own.filter((node) => node >= rows).map((node) => node - rows);
    inRows.forEach((row) => done.add(row));
    const cells = inRows.flatMap((i) => inColumns.filter((j) => can(i, j)).map((j) => i * width + j));
    if (cells.length === 0) continue;
    const degreesOfFreedom = cells.length - inRows.length - inColumns.length + 1;
    blocks.push({ rows: inRows, columns: inColumns, cells, degreesOfFreedom });
  }
  return { blocks, heldAtZero, degreesOfFreedom: blocks.reduce((sum, block) => sum + block.degreesOfFreedom, 0) };
}

function reachedFrom(start: number, next: (node: number) => number[], nodes: number): Uint8Array {
  const seen = new Uint8Array(nodes);
  const waiting = [start];
  seen[start] = 1;
  while (waiting.length > 0) {
    for (const node of next(waiting.pop()!)) {
      if (seen[node] === 1) continue;
      seen[node] = 1;
      waiting.push(node);
    }
  }
  return seen;
}
