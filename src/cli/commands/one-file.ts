// The one file that a command reads, or standard input where none is named or `-` stands in its place.
import { usageProblem } from '../../problem/problem.js';
import type { Shell } from '../shell.js';

export interface OneFile {
  /** null: standard input. */
  readonly path: string | null;
  /** What places call it. */
  readonly name: string;
  readonly bytes: () => AsyncIterable<Uint8Array>;
}

/**
 * @param missing what is wrong where nothing is named and standard input is a terminal, and what to write instead.
 * @throws Problem (usage): `two-files`, `nothing-named`
 */
export function oneFile(
  operands: readonly string[],
  shell: Shell,
  missing: { readonly message: string; readonly hint: string },
): OneFile {
  const [first, ...more] = operands;
  if (more.length > 0 || (first === undefined && shell.stdinIsTerminal())) {
    throw usageProblem({
      code: more.length > 0 ? 'two-files' : 'nothing-named',
      message: more.length > 0 ? `one file at a time, not ${operands.length}` : missing.message,
      hint: missing.hint,
    });
  }
  const path = first === undefined || first === '-' ? null : first;
  const name = path ?? 'standard input';
  return {
    path,
    name,
    async *bytes() {
      const { fileBytes, pieces } = await import('../streams/input-file.js');
      yield* path === null ? pieces(shell.stdin(), name) : fileBytes(path);
    },
  };
}
