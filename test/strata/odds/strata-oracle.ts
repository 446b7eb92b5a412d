// The slow oracle for strata of 2x2 tables: every set of tables with these margins, weighed in whole numbers. It shares no code with src.
import { factorial } from '../../../fixtures/reference/generator/oracle.js';

export type Counts = readonly (readonly number[])[];

/** Corner counts of one stratum with the ways to get each. */
export function cornersOf([[a, b], [c, d]]: Counts): [corner: number, ways: bigint][] {
  const [first, second, events] = [a! + b!, c! + d!, a! + c!];
  const choose = (n: number, k: number): bigint =>
    k < 0 || k > n ? 0n : factorial(n) / (factorial(k) * factorial(n - k));
  return Array.from({ length: events + 1 }, (_, k): [number, bigint] => [
    k,
    choose(first, k) * choose(second, events - k),
  ]).filter(([, ways]) => ways > 0n);
}

/** Ways to reach each sum of corners. */
export function lawOf(strata: readonly Counts[]): Map<number, bigint> {
  let law = new Map([[0, 1n]]);
  for (const stratum of strata) {
    const next = new Map<number, bigint>();
    for (const [sum, ways] of law) {
      for (const [corner, own] of cornersOf(stratum))
        next.set(sum + corner, (next.get(sum + corner) ?? 0n) + ways * own);
    }
    law = next;
  }
  return law;
}

export interface Cut {
  below: bigint;
  tied: bigint;
  above: bigint;
  whole: bigint;
}

export function cutOf(strata: readonly Counts[], ordering: 'upper' | 'lower' | 'distance' | 'probability'): Cut {
  const law = lawOf(strata);
  const observed = strata.reduce((sum, [row]) => sum + row![0]!, 0);
  // |s - E| times the product of all totals.
  const totals = strata.map((one) => BigInt(one.flat().reduce((x, y) => x + y, 0)));
  const all = totals.reduce((x, y) => x * y, 1n);
  const mean = strata.reduce(
    (sum, [[a, b], [c]]: Counts, k) => sum + (BigInt(a! + b!) * BigInt(a! + c!) * all) / totals[k]!,
    0n,
  );
  const size = (x: bigint): bigint => (x < 0n ? -x : x);
  const extremeness = {
    upper: (s: number) => BigInt(s),
    lower: (s: number) => -BigInt(s),
    distance: (s: number) => size(BigInt(s) * all - mean),
    probability: (s: number) => -law.get(s)!,
  }[ordering];
  const cut: Cut = { below: 0n, tied: 0n, above: 0n, whole: 0n };
  for (const [sum, ways] of law) {
    const [ours, target] = [extremeness(sum), extremeness(observed)];
    cut[ours > target ? 'above' : ours < target ? 'below' : 'tied'] += ways;
    cut.whole += ways;
  }
  return cut;
}

/** Zelen (1971): given also the sum of the corners, sets of tables no more probable than the observed one. */
export function zelenOf(strata: readonly Counts[]): Cut {
  const observed = strata.reduce((sum, [row]) => sum + row![0]!, 0);
  const target = strata.reduce((all, one) => all * cornersOf(one).find(([corner]) => corner === one[0]![0])![1], 1n);
  const cut: Cut = { below: 0n, tied: 0n, above: 0n, whole: 0n };
  const visit = (k: number, left: number, ways: bigint): void => {
    if (k === strata.length) {
      if (left !== 0) return;
      cut[ways < target ? 'above' : ways > target ? 'below' : 'tied'] += ways;
      cut.whole += ways;
      return;
    }
    for (const [corner, own] of cornersOf(strata[k]!)) visit(k + 1, left - corner, ways * own);
  };
  visit(0, observed, 1n);
  return cut;
}
