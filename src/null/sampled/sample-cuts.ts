// Cuts from random tables with both margins held: whole blocks of draws, each block from a stream of its own, so that blocks can
// be counted anywhere, in any order, and one after another until enough is known.
import { blockStream, type UniformSource } from '../../random/stream.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Ordering, OrderingName, SampledCut } from '../contract.js';
import { planDraws, type Forced } from './draw-plan.js';
import { panelFor } from './judges.js';
import { blockSize } from './limits.js';
import { TableDrawer } from './table-drawer.js';

export interface Sampling {
  readonly seed: string;
  readonly tableKey: string;
  /** Number of draws, at least 1; the last block is cut short where it is no multiple of the block size. */
  readonly draws: number;
}

/** Draws below, tied with and above the observed table. */
export type Tally = readonly [below: number, tied: number, above: number];

/** Everything that can be worked out before the first draw, for one table and its orderings. */
export interface Sampler {
  /** Makes so many draws from a stream; one tally for each ordering. A function of the stream and the number alone. */
  countBlock(stream: UniformSource, draws: number): Tally[];
  /** Draws one table, row-major over the live table, into an array of rows x columns. */
  drawTable(stream: UniformSource, into: { [cell: number]: number }): void;
}

export function prepareSampler(live: LiveTable, orderings: readonly Ordering[], forced?: Forced): Sampler {
  const plan = planDraws(live, forced);
  const drawer = new TableDrawer(plan);
  const { judges, assigned } = panelFor(live, orderings, plan);
  const table = drawer.newTable();
  return {
    countBlock(stream, draws) {
      const counts = new Float64Array(3 * judges.length);
      for (let draw = 0; draw < draws; draw++) {
        drawer.draw(stream, table);
        for (let k = 0; k < judges.length; k++) counts[3 * k + 1 + judges[k]!.place(table)]!++;
      }
      return assigned.map(({ judge, direction }) => {
        const tied = 3 * judge + 1;
        return [counts[tied - direction]!, counts[tied]!, counts[tied + direction]!];
      });
    },
    drawTable(stream, into) {
      drawer.draw(stream, table);
      drawer.arrange(table, into);
    },
  };
}

/** Number of blocks that so many draws take. */
export const blocksFor = (draws: number): number => Math.ceil(draws / blockSize);

/** Draws in a block, counted from 0. */
export const drawsInBlock = (draws: number, block: number): number =>
  Math.max(0, Math.min(blockSize, draws - block * blockSize));

/** Tallies of the blocks from `first` to before `end`, in each one tally for each ordering. */
export function countBlocks(sampler: Sampler, sampling: Sampling, first: number, end: number): Tally[][] {
  const found: Tally[][] = [];
  for (let block = first; block < end; block++) {
    const stream = blockStream(sampling.seed, sampling.tableKey, block);
    found.push(sampler.countBlock(stream, drawsInBlock(sampling.draws, block)));
  }
  return found;
}

/** Adds up the tallies of blocks; what follows those of the orderings is passed over. */
export class CutCount {
  draws = 0;
  private readonly sums: [below: number, tied: number, above: number][];

  constructor(private readonly names: readonly OrderingName[]) {
    this.sums = names.map(() => [0, 0, 0]);
  }

  add(tallies: readonly Tally[], draws: number): void {
    this.draws += draws;
    this.sums.forEach((sums, o) => tallies[o]!.forEach((count, side) => (sums[side]! += count)));
  }

  cuts(): SampledCut[] {
    return this.names.map((ordering, o) => {
      const [below, tied, above] = this.sums[o]!;
      return { kind: 'sampled', ordering, below, tied, above, draws: this.draws };
    });
  }
}

/**
 * Counts of draws below, tied with and above the observed table, for each ordering, over the blocks from `first` to before
 * `end` (default: all). Same arguments, same counts; counts over parts add up to those over the whole.
 */
export function sampleCuts(
  live: LiveTable,
  orderings: readonly Ordering[],
  sampling: Sampling,
  first = 0,
  end = blocksFor(sampling.draws),
): SampledCut[] {
  const count = new CutCount(orderings.map(({ name }) => name));
  countBlocks(prepareSampler(live, orderings), sampling, first, end).forEach((tallies, k) =>
    count.add(tallies, drawsInBlock(sampling.draws, first + k)),
  );
  return count.cuts();
}
