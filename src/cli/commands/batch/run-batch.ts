// A batch from its first unit to its last: what was finished before is passed over, the rest answered, written and counted.
import { createHash, type Hash } from 'node:crypto';
import { textOf, unitsIn, type Style, type UnitSource } from '../../../batch/chunk.js';
import type { BatchSettings } from '../../../batch/answer-table.js';
import { answerInOrder } from '../../../batch/in-order.js';
import { otherInput } from './resume-problems.js';
import type { Progress, Sink } from './sink.js';

export interface BatchWork {
  readonly source: UnitSource;
  readonly settings: BatchSettings;
  readonly style: Style;
  readonly threads: number;
  readonly sink: Sink;
  /** Written before the first line of a new run. */
  readonly header: string;
  readonly from: Progress;
  /** Of a batch's part: what is written behind its last line. */
  readonly closing?: ((reached: Progress) => string) | undefined;
  /** The file whose unfinished run is gone on with. */
  readonly path: string | undefined;
  onProgress(tables: number): void;
}

/** @returns the counts of the whole run; undefined where nobody reads on. */
export async function runBatch(work: BatchWork): Promise<Progress | undefined> {
  const { source, sink, from } = work;
  const hash = createHash('sha256');
  await passOver(source, from, hash, work.path);
  let reached: Progress = from;
  if (work.header !== '' && !(await sink.write(work.header, from))) return undefined;
  for await (const done of answerInOrder(work)) {
    hash.update(textOf(done.chunk));
    reached = {
      units: reached.units + unitsIn(done.chunk),
      input: hash.copy().digest('hex'),
      tables: reached.tables + done.tables,
      faults: reached.faults + done.faults,
    };
    if (!(await sink.write(done.text, reached))) return undefined;
    work.onProgress(reached.tables);
  }
  if (work.closing === undefined || from.closed) return reached;
  return (await sink.write(work.closing(reached), { ...reached, closed: true })) ? reached : undefined;
}

/** Reads what a run had read before, and sees to it that it is the same. */
async function passOver(source: UnitSource, from: Progress, hash: Hash, path: string | undefined): Promise<void> {
  let left = from.units;
  while (left > 0) {
    const chunk = await source.next(left);
    if (chunk === null) throw otherInput(path!, from.units);
    left -= unitsIn(chunk);
    hash.update(textOf(chunk));
  }
  if (from.units > 0 && hash.copy().digest('hex') !== from.input) throw otherInput(path!, from.units);
}
