// From a table of groups by kinds of cluster back to units, and what statistics of the units need to be compared exactly.
import type { Place, Roles } from '../../statistic/contract.js';

export interface Units {
  readonly rows: number;
  readonly columns: number;
  /** Row-major counts of units; the row totals change from table to table, the column totals do not. */
  readonly counts: Float64Array;
  readonly rowTotals: Float64Array;
  readonly columnTotals: Float64Array;
  readonly total: number;
}

/** Non-negative fractions; denominator 0 stands for infinity. */
export type Fraction = readonly [numerator: bigint, denominator: bigint];

export function compare([a, b]: Fraction, [c, d]: Fraction): Place {
  if (b === 0n || d === 0n) return (Number(b === 0n) - Number(d === 0n)) as Place;
  const difference = a * d - c * b;
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
}

/** sum n_ij^2 / (R_i C_j), which is X^2 / n + 1 (Pearson 1900). */
export function pearsonFraction({ rows, columns, counts, rowTotals, columnTotals }: Units): Fraction {
  let numerator = 0n;
  let denominator = 1n;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const below = BigInt(rowTotals[i]!) * BigInt(columnTotals[j]!);
      if (below === 0n) continue;
      const above = BigInt(counts[i * columns + j]!) ** 2n;
      numerator = numerator * below + above * denominator;
      denominator *= below;
    }
  }
  return [numerator, denominator];
}

export function pearsonValue({ rows, columns, counts, rowTotals, columnTotals, total }: Units): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const expected = (rowTotals[i]! / total) * columnTotals[j]!;
      if (expected > 0) sum += (counts[i * columns + j]! - expected) ** 2 / expected;
    }
  }
  return sum;
}

/** Events and sizes of the two groups. */
export function sharesOf({ counts, columns, rowTotals, columnTotals }: Units, { groups, event, first }: Roles) {
  const size = (group: number): number => (groups === 'rows' ? rowTotals : columnTotals)[group]!;
  const events = (group: number): number =>
    counts[groups === 'rows' ? group * columns + event : event * columns + group]!;
  return { a: events(first), m: size(first), b: events(1 - first), n: size(1 - first) };
}

type Shares = ReturnType<typeof sharesOf>;

/** Sign of the difference of proportions, first minus second. */
export const signOf = ({ a, m, b, n }: Shares): Place => {
  const difference = BigInt(a) * BigInt(n) - BigInt(b) * BigInt(m);
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
};

/** The square of the difference of proportions over its unpooled standard error (wald) or the pooled one (score). */
export function squareOf({ a, m, b, n }: Shares, pooled: boolean): Fraction {
  const [A, M, B, N] = [BigInt(a), BigInt(m), BigInt(b), BigInt(n)];
  const difference = A * N - B * M;
  if (difference === 0n) return [0n, 1n];
  // (A/M - B/N)^2 over A(M-A)/M^3 + B(N-B)/N^3, or over p(1-p)(1/M + 1/N) with p = (A+B)/(M+N)
  return pooled
    ? [difference ** 2n * (M + N), M * N * (A + B) * (M + N - A - B)]
    : [difference ** 2n * M * N, A * (M - A) * N ** 3n + B * (N - B) * M ** 3n];
}
