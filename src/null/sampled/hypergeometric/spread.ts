// Where a hypergeometric count lies and how far it strays: the law of every block of a table with fixed margins.
// `total` units, `marked` of them marked, `drawn` of them taken without replacement; the count is of marked units taken.

export const leastOf = (total: number, marked: number, drawn: number): number => Math.max(0, marked + drawn - total);
export const mostOf = (marked: number, drawn: number): number => Math.min(marked, drawn);

/** Variance of the count; 0 when it has one value only. The arguments may be means, then it is an estimate. */
export function varianceOf(total: number, marked: number, drawn: number): number {
  if (total <= 1) return 0;
  return drawn * (marked / total) * ((total - marked) / total) * ((total - drawn) / (total - 1));
}

/** A mode, clipped to the support. For totals near 2^53 the product is rounded: the answer is then a point beside it. */
export function modeOf(total: number, marked: number, drawn: number): number {
  const mode = Math.floor((drawn + 1) * ((marked + 1) / (total + 2)));
  return Math.max(leastOf(total, marked, drawn), Math.min(mode, mostOf(marked, drawn)));
}

/** Consecutive whole numbers. */
export interface Range {
  readonly from: number;
  readonly length: number;
}

export interface Spread {
  readonly mean: number;
  readonly deviation: number;
}

export const spreadOf = (total: number, marked: number, drawn: number): Spread => ({
  mean: drawn * (marked / total),
  deviation: Math.sqrt(varianceOf(total, marked, drawn)),
});

/** The whole numbers within so many deviations of the mean, and one more on each side. */
export function rangeAround({ mean, deviation }: Spread, deviations: number): Range {
  const from = Math.floor(mean - deviations * deviation) - 1;
  return { from, length: Math.ceil(mean + deviations * deviation) + 1 - from + 1 };
}
