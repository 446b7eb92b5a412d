// Masses on the three sides of the observed value, as they are found; one of the two outer sides is not added up.
import { WideSum } from '../../../numeric/wide-number.js';

export class Tally {
  /** Weight on the summed side, and level with the observed value. */
  readonly summed = new WideSum();
  readonly tied = new WideSum();
  /** Chance of what was left out. */
  leftOut = 0;
}
