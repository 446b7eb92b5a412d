// The largest adjusted residual of a table (Haberman 1973): how far out is the most surprising cell? Its square in a cell is
// (n N - R C)^2 N / (R C (N - R)(N - C)), a ratio of whole numbers, so that every comparison is one of whole numbers.
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, CellLimits, Place, Statistic } from './contract.js';

export const maxResidual: Statistic = {
  name: 'max-residual',
  sided: 'upper',
  shape: 'any',
  words: 'the largest absolute adjusted residual (the cell furthest from expectation)',
  formula: 'largest over cells of |n_ij - e_ij| / sqrt(e_ij (1 - R_i/n) (1 - C_j/n))',
  range: '0 (counts as expected) to sqrt n',
  source: 'Haberman (1973)',
  limit: 'none',
  bind,
};

function bind(live: LiveTable): BoundStatistic {
  const limits = limitsOf(live);
  return {
    value: (counts) => largest(live, counts),
    place: (counts) => placeWithin(limits, counts),
    limits,
  };
}

function largest(live: LiveTable, counts: ArrayLike<number>): number {
  const { rowTotals, columnTotals, total, columns } = live;
  let most = 0;
  for (let cell = 0; cell < counts.length; cell++) {
    const row = rowTotals[Math.floor(cell / columns)]!;
    const column = columnTotals[cell % columns]!;
    const expected = (row / total) * column;
    const deviation = Math.sqrt(expected * ((total - row) / total) * ((total - column) / total));
    // The difference from n N - R C in whole numbers: n - e alone would lose the digits of a small one.
    const apart = Number(BigInt(counts[cell]!) * BigInt(total) - BigInt(row) * BigInt(column)) / total;
    most = Math.max(most, Math.abs(apart) / deviation);
  }
  return most;
}

function placeWithin(limits: CellLimits, counts: ArrayLike<number>): Place {
  let tied = false;
  for (let cell = 0; cell < counts.length; cell++) {
    const count = counts[cell]!;
    if (count > limits.highest[cell]! || count < limits.lowest[cell]!) return 1;
    if (count === limits.highest[cell]) tied ||= limits.highestTies[cell] === 1;
    if (count === limits.lowest[cell]) tied ||= limits.lowestTies[cell] === 1;
  }
  return tied ? 0 : -1;
}

/** For each cell, the counts whose residual is at most the observed maximum A/B (squared): |n N - R C| <= sqrt(A D / (N B)). */
function limitsOf(live: LiveTable): CellLimits {
  const total = BigInt(live.total);
  const sizes = Array.from(live.counts, (_, cell) => {
    const row = BigInt(live.rowTotals[Math.floor(cell / live.columns)]!);
    const column = BigInt(live.columnTotals[cell % live.columns]!);
    return { product: row * column, spread: row * column * (total - row) * (total - column), row, column };
  });
  let above = 0n;
  let below = 1n;
  sizes.forEach(({ product, spread }, cell) => {
    const apart = BigInt(live.counts[cell]!) * total - product;
    const square = apart * apart;
    if (square * below > above * spread) [above, below] = [square, spread];
  });
  const cells = sizes.length;
  const limits: CellLimits = {
    lowest: new Float64Array(cells),
    highest: new Float64Array(cells),
    lowestTies: new Uint8Array(cells),
    highestTies: new Uint8Array(cells),
  };
  sizes.forEach(({ product, spread, row, column }, cell) => {
    const reach = rootOf((above * spread) / below);
    const ties = (count: bigint): 0 | 1 => ((count * total - product) ** 2n * below === above * spread ? 1 : 0);
    const [least, most] = [row + column > total ? row + column - total : 0n, row < column ? row : column];
    const high = smaller(most, (product + reach) / total);
    const low = larger(least, reach >= product ? 0n : (product - reach + total - 1n) / total);
    limits.highest[cell] = Number(high);
    limits.lowest[cell] = Number(low);
    limits.highestTies[cell] = ties(high);
    limits.lowestTies[cell] = ties(low);
  });
  return limits;
}

const smaller = (a: bigint, b: bigint): bigint => (a < b ? a : b);
const larger = (a: bigint, b: bigint): bigint => (a > b ? a : b);

/** Largest whole number whose square is at most n >= 0 (Newton's iteration from above). */
function rootOf(n: bigint): bigint {
  if (n < 2n) return n;
  let x = 1n << BigInt(Math.ceil(n.toString(2).length / 2));
  for (;;) {
    const next = (x + n / x) >> 1n;
    if (next >= x) return x;
    x = next;
  }
}
