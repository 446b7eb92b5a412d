// How far a search or a simulation is, on standard error: as for draws, only on a terminal and only after half a second.
import { countWords } from '../../result/number-words.js';
import type { Shell } from '../shell.js';

const quietMilliseconds = 500;
const betweenMilliseconds = 100;
const eraseLine = '\r\u001b[K';

export interface StepWishes {
  readonly noProgress?: true;
  readonly quiet?: true;
}

/** Runs `work` with a callback that shows how far it is. */
export async function withSteps<T>(
  { noProgress, quiet }: StepWishes,
  shell: Shell,
  work: (onProgress?: (done: number, most: number) => void) => Promise<T>,
): Promise<T> {
  if (noProgress || quiet || !shell.stderrIsTerminal || shell.environment.TERM === 'dumb') return work();
  let lastShown = performance.now() + quietMilliseconds - betweenMilliseconds;
  let shown = false;
  try {
    return await work((done, most) => {
      const now = performance.now();
      if (now - lastShown < betweenMilliseconds) return;
      lastShown = now;
      shown = true;
      shell.stderr.write(`${eraseLine}at ${countWords(done)} of at most ${countWords(most)}`);
    });
  } finally {
    if (shown) shell.stderr.write(eraseLine);
  }
}
