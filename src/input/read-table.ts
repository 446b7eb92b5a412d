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
}

export interface MissingFacts {
  readonly rule: 'drop' | 'level' | 'fail';
  readonly records: number;
  readonly missingRow: number;
  readonly missingColumn: number;
  readonly missingBoth: number;
  /** Total of the counts of the records left out. */
  readonly dropped: number;
}

export interface InputNote {
  readonly code: string;
  readonly text: string;
}

export interface ReadTable {
  readonly table: Table;
  readonly source: SourceFacts;
  /** SHA-256 of the bytes read, in hexadecimal; null for counts that were typed in or passed by a program. */
  readonly sha256: string | null;
  /** Records only. */
  readonly missing: MissingFacts | null;
  readonly notes: readonly InputNote[];
  /** Levels merged, kept or dropped; left out where none were. */
  readonly levels?: LevelRecord;
}
