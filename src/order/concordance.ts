// Pairs of units: concordant where the one with the higher row also has the higher column, discordant where it has the
// lower. Counted for every cell from sums over the quarters of the table around it.
import type { Table } from '../table/table.js';

export interface Concordance {
  /** Pairs of units, each once; sums of products of counts, within (rows + columns) 2^-52 of their value. */
  readonly concordant: number;
  readonly discordant: number;
  /** Row-major: units concordant with one of the cell minus units discordant with it. */
  readonly balance: Float64Array;
  /** The two apart, row-major. */
  readonly concordantWith: Float64Array;
  readonly discordantWith: Float64Array;
}

/** O(cells). */
export function concordance({ counts, rowLabels, columnLabels }: Table): Concordance {
  const rows = rowLabels.length;
  const columns = columnLabels.length;
  const wide = columns + 1;
  /** upTo[i][j]: units in rows before i and columns before j. */
  const upTo = new Float64Array((rows + 1) * wide);
  for (let i = 0; i < rows; i++) {
    let line = 0;
    for (let j = 0; j < columns; j++) {
      line += counts[i]![j]!;
      upTo[(i + 1) * wide + j + 1] = upTo[i * wide + j + 1]! + line;
    }
  }
  const all = upTo[rows * wide + columns]!;
  const concordantWith = new Float64Array(rows * columns);
  const discordantWith = new Float64Array(rows * columns);
  let concordant = 0;
  let discordant = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const before = upTo[i * wide + j]!;
      const rowsBefore = upTo[i * wide + columns]!;
      const rowsUpTo = upTo[(i + 1) * wide + columns]!;
      const columnsBefore = upTo[rows * wide + j]!;
      const columnsUpTo = upTo[rows * wide + j + 1]!;
      const after = all - rowsUpTo - columnsUpTo + upTo[(i + 1) * wide + j + 1]!;
      const aboveRight = rowsBefore - upTo[i * wide + j + 1]!;
      const belowLeft = columnsBefore - upTo[(i + 1) * wide + j]!;
      const cell = i * columns + j;
      concordantWith[cell] = before + after;
      discordantWith[cell] = aboveRight + belowLeft;
      concordant += counts[i]![j]! * after;
      discordant += counts[i]![j]! * belowLeft;
    }
  }
  return {
    concordant,
    discordant,
    balance: concordantWith.map((units, cell) => units - discordantWith[cell]!),
    concordantWith,
    discordantWith,
  };
}
