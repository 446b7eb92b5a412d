// Everything outside the program that a run may touch, in one object, so that commands can be run in a test
// without a process. Only this file and its neighbours in src/cli read `process`.
import type { Readable, Writable } from 'node:stream';

export interface Shell {
  /** Opened on first use, which costs time at the start. */
  readonly stdin: () => Readable;
  readonly stdinIsTerminal: () => boolean;
  readonly stdout: Writable;
  readonly stdoutIsTerminal: boolean;
  readonly stderr: Writable;
  readonly stderrIsTerminal: boolean;
  /** Width of the terminal in characters; 80 where there is none. */
  readonly columns: number;
  readonly environment: Readonly<Record<string, string | undefined>>;
}

export function processShell(): Shell {
  return {
    stdin: () => process.stdin,
    stdinIsTerminal: () => process.stdin.isTTY === true,
    stdout: process.stdout,
    stdoutIsTerminal: process.stdout.isTTY === true,
    stderr: process.stderr,
    stderrIsTerminal: process.stderr.isTTY === true,
    columns: process.stdout.columns || 80,
    environment: process.env,
  };
}
