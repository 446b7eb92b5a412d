// Tails of the laws of events in the first group as whole numbers over C(n, t): for the comparisons that doubles cannot make.

interface Tail {
  /** Events in both groups. */
  readonly events: number;
  /** All first-group counts up to `low`, and all from `high` on. */
  readonly low: number;
  readonly high: number;
}

export class WholeTails {
  private readonly rows = new Map<number, bigint[]>();

  constructor(
    private readonly firstSize: number,
    private readonly secondSize: number,
  ) {}

  /** Sign of p(one) - p(other). */
  compare(one: Tail, other: Tail): number {
    if (one.events === other.events && one.low === other.low && one.high === other.high) return 0;
    const whole = this.row(this.firstSize + this.secondSize);
    const apart = this.sum(one) * whole[other.events]! - this.sum(other) * whole[one.events]!;
    return apart > 0n ? 1 : apart < 0n ? -1 : 0;
  }

  /** Sign of P(x) - P(y), both counts of the first group with t events in all. */
  compareWeights(x: number, y: number, events: number): number {
    if (this.firstSize === this.secondSize && x + y === events) return 0;
    const apart = this.weight(x, events) - this.weight(y, events);
    return apart > 0n ? 1 : apart < 0n ? -1 : 0;
  }

  private weight(x: number, events: number): bigint {
    return this.row(this.firstSize)[x]! * this.row(this.secondSize)[events - x]!;
  }

  private sum({ events, low, high }: Tail): bigint {
    const lowest = Math.max(0, events - this.secondSize);
    const highest = Math.min(this.firstSize, events);
    let sum = 0n;
    for (let x = lowest; x <= Math.min(low, highest); x++) sum += this.weight(x, events);
    for (let x = Math.max(high, low + 1, lowest); x <= highest; x++) sum += this.weight(x, events);
    return sum;
  }

  /** C(n, 0), ..., C(n, n). */
  private row(n: number): bigint[] {
    let row = this.rows.get(n);
    if (row === undefined) {
      row = [1n];
      for (let k = 1; k <= n; k++) row.push((row[k - 1]! * BigInt(n - k + 1)) / BigInt(k));
      this.rows.set(n, row);
    }
    return row;
  }
}
