// A shell without a process: what was written is kept, and what would be the terminal is said by the test.
import { Readable, Writable } from 'node:stream';
import type { Shell } from '../../src/cli/shell.js';

export interface FakeShell extends Shell {
  readonly written: { out: string; err: string };
}

export function fakeShell(changes: Partial<Shell> & { input?: string } = {}): FakeShell {
  const written = { out: '', err: '' };
  const keep = (end: 'out' | 'err'): Writable =>
    new Writable({
      write(piece: Buffer, _encoding, done) {
        written[end] += piece.toString();
        done();
      },
    });
  const { input, ...others } = changes;
  return {
    stdin: () => Readable.from(input === undefined ? [] : [Buffer.from(input)]),
    stdinIsTerminal: () => input === undefined,
    stdout: keep('out'),
    stdoutIsTerminal: false,
    stderrIsTerminal: false,
    stderr: keep('err'),
    columns: 80,
    environment: {},
    ...others,
    written,
  };
}
