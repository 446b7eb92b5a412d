// The spine of a replay: every record of a file made again, and what came out the same.
import { createHash } from 'node:crypto';
import type { ReplayReport } from './result/replay-declaration.js';
import type { Found } from './record/records-in.js';
import { replay, type ReplaySettings } from './record/replay.js';
import { version } from './result/version.js';

export interface ReplayWishes extends ReplaySettings {
  /** Bytes of the data file that the record is said to come from. */
  readonly against?: AsyncIterable<Uint8Array>;
  readonly onProgress?: (done: number) => void;
}

/** Error lines are counted and passed over. @throws Problem: those of `replay`. */
export async function replayRecords(records: AsyncIterable<Found>, wishes: ReplayWishes = {}): Promise<ReplayReport> {
  const differing: ReplayReport['differing'] = [];
  let [all, passedOver] = [0, 0];
  let recorded: string | null = null;
  for await (const { record, place } of records) {
    if (isPartEnd(record)) continue;
    if (isErrorLine(record)) {
      passedOver++;
      continue;
    }
    const { key, madeWith, differences, sha256 } = await replay(record, place, wishes);
    all++;
    recorded ??= sha256;
    if (differences.length > 0) differing.push({ key, madeWith, differences: differences.map((one) => ({ ...one })) });
    wishes.onProgress?.(all);
  }
  const sha256 = wishes.against === undefined ? undefined : await digestOf(wishes.against);
  return {
    schema: 'keepsum/replay/1',
    tool: { name: 'keepsum', version },
    records: all,
    same: all - differing.length,
    passedOver,
    differing,
    ...(sha256 === undefined ? {} : { against: { sha256, recorded, same: sha256 === recorded } }),
  };
}

/** What ends a part of a batch is no result. */
const isPartEnd = (record: unknown): boolean =>
  typeof record === 'object' && record !== null && 'part' in record && 'run' in record && !('pValues' in record);

const isErrorLine = (record: unknown): boolean =>
  typeof record === 'object' && record !== null && 'error' in record && !('pValues' in record);

async function digestOf(bytes: AsyncIterable<Uint8Array>): Promise<string> {
  const hash = createHash('sha256');
  for await (const piece of bytes) hash.update(piece);
  return hash.digest('hex');
}

/** Whether anything is not as recorded. */
export const differs = ({ differing, against }: ReplayReport): boolean =>
  differing.length > 0 || against?.same === false;
