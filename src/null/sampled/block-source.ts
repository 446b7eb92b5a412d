// Where blocks of draws come from: this thread, or several. The order in which they are handed on is that of their numbers,
// and each is a function of seed, table and number alone, so the source changes no digit.
import type { LiveTable } from '../../table/live-table.js';
import type { Ordering } from '../contract.js';
import { planDraws } from './draw-plan.js';
import { blockSize } from './limits.js';
import { prepareRankedSampler, type RankTable } from './ranked-sampler.js';
import { blocksFor, countBlocks, drawsInBlock, prepareSampler, type Sampling, type Tally } from './sample-cuts.js';

export interface BlockSource {
  /** One entry a block, from `first` to before `end`; in each, one tally for each ordering. */
  tallies(first: number, end: number): Promise<readonly (readonly Tally[])[]>;
  /** Blocks to ask for at once: some tens of milliseconds of work. */
  readonly stride: number;
  /** Whether the next blocks should be asked for while the last are being read (they are made elsewhere). */
  readonly ahead: boolean;
  close(): Promise<void>;
}

const millisecondsAtOnce = 40;

/** Forecast of one block's work in milliseconds of a usual machine. Feeds strides and the use of threads, never a digit. */
export const blockMilliseconds = (live: LiveTable): number => ((planDraws(live).work + 30) * blockSize) / 1e6;

/** Blocks counted on this thread, when asked. With ranks the tallies of the orderings are followed by those of the ranks. */
export function localSource(
  live: LiveTable,
  orderings: readonly Ordering[],
  sampling: Sampling,
  ranks?: RankTable,
): BlockSource {
  const sampler = ranks === undefined ? prepareSampler(live, orderings) : prepareRankedSampler(live, orderings, ranks);
  return {
    stride: strideFor(live),
    ahead: false,
    tallies: (first, end) => Promise.resolve(countBlocks(sampler, sampling, first, end)),
    close: () => Promise.resolve(),
  };
}

export const strideFor = (live: LiveTable): number =>
  Math.max(1, Math.floor(millisecondsAtOnce / blockMilliseconds(live)));

/** Lets timers and signals have their turn between two stretches of work. */
const pause = (): Promise<void> => new Promise((resolve) => setImmediate(resolve));

export interface Block {
  readonly tallies: readonly Tally[];
  readonly draws: number;
}

/** The blocks from `begin` to before `last`, in order; whoever has seen enough just stops reading. */
export async function* blocksInOrder(
  source: BlockSource,
  sampling: Sampling,
  begin = 0,
  last = blocksFor(sampling.draws),
): AsyncGenerator<Block> {
  if (begin >= last) return;
  const ask = (first: number): ReturnType<BlockSource['tallies']> => {
    const asked = source.tallies(first, Math.min(last, first + source.stride));
    // Whoever has seen enough leaves the last question unread; that its work is then ended is no failure of the run.
    asked.catch(() => undefined);
    return asked;
  };
  let next = ask(begin);
  for (let first = begin; first < last; first += source.stride) {
    const tallies = await next;
    if (source.ahead && first + source.stride < last) next = ask(first + source.stride);
    for (let k = 0; k < tallies.length; k++) {
      yield { tallies: tallies[k]!, draws: drawsInBlock(sampling.draws, first + k) };
    }
    await pause();
    if (!source.ahead && first + source.stride < last) next = ask(first + source.stride);
  }
  await next;
}
