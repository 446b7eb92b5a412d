// Goodness of fit of counted draws, and the threshold that a whole suite of such tests is held to.
import { chiSquareUpperTail } from '../../../../src/numeric/chi-square-tail.js';

/** Expected draws that a class needs for the chi-square law to hold far into its tail; smaller ones are pooled. */
const leastExpected = 25;

/**
 * Probability, under the law, of a chi-square at least as large as that of the observed frequencies (Pearson 1900).
 * @param probabilities of each class; adds up to 1. @param observed draws in each class.
 */
export function fit(probabilities: ArrayLike<number>, observed: ArrayLike<number>): number {
  let draws = 0;
  for (let k = 0; k < observed.length; k++) draws += observed[k]!;
  const order = Array.from({ length: probabilities.length }, (_, k) => k);
  order.sort((a, b) => probabilities[a]! - probabilities[b]!);
  const classes: { expected: number; seen: number }[] = [{ expected: 0, seen: 0 }];
  for (const k of order) {
    let last = classes.at(-1)!;
    if (last.expected >= leastExpected) classes.push((last = { expected: 0, seen: 0 }));
    last.expected += draws * probabilities[k]!;
    last.seen += observed[k]!;
  }
  if (classes.length < 2) throw new Error('a single class tells nothing');
  const chiSquare = classes.reduce((sum, { expected, seen }) => sum + (seen - expected) ** 2 / expected, 0);
  return chiSquareUpperTail(chiSquare, classes.length - 1).p;
}

export interface Verdict {
  readonly name: string;
  readonly p: number;
}

/** Those of a family of tests that Holm (1979) rejects at a family level. */
export function rejectedByHolm(verdicts: readonly Verdict[], level: number): Verdict[] {
  const sorted = [...verdicts].sort((a, b) => a.p - b.p);
  const first = sorted.findIndex(({ p }, k) => p * (sorted.length - k) > level);
  return first < 0 ? sorted : sorted.slice(0, first);
}
