// Hands text to a stream and waits until it is through, so that ending the process never cuts it short.
// A reader that has gone (`| head -1`) is a normal end, not an error.
import type { Writable } from 'node:stream';
import { dataProblem } from '../../problem/problem.js';

export interface Destination {
  write(text: string): Promise<unknown>;
}

/**
 * Resolves when the stream has taken the whole text (true), or when nobody reads it any more (false).
 * @throws Problem (data) `cannot-write` when the stream refuses for another reason, such as a full disk.
 */
export async function writeOut(stream: Writable, text: string, name: string): Promise<boolean> {
  const failure = await new Promise<NodeJS.ErrnoException | null | undefined>((resolve) => {
    stream.write(text, resolve);
  });
  if (!failure) return true;
  if (failure.code === 'EPIPE' || failure.code === 'ERR_STREAM_DESTROYED') return false;
  throw dataProblem({
    code: 'cannot-write',
    message: `the result could not be written (${failure.code ?? failure.message})`,
    place: name,
    hint: 'check that the disk has room and that the other end accepts the text',
  });
}

/** Remarks go to standard error; where that cannot be written, nobody can be told, so the run goes on. */
export async function remark(stream: Writable, text: string): Promise<void> {
  await writeOut(stream, text, 'standard error').catch(() => undefined);
}

/** Says what a reader should know, unless nothing is to be said. */
export const noteFor =
  ({ quiet }: { readonly quiet?: true | undefined }, { stderr }: { readonly stderr: Writable }) =>
  async (words: string): Promise<void> => {
    if (!quiet) await remark(stderr, `note: ${words}\n`);
  };
