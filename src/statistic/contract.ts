// What a statistic is to the rest of the program: a name, words, and - bound to one table's margins - a number for any
// table with those margins plus an exact comparison with the observed one.
import type { LiveTable } from '../table/live-table.js';

export type Sided = 'upper' | 'signed';
export type Side = 'rows' | 'columns';

/** Place of a table relative to the observed one on some ordering: less extreme, exactly as extreme, more extreme. */
export type Place = -1 | 0 | 1;

/**
 * Which lines are groups and what counts as the event, as indexes into the live table. Only 2x2 statistics read it.
 * `event` is a line of the side that is not `groups`; `first` is the group whose proportion comes first.
 */
export interface Roles {
  readonly groups: Side;
  readonly event: number;
  readonly first: number;
}

/**
 * A quantity that rises (or falls) with a statistic and is a sum over cells: S(table) = sum cell(i, j, n_ij).
 * |fl(S) - S| for any table plus the same for the observed one is at most `slack` whenever the two lie within `slack`:
 * a difference beyond it is certain, one within it is settled by `decide`. slack 0 means the sum is exact.
 */
export interface CellSum {
  cell(row: number, column: number, count: number): number;
  /** S of the observed table, added in row-major order. */
  readonly observed: number;
  readonly slack: number;
  /** Exact sign of S(table) - S(observed); slow, called for near ties only. Counts row-major over the live table. */
  decide(counts: ArrayLike<number>): Place;
}

/** A statistic bound to the margins (and the observed table) of one live table with at least two rows and columns. */
export interface BoundStatistic {
  /** The statistic's value, in its own units. May be +-Infinity for signed ones. */
  value(counts: ArrayLike<number>): number;
  /** Upper statistics: the statistic itself or an increasing transform of it, as a sum over cells. */
  readonly sum?: CellSum;
  /** Signed 2x2 statistics: exact sign of |T(table) - centre| - |T(observed) - centre|. */
  distance?(counts: ArrayLike<number>): Place;
  /** Signed 2x2 statistics: the cell (first group, event), with which T strictly rises. Row-major index. */
  readonly corner?: number;
}

export interface Statistic {
  readonly name: string;
  readonly sided: Sided;
  /** `any`: r x c; `2x2`: two live groups and two live outcomes. */
  readonly shape: 'any' | '2x2';
  /** Plain words for a sentence, e.g. "Pearson's chi-square statistic". */
  readonly words: string;
  readonly formula: string;
  readonly range: string;
  readonly source: string;
  bind(live: LiveTable, roles: Roles): BoundStatistic;
}
