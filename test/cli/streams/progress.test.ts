// The line that says how far a long run is: where, when, and gone afterwards.
import { setTimeout as sleep } from 'node:timers/promises';
import { describe, expect, it } from 'vitest';
import { withProgress, type ProgressWishes } from '../../../src/cli/streams/progress.js';
import { fakeShell } from '../fake-shell.js';

async function shown(wishes: ProgressWishes, terminal: boolean, milliseconds: number): Promise<string> {
  const shell = fakeShell({ stderrIsTerminal: terminal });
  const answer = await withProgress(wishes, shell, async ({ onProgress }) => {
    onProgress?.(1000, 10_000_000);
    await sleep(milliseconds);
    onProgress?.(2_500_000, 10_000_000);
    return 'p';
  });
  expect(answer).toBe('p');
  expect(shell.written.out).toBe('');
  return shell.written.err;
}

describe('progress', () => {
  it('is shown on a terminal after half a second and erased at the end', async () => {
    const text = await shown({}, true, 650);
    expect(text).toMatch(/drawn: 2,500,000 of at most 10,000,000 tables, at most \d+ s left/);
    expect(text.startsWith('\r')).toBe(true);
    expect(text.endsWith('\r\u001b[K')).toBe(true);
  });

  it.each([
    ['a short run', {}, true, 50],
    ['no terminal', {}, false, 650],
    ['--quiet', { quiet: true }, true, 650],
    ['--no-progress', { noProgress: true }, true, 650],
  ] as const)('is not shown for %s', async (_, wishes, terminal, milliseconds) => {
    expect(await shown(wishes, terminal, milliseconds)).toBe('');
  });
});
