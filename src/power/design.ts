// What is planned: groups of given sizes, the probabilities of their outcomes, a test and its level.
import type { Rational } from '../numeric/rational.js';

export const twoGroupTests = ['conditional', 'mid', 'unconditional'] as const;
export type TwoGroupTest = (typeof twoGroupTests)[number];

export const powerOrders = ['score', 'wald', 'conditional-p'] as const;
export type PowerOrder = (typeof powerOrders)[number];

export type PowerTail = 'upper' | 'lower' | 'both';
export type PowerRule = 'distance' | 'probability' | 'doubled';

/** How a table of two groups will be tested. */
export interface TwoGroupTesting {
  readonly test: TwoGroupTest;
  /** What makes an outcome extreme, for the unconditional test; conditional ones order by the difference. */
  readonly order: PowerOrder;
  readonly tail: PowerTail;
  /** null with one tail. */
  readonly rule: PowerRule | null;
  /** Reject where p <= alpha; as written, so that a p of exactly alpha is told from its neighbours. */
  readonly alpha: Rational;
}

export interface Sizes {
  readonly first: number;
  readonly second: number;
}

/** True outcomes of a two-group study: inside[x1 * (second + 1) + x2] is 1 where the test rejects. */
export interface RejectionRegion extends Sizes {
  readonly inside: Uint8Array;
}
