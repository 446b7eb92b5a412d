// Groups on one side, scored responses on the other: the sums of scores of the groups, in whole numbers, for statistics that
// compare where the groups lie on the scale of the responses.
import type { LiveTable } from '../table/live-table.js';
import type { Choices } from './contract.js';
import { midranks, standardScores, wholeScores } from './scores.js';

export interface ScoredResponses {
  readonly byRows: boolean;
  /** Units of each group; positive. */
  readonly sizes: Float64Array;
  /** One for each response: whole, the smallest 0, without a common divisor. */
  readonly scores: readonly bigint[];
  readonly asDoubles: Float64Array;
  /** Every sum of scores, and its product with the total, is a whole number that doubles hold. */
  readonly fitsDoubles: boolean;
  /** Sum of scores of all units, and n sum v^2 C - (sum v C)^2: 0 when all scores are equal. */
  readonly sum: bigint;
  readonly spread: bigint;
  readonly total: bigint;
}

/** Without declared scores: midranks, or the places 1, 2, 3, ... */
export function scoredResponses(live: LiveTable, choices: Choices, standard: 'midranks' | 'places'): ScoredResponses {
  const byRows = choices.groups !== 'columns';
  const sizes = byRows ? live.rowTotals : live.columnTotals;
  const totals = byRows ? live.columnTotals : live.rowTotals;
  const index = byRows ? live.columnIndex : live.rowIndex;
  const declared = choices.responseScores ?? (standard === 'midranks' ? midranks([...totals]) : standardScores(index));
  const scores = wholeScores(declared).whole;
  const total = BigInt(live.total);
  const weigh = (power: bigint): bigint =>
    scores.reduce((all, score, k) => all + score ** power * BigInt(totals[k]!), 0n);
  const sum = weigh(1n);
  const largest = scores.reduce((most, x) => (x > most ? x : most));
  return {
    byRows,
    sizes,
    scores,
    asDoubles: Float64Array.from(scores, Number),
    fitsDoubles: largest * total * total < 2n ** 53n,
    sum,
    spread: total * weigh(2n) - sum * sum,
    total,
  };
}

/** Sum of scores in each group, added in doubles: exact where they fit. */
export function sumsOfGroups(
  live: LiveTable,
  { byRows, asDoubles }: ScoredResponses,
  counts: ArrayLike<number>,
  into: Float64Array,
): void {
  into.fill(0);
  let cell = 0;
  for (let i = 0; i < live.rows; i++) {
    for (let j = 0; j < live.columns; j++) {
      const count = counts[cell++]!;
      if (byRows) into[i]! += asDoubles[j]! * count;
      else into[j]! += asDoubles[i]! * count;
    }
  }
}

/** The same in whole numbers. */
export function exactSumsOfGroups(
  live: LiveTable,
  { byRows, scores, sizes }: ScoredResponses,
  counts: ArrayLike<number>,
): bigint[] {
  const sums = Array.from(sizes, () => 0n);
  let cell = 0;
  for (let i = 0; i < live.rows; i++) {
    for (let j = 0; j < live.columns; j++) {
      const count = BigInt(counts[cell++]!);
      if (byRows) sums[i]! += scores[j]! * count;
      else sums[j]! += scores[i]! * count;
    }
  }
  return sums;
}

/**
 * Bound on what rounding can do to the difference of two sums of (sum of scores)^2 / size over groups, each of which is at
 * most (largest score)^2 n: a sum of k terms of at most cells + 3 roundings each, both of them, and twice for good measure.
 */
export function slackOfSquares(live: LiveTable, { asDoubles }: ScoredResponses): number {
  const largest = asDoubles.reduce((most, x) => Math.max(most, x), 0);
  return 4 * 2 ** -53 * (2 * live.rows * live.columns + 8) * largest * largest * live.total;
}
