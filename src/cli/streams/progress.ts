// How far a long run is, on standard error: only where that is a terminal, only after half a second, and gone before the report.
import type { Surroundings } from '../../sampled-answer.js';
import { countWords } from '../../result/number-words.js';
import type { Shell } from '../shell.js';
import { settleForShortWork } from '../short-work.js';

const quietMilliseconds = 500;
const betweenMilliseconds = 100;
const eraseLine = '\r\u001b[K';

export interface ProgressWishes {
  readonly threads?: number;
  readonly noProgress?: true;
  readonly quiet?: true;
}

/** Runs `work` with surroundings that show how far it is. */
export async function withProgress<T>(
  { threads, noProgress, quiet }: ProgressWishes,
  shell: Shell,
  work: (surroundings: Surroundings) => Promise<T>,
): Promise<T> {
  const used = { ...(threads === undefined ? {} : { threads }), beforeExact: settleForShortWork };
  if (noProgress || quiet || !shell.stderrIsTerminal || shell.environment.TERM === 'dumb') return work(used);
  const begin = performance.now();
  let lastShown = begin + quietMilliseconds - betweenMilliseconds;
  let shown = false;
  const onProgress = (draws: number, most: number): void => {
    const now = performance.now();
    if (now - lastShown < betweenMilliseconds) return;
    lastShown = now;
    shown = true;
    const perSecond = draws / ((now - begin) / 1000);
    const left = Math.ceil((most - draws) / perSecond);
    shell.stderr.write(
      `${eraseLine}drawn: ${countWords(draws)} of at most ${countWords(most)} tables, at most ${left} s left`,
    );
  };
  try {
    return await work({ ...used, onProgress });
  } finally {
    if (shown) shell.stderr.write(eraseLine);
  }
}
