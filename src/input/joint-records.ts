// Raw records of subjects to counts of groups by outcome profiles.
import { noData } from './cross-table-problems.js';
import type { JointCounts } from './joint-counts.js';
import { JointTally, type JointNames } from './joint-tally.js';
import type { InputNote } from './read-table.js';
import { noRecords, noRecordsLeft } from './record-problems.js';
import { walk, type RecordOptions } from './records.js';

export interface JointRead {
  readonly joint: JointCounts;
  readonly sha256: string;
  readonly rule: 'fail' | 'drop' | 'level';
  readonly records: number;
  /** Counts of subjects left out because a value was missing. */
  readonly dropped: number;
  readonly notes: readonly InputNote[];
}

export type JointRecordOptions = Omit<RecordOptions, 'rows' | 'columns' | 'totals'> & JointNames;

/** @throws Problem: those of readRecords, and `too-many-profiles`. */
export async function readJointRecords(
  chunks: AsyncIterable<Uint8Array>,
  options: JointRecordOptions,
): Promise<JointRead> {
  const { sourceName, missing: rule = 'fail', groups, outcomes } = options;
  const tally = new JointTally(options, rule, sourceName);
  const { sha256, notes } = await walk(chunks, { ...options, rows: groups, columns: outcomes[0]! }, tally);
  if (tally.used === undefined) throw noData(sourceName);
  if (tally.records === 0) throw noRecords(sourceName);
  const joint = tally.joint();
  if (joint.profiles.length === 0) throw noRecordsLeft(tally.records, sourceName);
  return { joint, sha256, rule, records: tally.records, dropped: tally.dropped + tally.incomplete, notes };
}
