// How far a search or a simulation is, on standard error, as for draws.
import { countWords } from '../../result/number-words.js';
import type { Shell } from '../shell.js';
import { progressLine, type ProgressWishes } from './progress.js';

/** Runs `work` with a callback that shows how far it is. */
export async function withSteps<T>(
  wishes: ProgressWishes,
  shell: Shell,
  work: (onProgress?: (done: number, most: number) => void) => Promise<T>,
): Promise<T> {
  const line = progressLine(wishes, shell);
  if (line === undefined) return work();
  try {
    return await work((done, most) => line.show(() => `at ${countWords(done)} of at most ${countWords(most)}`));
  } finally {
    line.erase();
  }
}
