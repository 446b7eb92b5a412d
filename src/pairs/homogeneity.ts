// Stuart's (1955) statistic of marginal homogeneity: d' V^- d, with d the differences of row and column totals and V their covariance
// when every pair may be turned round. V depends on the sums n_ij + n_ji alone, so turning pairs round leaves it as it is, and the
// statistic is a quadratic form in whole numbers over one whole denominator: comparisons are exact.
import { greatestCommonDivisor } from '../numeric/greatest-common-divisor.js';
import { lowest, toDouble, type Rational } from '../numeric/rational.js';
import type { Place } from '../statistic/contract.js';
import type { DiscordantPair } from './square-table.js';

export interface HomogeneityForm {
  /** Levels of the table. */
  readonly levels: number;
  /** Rank of V: levels, less one for each set of levels between which no pair changed. */
  readonly degreesOfFreedom: number;
  /** The statistic of the observed table. */
  readonly value: number;
  /** Exact sign of the statistic at these differences, one for each level, minus the observed one. */
  place(differences: ArrayLike<number>): Place;
}

/** V is a weighted Laplacian: each set of levels joined by changes is solved with its first level left out. */
export function homogeneityForm(levels: number, pairs: readonly DiscordantPair[]): HomogeneityForm {
  const sets = joinedSets(levels, pairs);
  const kept = sets.flatMap((set) => set.slice(1));
  const { matrix, denominator } = scaledInverse(kept.map((i) => kept.map((j) => covariance(pairs, i, j))));
  const reach = kept.map((i) => covariance(pairs, i, i));
  const bound = matrix.reduce(
    (sum, row, a) => sum + row.reduce((line, x, b) => line + magnitude(x) * reach[a]! * reach[b]!, 0n),
    0n,
  );
  const doubles = matrix.map((row) => Float64Array.from(row, Number));
  // Each product rounded twice, each entry once, every sum once; both sides; twice for good measure.
  const slack = bound < 2n ** 53n ? 0 : 4 * (kept.length ** 2 + 4) * 2 ** -53 * Number(bound);
  const exact = (differences: ArrayLike<number>): bigint =>
    matrix.reduce((sum, row, a) => {
      const line = row.reduce((part, x, b) => part + x * BigInt(differences[kept[b]!]!), 0n);
      return sum + line * BigInt(differences[kept[a]!]!);
    }, 0n);
  const rounded = (differences: ArrayLike<number>): number => {
    let sum = 0;
    for (let a = 0; a < kept.length; a++) {
      const row = doubles[a]!;
      let line = 0;
      for (let b = 0; b < kept.length; b++) line += row[b]! * differences[kept[b]!]!;
      sum += line * differences[kept[a]!]!;
    }
    return sum;
  };
  const seen = differencesOf(levels, pairs);
  const observed = exact(seen);
  const observedRounded = rounded(seen);
  return {
    levels,
    degreesOfFreedom: kept.length,
    value: toDouble(lowest(observed, denominator)),
    place(differences) {
      const apart = rounded(differences) - observedRounded;
      if (apart > slack) return 1;
      if (apart < -slack) return -1;
      if (slack === 0) return 0;
      const sum = exact(differences);
      return sum > observed ? 1 : sum < observed ? -1 : 0;
    },
  };
}

/** Row totals minus column totals. */
export function differencesOf(levels: number, pairs: readonly DiscordantPair[]): number[] {
  const differences = new Array<number>(levels).fill(0);
  for (const { first, second, there, back } of pairs) {
    differences[first]! += there - back;
    differences[second]! += back - there;
  }
  return differences;
}

/** Levels joined by changes, directly or by way of others; a level without any stands alone. */
function joinedSets(levels: number, pairs: readonly DiscordantPair[]): number[][] {
  const setOf = Array.from({ length: levels }, (_, k) => k);
  for (const { first, second } of pairs) {
    const [from, to] = [setOf[second]!, setOf[first]!];
    setOf.forEach((set, k) => {
      if (set === from) setOf[k] = to;
    });
  }
  return [...new Set(setOf)].map((set) => setOf.flatMap((other, k) => (other === set ? [k] : [])));
}

function covariance(pairs: readonly DiscordantPair[], i: number, j: number): bigint {
  let sum = 0n;
  for (const { first, second, there, back } of pairs) {
    const m = BigInt(there + back);
    if (i === j && (first === i || second === i)) sum += m;
    if (i !== j && ((first === i && second === j) || (first === j && second === i))) sum -= m;
  }
  return sum;
}

const magnitude = (x: bigint): bigint => (x < 0n ? -x : x);

/** The inverse as whole numbers over one positive denominator, by Gauss and Jordan in fractions. The matrix is positive definite. */
function scaledInverse(matrix: readonly (readonly bigint[])[]): { matrix: bigint[][]; denominator: bigint } {
  const size = matrix.length;
  const whole = (x: bigint): Rational => ({ numerator: x, denominator: 1n });
  const rows = matrix.map((row, i) => [...row.map(whole), ...row.map((_, j) => whole(i === j ? 1n : 0n))]);
  for (let k = 0; k < size; k++) {
    const pivot = rows[k]![k]!;
    rows[k] = rows[k]!.map((x) => lowest(x.numerator * pivot.denominator, x.denominator * pivot.numerator));
    for (let i = 0; i < size; i++) {
      const times = rows[i]![k]!;
      if (i === k || times.numerator === 0n) continue;
      rows[i] = rows[i]!.map((x, j) => {
        const y = rows[k]![j]!;
        const across = x.denominator * y.denominator * times.denominator;
        return lowest(
          x.numerator * y.denominator * times.denominator - times.numerator * y.numerator * x.denominator,
          across,
        );
      });
    }
  }
  const inverse = rows.map((row) => row.slice(size));
  const denominator = inverse
    .flat()
    .reduce((all, x) => (all / greatestCommonDivisor(all, x.denominator)) * x.denominator, 1n);
  return { matrix: inverse.map((row) => row.map((x) => x.numerator * (denominator / x.denominator))), denominator };
}
