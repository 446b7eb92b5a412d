// Moves that connect all tables with the same margins and impossible cells: the chordless cycles of the graph of possible cells, one up and
// one down along each (Aoki & Takemura 2005; from memory, Ohsugi & Hibi 1999: they generate the ideal of a bipartite graph). Swaps of
// two rows and two columns alone do not.
import type { FreeBlock } from '../../table/free-cells.js';

/** Row-major cells; those at even places go up as the others go down. */
export type Move = readonly number[];

/** Every chordless cycle once; undefined where there are more than `most`. */
export function chordlessCycles(blocks: readonly FreeBlock[], width: number, most: number): Move[] | undefined {
  const moves: Move[] = [];
  for (const { rows, columns, cells } of blocks) {
    const possible = new Set(cells);
    const has = (row: number, column: number): boolean => possible.has(row * width + column);
    /** Extends a chordless path rows[0], columns[0], rows[1], ..., ending in a row; false when there are too many. */
    const extend = (path: number[], through: number[]): boolean => {
      const first = path[0]!;
      const last = path.at(-1)!;
      for (const column of columns) {
        if (through.includes(column) || !has(last, column)) continue;
        // A chord to a row between: this column belongs to no chordless cycle along this path.
        if (path.slice(1, -1).some((row) => has(row, column))) continue;
        if (path.length > 1 && has(first, column)) {
          // Each cycle is met in both directions; it is kept in one.
          if (through[0]! < column) moves.push(cycleOf(path, [...through, column], width));
          if (moves.length > most) return false;
          continue;
        }
        for (const row of rows) {
          if (row <= first || path.includes(row) || !has(row, column)) continue;
          if (through.some((other) => has(row, other))) {
            // A row that meets an earlier column makes a chord, unless it is the first one, which the closing column replaces.
            continue;
          }
          if (!extend([...path, row], [...through, column])) return false;
        }
      }
      return true;
    };
    for (const row of rows) if (!extend([row], [])) return undefined;
  }
  return moves;
}

function cycleOf(path: readonly number[], through: readonly number[], width: number): Move {
  return path.flatMap((row, k) => {
    const column = through[k]!;
    const following = path[(k + 1) % path.length]!;
    return [row * width + column, following * width + column];
  });
}
