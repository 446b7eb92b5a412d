// Where the lines of a batch go, and what is known of a run that goes on: a stream, or a file that takes its name when it is whole.
import { createHash, type Hash } from 'node:crypto';
import { existsSync, openSync, readFileSync, renameSync, rmSync, statSync, writeSync } from 'node:fs';
import { dataProblem, usageProblem, type Problem } from '../../../problem/problem.js';
import { version } from '../../../result/version.js';
import {
  journalOf,
  nothingYet,
  partialOf,
  readJournal,
  takeUp,
  UnfinishedFile,
  type Reached,
} from '../../streams/unfinished-file.js';
import { cannotTakeUp, nothingUnfinished, otherRun, unfinishedThere } from './resume-problems.js';

export interface Sink {
  /** Takes lines of output; false when nobody reads them any more. `reached` counts them in. */
  write(text: string, reached: Progress): Promise<boolean>;
  /** All is written. */
  finish(): void;
  /** The run cannot go on; what is written stays. */
  abandon(): void;
  /** Where unfinished results are kept, for a message. */
  readonly keptIn?: string;
}

export type Progress = Omit<Reached, 'bytes' | 'output'>;

/** What a run is, and what it must be again to be gone on with; plain JSON. */
export interface RunDescription {
  readonly [setting: string]: unknown;
}

interface Head {
  readonly schema: typeof headSchema;
  readonly version: string;
  readonly run: RunDescription;
  readonly seed: string;
}

const headSchema = 'keepsum/unfinished-batch/1';

/** A run beside the file that was named: how far it is, or that it only failed to clear up. */
export interface Unfinished {
  readonly seed: string;
  readonly reached: Reached;
  readonly hash: Hash;
  readonly isWhole: boolean;
}

/**
 * What `--resume` finds beside the file; undefined where nothing was begun. @throws Problem (usage) where it is another run, or where
 * the results are not those that the journal tells of.
 */
export function findUnfinished(path: string, run: RunDescription, seed: string | undefined): Unfinished | undefined {
  const partial = partialOf(path);
  const journal = existsSync(journalOf(path)) ? readJournal(readFileSync(journalOf(path), 'utf8')) : undefined;
  const results = [partial, path].find((one) => existsSync(one));
  if (journal === undefined || results === undefined) {
    if (results === undefined) return undefined;
    throw results === path ? nothingUnfinished(path) : cannotTakeUp(path);
  }
  const head = journal.head as Head;
  const difference = head.schema !== headSchema || head.version !== version ? 'version' : differing(head, run, seed);
  if (difference !== undefined) throw otherRun(path, difference);
  const [first, last] = [journal.lines[0], journal.lines.at(-1)];
  const size = statSync(results).size;
  const begun = { seed: head.seed, reached: nothingYet, hash: createHash('sha256') };
  if (results === path) {
    if (last?.bytes !== size) throw nothingUnfinished(path);
    return { ...begun, reached: last, isWhole: true };
  }
  if (first === undefined || size < first.bytes) return { ...begun, isWhole: false };
  const found = takeUp(partial, journal.lines);
  if (found === undefined) throw cannotTakeUp(path);
  return { ...begun, ...found, isWhole: false };
}

function differing({ run: begun, seed: begunWith }: Head, run: RunDescription, seed: string | undefined) {
  if (seed !== undefined && seed !== begunWith) return 'seed';
  const names = new Set([...Object.keys(begun), ...Object.keys(run)]);
  return [...names].find((name) => JSON.stringify(begun[name]) !== JSON.stringify(run[name]));
}

/** @throws Problem (usage) when an unfinished run is there that was not to be gone on with. */
export function fileSink(path: string, run: RunDescription, seed: string, from: Unfinished | undefined): Sink {
  const [partial, journal] = [partialOf(path), journalOf(path)];
  if (from === undefined && existsSync(partial)) throw unfinishedThere(path);
  let file: UnfinishedFile;
  try {
    // The journal comes first and is never shortened: killed at any moment, results have one.
    const kept = openSync(journal, from === undefined ? 'w' : 'a');
    const head: Head = { schema: headSchema, version, run, seed };
    if (from === undefined) writeSync(kept, `${JSON.stringify(head)}\n`);
    const results = openSync(partial, from === undefined || from.reached.bytes === 0 ? 'w' : 'a');
    file = new UnfinishedFile(results, kept, from && { bytes: from.reached.bytes, hash: from.hash });
    if (from !== undefined) file.note(from.reached);
  } catch (thrown) {
    throw cannotOpen(path, thrown);
  }
  return {
    keptIn: partial,
    write(text, reached) {
      try {
        file.append(text, reached);
      } catch (thrown) {
        throw cannotKeep(path, reached.tables, thrown);
      }
      return Promise.resolve(true);
    },
    finish() {
      try {
        file.close();
        renameSync(partial, path);
        rmSync(journal);
      } catch (thrown) {
        throw cannotKeep(path, undefined, thrown);
      }
    },
    abandon: () => file.abandon(),
  };
}

const codeOf = (thrown: unknown): string => String((thrown as NodeJS.ErrnoException).code ?? thrown);

const cannotOpen = (path: string, thrown: unknown): Problem =>
  usageProblem({
    code: 'cannot-open-output',
    message: `"${partialOf(path)}" cannot be written (${codeOf(thrown)})`,
    place: '--output',
    hint: 'check that the directory is there and that you may write in it',
  });

const cannotKeep = (path: string, tables: number | undefined, thrown: unknown): Problem =>
  dataProblem({
    code: 'cannot-write',
    message: `the results could not be written to "${partialOf(path)}" (${codeOf(thrown)})`,
    place: '--output',
    hint: `what was finished before${tables === undefined ? '' : ` table ${tables}`} is kept there; make room, then run the same command with --resume`,
  });
