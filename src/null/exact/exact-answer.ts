// What an exact engine hands back, and how masses become a cut.
import { WideSum } from '../../numeric/wide-number.js';
import type { ExactCut, Mass, OrderingName } from '../contract.js';

export interface ExactAnswer<C = ExactCut> {
  readonly cuts: readonly C[];
  /** Probability of the observed table itself. */
  readonly point: Mass;
  /** Number of tables with these margins, where the engine met every one. */
  readonly tables?: number;
}

export interface Masses {
  readonly below: WideSum;
  readonly tied: WideSum;
  readonly above: WideSum;
  readonly whole: WideSum;
}

/** Divides each mass by the whole; `atLeast` is added before it is rounded. */
export function cutFrom(ordering: OrderingName, masses: Masses, relativeError: number): ExactCut {
  const { below, tied, above, whole } = masses;
  const atLeast = new WideSum();
  atLeast.addSum(above);
  atLeast.addSum(tied);
  return {
    kind: 'exact',
    ordering,
    below: below.over(whole),
    tied: tied.over(whole),
    above: above.over(whole),
    // Nothing below: all of the law is at least as extreme, whatever the last bit of the sums says.
    atLeast: below.isZero ? { value: 1, log10: 0 } : atLeast.over(whole),
    relativeError,
  };
}
