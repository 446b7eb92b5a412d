// How drawn tables are held.

/** A table's cells, row-major: whole numbers below 2^31, or any up to 2^53. */
export type Cells = Int32Array | Float64Array;

/** Whole-number arithmetic is the faster one; it is used wherever it reaches. */
export const cellsFor = (total: number, counts: readonly number[]): Cells =>
  total < 2 ** 31 ? Int32Array.from(counts) : Float64Array.from(counts);
