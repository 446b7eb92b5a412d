// Words and shapes of drawing until it is settled: what a stopping rule is told, what it answers, what it knows so far.
// Counts go in, numbers come out; nothing here draws, and nothing depends on anything but the counts and their order.

/** Why drawing stopped. */
export const stopReasons = ['settled-below', 'settled-above', 'precise-enough', 'limit'] as const;
export type StopReason = (typeof stopReasons)[number];

export type Decision = { readonly stop: false } | { readonly stop: true; readonly because: StopReason };

/** The rule, as results name it; `ruleWords` says it in full, with its sources. */
export const sequentialRule = 'beta-binomial-mixture';

export const ruleWords =
  'limits that hold at every look at once, from a mixture of beta-binomial laws ' +
  '(Darling & Robbins 1967; Robbins 1970; Howard, Ramdas, McAuliffe & Sekhon 2021)';

export interface SequenceOptions {
  /** The level that p is compared with, in (0, 1). */
  readonly alpha: number;
  /**
   * Probability that any look at all, ever, shows an interval without the true p in it; above 0, below alpha. The reported p
   * is the upper limit plus this risk, so a true p within `risk` below alpha cannot be settled, while a smaller risk
   * asks for wider limits. alpha / 100 balances the two: alpha / 50 would take 17% more draws at p = 0.9 alpha and
   * save 7% at p = 1.1 alpha, alpha / 500 would save nothing at 0.9 alpha and take 16% more at 1.1 alpha.
   */
  readonly risk: number;
  /**
   * Half the interval over its middle at which p counts as precise enough, in [0, 1); 0: never. For a true p of exactly
   * alpha this is what ends the run: 0.02 takes 1.1 million draws at alpha = 0.05, 0.05 takes 170,000.
   */
  readonly targetRelativeError: number;
  /** Most draws to make, at least one block. Drawing ends with the last whole block that fits. */
  readonly limit: number;
  /** Draws between two looks. */
  readonly blockSize: number;
}

/** What is known after the blocks added so far; valid wherever the drawing stops, and also where it does not. */
export interface SequenceState {
  readonly rule: typeof sequentialRule;
  /** 1 - risk: the probability that all intervals ever shown hold the true p. */
  readonly level: number;
  readonly risk: number;
  /** Draws at least as extreme as the observed table; the smaller of the two tails for the doubled rule. */
  readonly atLeast: number;
  readonly draws: number;
  /** atLeast / draws, for the doubled rule twice that, at most 1. Not free of bias under a stopping rule. */
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
  /** upper + risk, at most 1: P(p <= a) <= a for every a under the null, whatever the stopping rule. */
  readonly p: number;
  /**
   * More draws that would settle p against alpha if the share seen so far were the true one; 0 when it is settled, null
   * when that share lies where no number of draws settles it (from alpha - risk to alpha).
   */
  readonly drawsToSettle: number | null;
  /** For the doubled rule: draws at least as extreme in each tail. */
  readonly tails?: { readonly upper: number; readonly lower: number };
}

export interface Sequence {
  /**
   * One more block: of `draws` tables (at most a block), `atLeast` were at least as extreme. One call for each block and
   * in their order, so that the looks are the same for any number of threads. May go on after a stop.
   */
  add(atLeast: number, draws: number): Decision;
  /** @throws RangeError before the first block */
  state(): SequenceState;
}

export interface DoubledSequence {
  add(atLeast: { readonly upper: number; readonly lower: number }, draws: number): Decision;
  state(): SequenceState;
}
