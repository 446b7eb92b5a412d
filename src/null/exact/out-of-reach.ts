// Thrown when exact work turns out to need more than it may have; callers sample instead, or end with a problem that says why.

export type Bound =
  /** More would have to be held at once than memory is allowed for. */
  | 'memory'
  /** More counted units than the bound on exact work; `units` had been spent. */
  | 'effort'
  /** A certified bracket is no narrower than draws worth the same units would make it. */
  | 'width';

export class OutOfReach extends Error {
  constructor(
    readonly bound: Bound,
    /** Counted units spent, or the limit of entries passed. */
    readonly amount: number,
  ) {
    super(`exact work is out of reach: ${bound} (${amount})`);
  }
}
