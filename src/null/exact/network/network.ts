// What one exact computation walks on: the table turned, its statistic in whole numbers, weights, bounds and nodes.
// The columns are cut in two halves; each half's partial tables are listed node by node, and the halves meet where the row
// sums of one complete those of the other (meet in the middle on the network of Mehta & Patel 1983).
import type { Meter } from '../meter.js';
import type { Encoding } from './encoding.js';
import type { SummedSide } from './level.js';
import type { NodeSpace } from './node-space.js';
import type { OrientedTable } from './oriented-table.js';
import type { RestBounds } from './rest-bounds.js';
import type { SortedList } from './sorted-list.js';
import type { ColumnTerms, Transitions } from './transitions.js';
import type { Weights } from './weights.js';

export interface Network {
  readonly table: OrientedTable;
  readonly encoding: Encoding;
  readonly weights: Weights;
  readonly bounds: RestBounds;
  /** Numbers the nodes whose lists are kept. */
  readonly space: NodeSpace;
  readonly columns: readonly ColumnTerms[];
  /** Lists do not depend on the order of rows, and one list serves every arrangement of a node. */
  readonly allAlike: boolean;
  readonly side: SummedSide;
  /** Nodes less probable than exp(logFloor) are left out; their mass is added up and stated as error. */
  readonly logFloor: number;
  /** The observed value is so far up that partial tables can be certain to stay below it: upper bounds are worth their time. */
  readonly farUp: boolean;
  /** Values are decided with this much room: the encoding's slack and the rounding of the bounds. */
  readonly margin: number;
  /** Working space, used for one node after the other. */
  readonly list: SortedList;
  readonly transitions: Transitions;
  /** Most list entries that may be held at once. */
  readonly entryLimit: number;
  readonly meter: Meter;
}
