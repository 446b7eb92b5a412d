// Many p-values at once: each raised so that it speaks for its whole family. Adjusted values are the smallest level at which the
// named procedure rejects, so that they can be compared with any level (Wright 1992).

/** Named as in the literature: family-wise error (the first four), false discovery rate (the others). */
export const adjustments = [
  'bonferroni',
  'holm',
  'hochberg',
  'tarone',
  'benjamini-hochberg',
  'benjamini-yekutieli',
  'gilbert',
] as const;
export type Adjustment = (typeof adjustments)[number];

/** Those that use what each table could have attained. */
export const discreteAdjustments: readonly Adjustment[] = ['tarone', 'gilbert'];

export interface FamilyMember {
  /** In [0, 1]. */
  readonly p: number;
  /** The least p that its margins allow; 0 where that is not known. */
  readonly leastAttainable: number;
}

/**
 * One adjusted value for each member, in their order, in [0, 1]. O(m log m).
 * @param alpha read by `gilbert` alone, which picks the members that could reach it; members left out have null.
 */
export function adjusted(family: readonly FamilyMember[], method: Adjustment, alpha: number): (number | null)[] {
  const p = family.map((member) => member.p);
  const m = p.length;
  switch (method) {
    case 'bonferroni': // Dunn (1961)
      return p.map((each) => Math.min(1, m * each));
    case 'holm': // Holm (1979)
      return stepDown(p, (rank) => m - rank);
    case 'hochberg': // Hochberg (1988)
      return stepUp(p, (rank) => m - rank);
    case 'benjamini-hochberg': // Benjamini & Hochberg (1995)
      return stepUp(p, (rank) => m / (rank + 1));
    case 'benjamini-yekutieli': {
      // Benjamini & Yekutieli (2001)
      const harmonic = p.reduce((sum, _, k) => sum + 1 / (k + 1), 0);
      return stepUp(p, (rank) => (m * harmonic) / (rank + 1));
    }
    case 'tarone':
      return tarone(family);
    case 'gilbert':
      return gilbert(family, alpha);
  }
}

const byP = (p: readonly number[]): number[] => [...p.keys()].sort((a, b) => p[a]! - p[b]!);

/** From the smallest up, never falling. `factor` of the rank from 0. */
function stepDown(p: readonly number[], factor: (rank: number) => number): number[] {
  const out = new Array<number>(p.length);
  let most = 0;
  byP(p).forEach((member, rank) => {
    most = Math.max(most, Math.min(1, factor(rank) * p[member]!));
    out[member] = most;
  });
  return out;
}

/** From the largest down, never rising. */
function stepUp(p: readonly number[], factor: (rank: number) => number): number[] {
  const out = new Array<number>(p.length);
  const order = byP(p);
  let least = 1;
  for (let rank = order.length - 1; rank >= 0; rank--) {
    const member = order[rank]!;
    least = Math.min(least, factor(rank) * p[member]!);
    out[member] = least;
  }
  return out;
}

/**
 * Tarone (1990) in a form that never rejects less at a larger level: p times the number of members that could have attained p.
 * P(some true null has p <= t) <= t x #{least attainable <= t}, since a member that cannot attain t adds nothing; that product
 * rises with t, so comparing it with any alpha holds the family-wise error.
 */
function tarone(family: readonly FamilyMember[]): number[] {
  const least = family.map((member) => member.leastAttainable).sort((a, b) => a - b);
  return family.map(({ p }) => Math.min(1, p * countUpTo(least, p)));
}

/** Entries of a rising list that are at most x, by halving. */
function countUpTo(rising: readonly number[], x: number): number {
  let [low, high] = [0, rising.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (rising[middle]! <= x) low = middle + 1;
    else high = middle;
  }
  return low;
}

/**
 * Gilbert (2005): members that could reach alpha / K, K the smallest k with #{least attainable <= alpha / k} <= k (Tarone 1990),
 * then Benjamini & Hochberg (1995) among them.
 */
function gilbert(family: readonly FamilyMember[], alpha: number): (number | null)[] {
  const least = family.map((member) => member.leastAttainable).sort((a, b) => a - b);
  let k = 1;
  while (countUpTo(least, alpha / k) > k) k++;
  const within = [...family.keys()].filter((member) => family[member]!.leastAttainable <= alpha / k);
  const values = stepUp(
    within.map((member) => family[member]!.p),
    (rank) => within.length / (rank + 1),
  );
  const out = new Array<number | null>(family.length).fill(null);
  within.forEach((member, place) => (out[member] = values[place]!));
  return out;
}
