// A whole 2x2 table, empty lines kept, with what its lines mean.
import type { Roles } from '../../statistic/contract.js';

/** cells[row][column]; roles as indexes into the whole table. */
export interface TwoByTwoCounts extends Roles {
  readonly cells: readonly (readonly number[])[];
}
