// Counts exact work as it is done, in the units of forecast.ts: ends it where it goes past its bound, and tells now and then
// how far it is. Units follow from the table alone, so that work ends at the same place on every machine.
import { OutOfReach } from './out-of-reach.js';

/** Units between two reports of progress: some thirty milliseconds. */
const reportEvery = 2 ** 20;

export class Meter {
  spent = 0;
  private next: number;

  /** @param onWork told how many units are spent; called while the work goes on, and must not take long. */
  constructor(
    readonly most = Infinity,
    private readonly onWork?: (units: number) => void,
  ) {
    this.next = Math.min(most, reportEvery);
  }

  spend(units: number): void {
    this.spent += units;
    if (this.spent > this.next) this.look();
  }

  private look(): void {
    if (this.spent > this.most) throw new OutOfReach('effort', this.spent);
    this.onWork?.(this.spent);
    this.next = Math.min(this.most, this.spent + reportEvery);
  }
}
