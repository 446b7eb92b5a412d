// What a statistic is to the rest of the program: a name, words, and - bound to one table's margins - a number for any
// table with those margins plus an exact comparison with the observed one.
import type { Rational } from '../numeric/rational.js';
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

/** Settings that some statistics read, in exact form; what is left out has its default. Scores: one for each live line. */
export interface Choices {
  readonly rowScores?: readonly Rational[];
  readonly columnScores?: readonly Rational[];
  readonly lambda?: Rational;
  /** For statistics of scored responses: the side of the groups, and a score for each live line of the other side. */
  readonly groups?: Side;
  readonly responseScores?: readonly Rational[];
}

/** Options that only some statistics take. */
export type Taken = 'roles' | 'scores' | 'lambda' | 'groups' | 'response-scores';

/**
 * S = sum u_i v_j n_ij over whole scores, of which a signed statistic is an increasing linear function. Every S, and
 * every part of one, is a whole number below 2^51.
 */
export interface LinearForm {
  /** One for each live row, each live column: whole, the smallest 0, without a common divisor. */
  readonly rowScores: Float64Array;
  readonly columnScores: Float64Array;
  /** S of the observed table. */
  readonly observed: number;
  /** The two values level with the observed one in distance from the centre, low <= high: inside them is nearer, outside is
   *  further. Where the mirrored one is no whole number it stands on the half between its neighbours. */
  readonly low: number;
  readonly high: number;
}

/** A form of a signed statistic that is standard normal for large counts. */
export interface StandardisedForm {
  readonly name: string;
  readonly value: number;
}

/**
 * What the cells of a table may hold, row-major, for a statistic that is a largest over cells: a table is above the
 * observed one when some count lies outside [lowest, highest]; else level with it when some count ties; else below it.
 */
export interface CellLimits {
  readonly lowest: Float64Array;
  readonly highest: Float64Array;
  /** 1 where a count at that limit ties with the observed table. */
  readonly lowestTies: Uint8Array;
  readonly highestTies: Uint8Array;
}

/** A statistic bound to the margins (and the observed table) of one live table with at least two rows and columns. */
export interface BoundStatistic {
  /** The statistic's value, in its own units. May be +-Infinity for signed ones. */
  value(counts: ArrayLike<number>): number;
  /** The statistic itself or an increasing transform of it, as a sum over cells. */
  readonly sum?: CellSum;
  /** Statistics that are no exact sum over cells: exact sign of T(table) - T(observed). */
  place?(counts: ArrayLike<number>): Place;
  /** Signed statistics whose fall is not their rise turned round: exact sign of fall(table) - fall(observed). */
  placeLower?(counts: ArrayLike<number>): Place;
  /** Upper statistics that are a largest over cells. */
  readonly limits?: CellLimits;
  /** Signed statistics: exact sign of |T(table) - centre| - |T(observed) - centre|. */
  distance?(counts: ArrayLike<number>): Place;
  /** Signed statistics of an r x c table, where the scores are small enough: the whole-number sum behind it. */
  readonly linear?: LinearForm;
  /** Signed statistics: forms with a normal limit, the usual one first. Left out: the value itself is one. */
  readonly standardised?: readonly StandardisedForm[];
  /** Upper statistics with a chi-square limit on other degrees of freedom than (rows - 1)(columns - 1). */
  readonly degreesOfFreedom?: number;
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
  /** Law that it follows for large counts: chi-square on (rows - 1)(columns - 1) degrees of freedom, standard normal, or
   *  none of its own. */
  readonly limit: 'chi-square' | 'normal' | 'none';
  /** Not one of ours: known by its values alone. */
  readonly own?: true;
  /** Scores of the responses where none are declared, for statistics that take response scores. */
  readonly standardResponseScores?: 'midranks' | 'places';
  /** Options that it reads. */
  readonly takes?: readonly Taken[];
  /** Named forms with a normal limit beside the statistic itself, with their words. */
  readonly forms?: readonly { readonly name: string; readonly words: string; readonly source: string }[];
  bind(live: LiveTable, roles: Roles, choices?: Choices): BoundStatistic;
}
