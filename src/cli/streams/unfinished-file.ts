// Results of a long run on their way to a file. They grow in FILE.partial, and beside it FILE.partial.journal says how far the run is:
// how many units of input gave how many bytes, with the SHA-256 of both. A run that is killed at any moment goes on from the
// last line of the journal that the results bear out; when all is done the results take their name in one step. What is written is in the
// system's hands at once; it is forced to the disk every 8 MB and at the end, so that a power cut costs no more than those.
import { createHash, type Hash } from 'node:crypto';
import { closeSync, fdatasyncSync, fsyncSync, ftruncateSync, openSync, readSync, writeSync } from 'node:fs';

/** How far a run is. */
export interface Reached {
  /** Units of input worked off, and the SHA-256 of what they were. */
  readonly units: number;
  readonly input: string;
  /** Bytes of output that they gave, and their SHA-256. */
  readonly bytes: number;
  readonly output: string;
  readonly tables: number;
  readonly faults: number;
  /** All is written, the closing line of a part too. */
  readonly closed?: true;
}

export const partialOf = (path: string): string => `${path}.partial`;
export const journalOf = (path: string): string => `${path}.partial.journal`;

const forcedEvery = 8 * 2 ** 20;

/** Appends results and journal; both files are open for as long as the run lasts. */
export class UnfinishedFile {
  private bytes: number;
  private readonly output: Hash;
  private forcedAt: number;

  constructor(
    private readonly results: number,
    private readonly journal: number,
    from: { readonly bytes: number; readonly hash: Hash } = { bytes: 0, hash: createHash('sha256') },
  ) {
    this.bytes = from.bytes;
    this.forcedAt = from.bytes;
    this.output = from.hash;
  }

  /** Begins a journal with what run it is, or goes on in one with how far the run was. A line cut short before it ends here. */
  note(line: object): void {
    writeAll(this.journal, Buffer.from(`\n${JSON.stringify(line)}\n`));
  }

  /** Results first, journal after: the journal never promises what is not there. */
  append(text: string, reached: Omit<Reached, 'bytes' | 'output'>): void {
    const bytes = Buffer.from(text);
    writeAll(this.results, bytes);
    this.output.update(bytes);
    this.bytes += bytes.length;
    const line: Reached = { ...reached, bytes: this.bytes, output: this.output.copy().digest('hex') };
    if (this.bytes - this.forcedAt >= forcedEvery) {
      fdatasyncSync(this.results);
      this.forcedAt = this.bytes;
    }
    writeAll(this.journal, Buffer.from(`${JSON.stringify(line)}\n`));
  }

  /** Everything on the disk, and the files closed. */
  close(): void {
    fsyncSync(this.results);
    fsyncSync(this.journal);
    this.abandon();
  }

  abandon(): void {
    closeSync(this.results);
    closeSync(this.journal);
  }
}

/** A write may take less than all of it. */
function writeAll(file: number, bytes: Uint8Array): void {
  for (let at = 0; at < bytes.length;) at += writeSync(file, bytes, at);
}

/** Where every run begins. */
export const nothingYet: Reached = {
  units: 0,
  input: createHash('sha256').digest('hex'),
  bytes: 0,
  output: createHash('sha256').digest('hex'),
  tables: 0,
  faults: 0,
};

/** What run a journal is of, and its lines in the order of bytes: one that goes back supersedes those beyond it. */
export function readJournal(text: string): { readonly head: unknown; readonly lines: readonly Reached[] } | undefined {
  const [head, ...lines] = text.split('\n').slice(0, -1).flatMap(wholeLine);
  if (head === undefined) return undefined;
  const kept: Reached[] = [];
  for (const line of lines as Reached[]) {
    while (kept.length > 0 && kept.at(-1)!.bytes >= line.bytes && kept.at(-1)!.units >= line.units) kept.pop();
    kept.push(line);
  }
  return { head, lines: kept };
}

/** A line that was cut short says nothing. */
function wholeLine(line: string): unknown[] {
  try {
    return line === '' ? [] : [JSON.parse(line)];
  } catch {
    return [];
  }
}

/**
 * The last of the journal's lines whose bytes are in the results as they were written; the results end there afterwards.
 * @returns undefined when the results bear none of them out.
 */
export function takeUp(path: string, lines: readonly Reached[]): { reached: Reached; hash: Hash } | undefined {
  const file = openSync(path, 'r+');
  try {
    const hash = createHash('sha256');
    const piece = Buffer.alloc(2 ** 20);
    let at = 0;
    let found: { reached: Reached; hash: Hash } | undefined;
    for (const reached of lines) {
      while (at < reached.bytes) {
        const got = readSync(file, piece, 0, Math.min(piece.length, reached.bytes - at), at);
        if (got === 0) break;
        hash.update(piece.subarray(0, got));
        at += got;
      }
      const soFar = hash.copy();
      if (at === reached.bytes && soFar.copy().digest('hex') === reached.output) found = { reached, hash: soFar };
      else break;
    }
    if (found !== undefined) ftruncateSync(file, found.reached.bytes);
    return found;
  } finally {
    closeSync(file);
  }
}
