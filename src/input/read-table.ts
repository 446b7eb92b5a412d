// What every input form hands on: the same Table, and how it was read.
import type { LevelRecord } from './level-changes.js';
import type { Table } from '../table/table.js';

export type Delimiter = 'comma' | 'semicolon' | 'tab' | 'pipe';

export interface SourceFacts {
  readonly form: 'inline' | 'cross-table' | 'records' | 'library';
  readonly delimiter?: Delimiter;
  readonly headerRow?: boolean;
  readonly labelColumn?: boolean;
  /** Which total lines were left out of a cross-table. */
  readonly totalsLeftOut?: readonly ('row' | 'column')[];
  /** Records: header names of the columns used. */
  readonly rowsFrom?: string;
  readonly columnsFrom?: string;
  readonly countFrom?: string | null;
  /** What tells the strata apart: a column of records, or the name given to the blocks of a cross-table. */
  readonly strataFrom?: string | null;
  /** Records: the column that names the cluster of each. */
  readonly clusterFrom?: string;
}

export interface MissingFacts {
  readonly rule: 'drop' | 'level' | 'fail';
  readonly records: number;
  readonly missingRow: number;
  readonly missingColumn: number;
  readonly missingBoth: number;
  /** Records with row and column but no stratum; only where strata were asked for. */
  readonly missingStratum?: number;
  /** Records with row, column and stratum but no cluster; only where clusters were asked for. */
  readonly missingCluster?: number;
  /** Total of the counts of the records left out. */
  readonly dropped: number;
}

export interface InputNote {
  readonly code: string;
  readonly text: string;
}

/** One stratum: counts[row][column] over all lines of the pooled table, so that levels are shared. */
export interface StratumTable {
  readonly label: string;
  readonly counts: readonly (readonly number[])[];
}

/** Units that belong together and lie in one row: a litter, a plate, a household. */
export interface Cluster {
  readonly label: string;
  /** Index of its row. */
  readonly row: number;
  /** Its counts by column. */
  readonly counts: readonly number[];
}

export interface ReadTable {
  /** With strata: all of them together. */
  readonly table: Table;
  readonly strata?: readonly StratumTable[];
  readonly clusters?: readonly Cluster[];
  readonly source: SourceFacts;
  /** SHA-256 of the bytes read, in hexadecimal; null for counts that were typed in or passed by a program. */
  readonly sha256: string | null;
  /** Records only. */
  readonly missing: MissingFacts | null;
  readonly notes: readonly InputNote[];
  /** Levels merged, kept or dropped; left out where none were. */
  readonly levels?: LevelRecord;
}
