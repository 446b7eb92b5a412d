// Ctrl-C ends a run at once, whatever it is doing, with what shells call 130.
import { describe, expect, it } from 'vitest';
import { inShell } from './run-command.js';

describe('an interrupted run', () => {
  it.each([
    ['in the middle of sampling', 'keepsum test 800,200,30 100,900,40 5,7,900 --method sample --draws 1e11'],
    [
      'in the middle of exact work',
      'keepsum test 31,22,9,14 18,34,27,12 7,19,41,22 12,15,18,33 --method exact --effort 1e11',
    ],
    ['while it waits for input', 'sleep 60 | keepsum test -'],
  ])('%s', async (_case, line) => {
    // Job control gives the background job its own group and lets it take the signal.
    const { out, err } = await inShell(`set -m; { ${line}; } & sleep 1.5; kill -INT -$!; wait $!; echo "$?"`);
    expect(out).toBe('130\n');
    expect(err).not.toMatch(/error|at /);
  });

  it('is ended by the signal itself, so that the loop around it ends too', async () => {
    const line = 'keepsum test 800,200,30 100,900,40 5,7,900 --method sample --draws 1e11 --quiet';
    const loop = `for i in 1 2; do ${line}; echo "went on"; done`;
    // The signal goes to the whole group, as a terminal sends it.
    const { out } = await inShell(
      `set -m; export -f keepsum; bash -c '${loop}' & sleep 1.5; kill -INT -$!; wait $!; echo "$?"`,
    );
    expect(out).toBe('130\n');
  });
});
