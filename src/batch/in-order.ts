// A batch from its source to what was found, in input order, in constant memory: on this thread while the work is short, on several
// once it is long. Which thread answers a table changes no digit of it.
import { answerChunk, type Chunk, type ChunkDone, type ChunkTask, type UnitSource } from './chunk.js';

export interface BatchRun extends Omit<ChunkTask, 'chunk'> {
  readonly source: UnitSource;
  readonly threads: number;
}

export interface Finished extends ChunkDone {
  readonly chunk: Chunk;
}

/** Counted work worth the start of threads, and what is given to one of them at a time. */
const shortMilliseconds = 150;
const chunkMilliseconds = 40;
const mostUnits = 1024;
/** Chunks under way for each thread: enough that a long table does not stop the others at once. */
const aheadOfEach = 8;

/** Threads take built files only; undefined where there is none (the sources themselves are being run). */
const workerFile = import.meta.url.endsWith('.ts') ? undefined : new URL('./batch-worker.js', import.meta.url).href;

/** Whatever was answered before the source failed is handed on before the failure is thrown. */
export async function* answerInOrder({ source, threads, settings, style }: BatchRun): AsyncGenerator<Finished> {
  const task = { settings, style };
  const size = new ChunkSize();
  // A statistic of the user's own is a function, which no thread can be sent.
  let alone = threads < 2 || workerFile === undefined || typeof settings.wishes.statistic === 'object';
  for (let work = 0; alone || work < shortMilliseconds;) {
    const chunk = await source.next(size.units);
    if (chunk === null) return;
    const done = await answerChunk({ ...task, chunk }, { threads });
    size.learn(done);
    work += done.work;
    yield { ...done, chunk };
    // One thread does the same where the package that runs several is not installed.
    if (!alone && work >= shortMilliseconds) alone = (await piscina()) === null;
  }
  const { Piscina } = (await piscina())!;
  const pool = new Piscina<ChunkTask, ChunkDone>({ filename: workerFile!, minThreads: threads, maxThreads: threads });
  try {
    yield* onThreads((chunk) => pool.run({ ...task, chunk }), source, threads * aheadOfEach, size);
  } finally {
    await pool.destroy();
  }
}

const piscina = () => import('piscina').catch(() => null);

/** @param most chunks under way at a time. */
async function* onThreads(
  run: (chunk: Chunk) => Promise<ChunkDone>,
  source: UnitSource,
  most: number,
  size: ChunkSize,
): AsyncGenerator<Finished> {
  const waiting: Promise<Finished>[] = [];
  let next: Promise<Chunk | null> | undefined = source.next(size.units);
  let failure: { readonly thrown: unknown } | undefined;
  while (next !== undefined || waiting.length > 0) {
    const came = next === undefined || waiting.length >= most ? [] : [settled(next, 'came')];
    const first = waiting.length === 0 ? [] : [settled(waiting[0]!, 'done')];
    if ((await Promise.race([...came, ...first])) === 'done') {
      const done = await waiting.shift()!;
      size.learn(done);
      yield done;
      continue;
    }
    let chunk: Chunk | null = null;
    try {
      chunk = (await next)!;
    } catch (thrown) {
      failure = { thrown };
    }
    next = undefined;
    if (chunk === null) continue;
    waiting.push(answered(run, chunk));
    next = source.next(size.units);
  }
  if (failure !== undefined) throw failure.thrown;
}

/** A failure is met when its turn comes. */
function answered(run: (chunk: Chunk) => Promise<ChunkDone>, chunk: Chunk): Promise<Finished> {
  const done = run(chunk).then((found) => ({ ...found, chunk }));
  done.catch(() => undefined);
  return done;
}

const settled = <Word>(promise: Promise<unknown>, word: Word): Promise<Word> =>
  promise.then(
    () => word,
    () => word,
  );

/** How many units to answer together: growing from one, as far as their counted work is short. */
class ChunkSize {
  units = 1;

  learn({ work, tables }: ChunkDone): void {
    if (tables === 0) return;
    const wanted = Math.max(1, Math.floor((chunkMilliseconds * tables) / work));
    this.units = Math.min(mostUnits, 2 * this.units, wanted);
  }
}
