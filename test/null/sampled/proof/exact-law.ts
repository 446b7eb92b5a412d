// The exact law of tables with given margins, by listing them all in whole numbers: the oracle of the samplers.

export interface ListedLaw {
  /** Every table, row-major. */
  readonly tables: readonly (readonly number[])[];
  readonly probabilities: readonly number[];
}

/**
 * P(table) = prod_j C_j! / prod n_ij! over N! / prod R_i! (Fisher 1922). All rows but the last must be small: factorials are taken as
 * binomials of few factors. Throws when the numerators do not add up to the denominator.
 */
export function exactLaw(rowTotals: readonly number[], columnTotals: readonly number[]): ListedLaw {
  const tables = [...tablesWith(rowTotals, columnTotals)];
  const weights = tables.map((table) =>
    columnTotals.reduce(
      (product, _, j) => product * multinomial(rowTotals.map((__, i) => table[i * columnTotals.length + j]!)),
      1n,
    ),
  );
  const total = multinomial(rowTotals);
  if (weights.reduce((sum, weight) => sum + weight, 0n) !== total) throw new Error('the listed law does not add up');
  return { tables, probabilities: weights.map((weight) => quotient(weight, total)) };
}

function* tablesWith(rowTotals: readonly number[], columnTotals: readonly number[]): Generator<number[]> {
  if (rowTotals.length === 1) {
    yield [...columnTotals];
    return;
  }
  for (const row of rowsWithin(rowTotals[0]!, columnTotals)) {
    const rest = columnTotals.map((units, j) => units - row[j]!);
    for (const others of tablesWith(rowTotals.slice(1), rest)) yield [...row, ...others];
  }
}

function* rowsWithin(units: number, limits: readonly number[]): Generator<number[]> {
  if (limits.length === 1) {
    if (units <= limits[0]!) yield [units];
    return;
  }
  for (let first = 0; first <= Math.min(units, limits[0]!); first++) {
    for (const others of rowsWithin(units - first, limits.slice(1))) yield [first, ...others];
  }
}

/** (sum of parts)! over the product of the factorials of the parts. */
function multinomial(parts: readonly number[]): bigint {
  let left = parts.reduce((sum, part) => sum + part, 0);
  let product = 1n;
  for (const part of parts) {
    product *= binomial(left, part);
    left -= part;
  }
  return product;
}

function binomial(n: number, k: number): bigint {
  let result = 1n;
  for (let i = 1; i <= Math.min(k, n - k); i++) result = (result * BigInt(n - i + 1)) / BigInt(i);
  return result;
}

const quotient = (a: bigint, b: bigint): number => Number((a << 80n) / b) / 2 ** 80;
