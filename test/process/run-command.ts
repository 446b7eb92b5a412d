// Runs the real command, as built, and collects what came out of it.
import { spawn } from 'node:child_process';
import { resolve } from 'node:path';

export const root = resolve(import.meta.dirname, '../..');
export const bin = resolve(root, 'bin/keepsum.js');

export interface Ran {
  readonly status: number | null;
  readonly out: string;
  readonly err: string;
}

export interface RunSettings {
  /** For standard input, which is a pipe; empty where left out. */
  readonly input?: string | Buffer;
  readonly environment?: Record<string, string>;
  readonly folder?: string;
}

export const keepsum = (words: readonly string[], settings: RunSettings = {}): Promise<Ran> =>
  run(process.execPath, [bin, ...words], settings);

/** A line for the shell in which `keepsum` stands for our command. */
export const inShell = (line: string, settings: RunSettings = {}): Promise<Ran> =>
  run('bash', ['-c', `keepsum() { "${process.execPath}" "${bin}" "$@"; }; ${line}`], settings);

const noLeanings = { NO_COLOR: undefined, FORCE_COLOR: undefined, COLUMNS: undefined, TERM: 'xterm' };

export function run(program: string, words: readonly string[], settings: RunSettings): Promise<Ran> {
  return new Promise((done, fail) => {
    const child = spawn(program, words, {
      cwd: settings.folder ?? root,
      // Nothing that colours the output or speaks for a terminal comes from whoever runs the tests.
      env: { ...process.env, ...noLeanings, ...settings.environment },
      stdio: ['pipe', 'pipe', 'pipe'],
    });
    let out = '';
    let err = '';
    child.stdout.setEncoding('utf8').on('data', (piece: string) => (out += piece));
    child.stderr.setEncoding('utf8').on('data', (piece: string) => (err += piece));
    child.on('error', fail);
    child.on('close', (status) => done({ status, out, err }));
    // The command may end without reading what it is given.
    child.stdin.on('error', () => undefined);
    child.stdin.end(settings.input ?? '');
  });
}
