// Texts as the input stage gets them: bytes, and bytes in pieces; and what a refusal says.
import { Problem } from '../../src/problem/problem.js';

export const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

/** The bytes of a text in pieces of the given size, cut anywhere, inside a character too. */
export async function* piecesOf(text: string | Uint8Array, size = 65_536): AsyncGenerator<Uint8Array> {
  const bytes = typeof text === 'string' ? bytesOf(text) : text;
  for (let at = 0; at < bytes.length; at += size) yield bytes.slice(at, at + size);
}

/** What is thrown, as a problem; anything else thrown, or nothing, fails the test. */
export function problemOf(run: () => unknown): Problem {
  try {
    run();
  } catch (error) {
    if (error instanceof Problem) return error;
    throw error;
  }
  throw new Error('nothing was refused');
}

export async function problemOfAsync(run: () => Promise<unknown>): Promise<Problem> {
  try {
    await run();
  } catch (error) {
    if (error instanceof Problem) return error;
    throw error;
  }
  throw new Error('nothing was refused');
}

/** A field of a CSV record, always in quotes. */
export const quoted = (text: string): string => `"${text.replaceAll('"', '""')}"`;
