// Blocks of draws counted on several threads: the same numbers as on one, since each block is a function of its own number.
import { strideFor, type BlockSource } from './null/sampled/block-source.js';
import type { Tally } from './null/sampled/sample-cuts.js';
import type { CountTask, SamplingRecipe } from './sampling-worker.js';
import type { LiveTable } from './table/live-table.js';

/** Threads take built files only; undefined where there is none (the sources themselves are being run). */
const workerFile = import.meta.url.endsWith('.ts') ? undefined : new URL('./sampling-worker.js', import.meta.url).href;

export const canUseThreads = workerFile !== undefined;

/**
 * @param threads at least 2. This thread is one of them: it knows the table already, and a worker costs a third of a second.
 * @param own counts blocks on this thread. The others are ended by `close`, with what they are at.
 * @returns null where the package that runs threads is not installed: one thread does the same.
 */
export async function threadedSource(
  recipe: SamplingRecipe,
  live: LiveTable,
  threads: number,
  own: BlockSource,
): Promise<BlockSource | null> {
  const found = await import('piscina').catch(() => null);
  if (found === null) return null;
  const { Piscina } = found;
  const pool = new Piscina<CountTask, readonly (readonly Tally[])[]>({
    filename: workerFile!,
    minThreads: threads - 1,
    maxThreads: threads - 1,
    // One more waits at the worker while this thread counts and hands out nothing.
    concurrentTasksPerWorker: 2,
  });
  let closed = false;
  // Answers still on their way when the pool is closed are strangers to it.
  pool.on('error', (thrown) => {
    if (!closed) throw thrown;
  });
  const each = strideFor(live);
  return {
    stride: each * threads,
    ahead: true,
    async tallies(first, end) {
      const tasks: Promise<readonly (readonly Tally[])[]>[] = [];
      for (let from = first + each; from < end; from += each) {
        tasks.push(pool.run({ recipe, first: from, end: Math.min(end, from + each) }));
      }
      const elsewhere = Promise.all(tasks);
      // Work that is ended before anybody reads it is no failure.
      elsewhere.catch(() => undefined);
      const here = await own.tallies(first, Math.min(end, first + each));
      return [here, ...(await elsewhere)].flat();
    },
    close() {
      closed = true;
      return pool.destroy();
    },
  };
}
