// From blocks of draws to p-values: all of a fixed number, or block after block until the verdict is settled. On one thread
// while the work is short, on several once it is long; the digits are the same.
import { availableParallelism } from 'node:os';
import type { CellInquiry } from './cell/which-cells.js';
import type { Ordering } from './null/contract.js';
import {
  blockMilliseconds,
  blocksInOrder,
  localSource,
  type Block,
  type BlockSource,
} from './null/sampled/block-source.js';
import { rankCounts, type RankTable } from './null/sampled/ranked-sampler.js';
import { blocksFor, CutCount, type Sampling, type Tally } from './null/sampled/sample-cuts.js';
import type { Plan, Shard } from './plan/plan.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { conditionalPValues } from './pvalue/p-values.js';
import { followQuestions } from './pvalue/sequential/follow-questions.js';
import type { SamplingRecipe } from './sampling-worker.js';
import { canUseThreads, threadedSource } from './threaded-source.js';
import type { LiveTable } from './table/live-table.js';

/** What exact work is foreseen to take: units of about 30 ns, by the engine named. */
export interface ForeseenWork {
  readonly engine: string;
  readonly workUnits: number;
}

/** What a run may use of the machine, and whom it tells how far it is; none of it changes a digit. */
export interface Surroundings {
  /** Worker threads for long sampling, from 1; default: as many as the machine runs at once. */
  readonly threads?: number;
  /** Told now and then how many draws are made, and the most that will be. */
  readonly onProgress?: (draws: number, most: number) => void;
  /** Told the tallies of all blocks together: one for each ordering, then those of ranks; of parts of a run. */
  readonly onTallies?: (tallies: readonly Tally[], draws: number) => void;
  /** Tallies that parts of the run have made, instead of drawing. */
  readonly pooled?: Pooled;
  /** Told what exact work is foreseen to take, before it starts. */
  readonly beforeExact?: (foreseen: ForeseenWork) => Promise<void>;
  /** The same for exact work: counted units spent, and those foreseen. Called while nothing else can run. */
  readonly onWork?: (units: number, foreseen: number) => void;
}

/** What the parts of one run have counted together; for the answer of that statistic and table alone. */
export interface Pooled {
  readonly statistic: string;
  readonly tableKey: string;
  readonly tallies: readonly Tally[];
  readonly draws: number;
}

/** Work worth the start of threads, and what is done on one thread before they are thought of. */
const longMilliseconds = 300;
const shortMilliseconds = 150;

export async function sampledPValues(
  questions: readonly Question[],
  live: LiveTable,
  orderings: readonly Ordering[],
  plan: Plan,
  recipe: Pick<SamplingRecipe, 'parts' | 'options'> | null,
  surroundings: Surroundings,
  cells?: CellInquiry['listener'],
): Promise<PValueEntry[]> {
  const most = plan.draws === 'auto' ? plan.mostDraws! : plan.draws!;
  const sampling: Sampling = { seed: plan.seed!, tableKey: plan.tableKey, draws: most };
  const names = orderings.map(({ name }) => name);
  const counted = new CutCount(names);
  const sources = sourcesFor(live, orderings, sampling, recipe, surroundings, plan.draws === 'auto', cells?.table);
  const follower = plan.draws === 'auto' ? followQuestions(questions, plan) : null;
  const all = new TallySum();
  const pooled = pooledFor(plan, surroundings);
  for await (const block of pooled === undefined ? ownBlocks() : [pooled]) {
    all.add(block.tallies, block.draws);
    counted.add(block.tallies, block.draws);
    cells?.follower.add(rankCounts(block.tallies, names.length), block.draws);
    surroundings.onProgress?.(counted.draws, most);
    if (follower?.settles((name) => atLeast(block, names.indexOf(name)), block.draws)) break;
  }
  if (plan.shard !== undefined) surroundings.onTallies?.(all.tallies, all.draws);
  const cuts = counted.cuts();
  return follower === null
    ? conditionalPValues(questions, cuts, null, plan.samplingConfidence)
    : follower.pValues((name) => cuts.find(({ ordering }) => ordering === name)!);

  function ownBlocks(): AsyncGenerator<Block> {
    return plan.shard === undefined
      ? inTurn(sources, sampling)
      : everySoMany(localSource(live, orderings, sampling, cells?.table), sampling, plan.shard);
  }
}

const pooledFor = ({ statistic, tableKey }: Plan, { pooled }: Surroundings): Pooled | undefined =>
  pooled?.statistic === statistic && pooled.tableKey === tableKey ? pooled : undefined;

/** The blocks of one part, on this thread: other parts run elsewhere. */
async function* everySoMany(source: BlockSource, sampling: Sampling, { index, of }: Shard): AsyncGenerator<Block> {
  for (let k = index - 1; k < blocksFor(sampling.draws); k += of) yield* blocksInOrder(source, sampling, k, k + 1);
}

/** Tallies of every kind, added up. */
class TallySum {
  tallies: [number, number, number][] = [];
  draws = 0;

  add(tallies: readonly Tally[], draws: number): void {
    this.draws += draws;
    tallies.forEach((tally, k) => {
      const sum = (this.tallies[k] ??= [0, 0, 0]);
      tally.forEach((count, side) => (sum[side]! += count));
    });
  }
}

const atLeast = ({ tallies }: Block, ordering: number): number => tallies[ordering]![1] + tallies[ordering]![2];

interface Stretch {
  readonly begin: number;
  readonly end: number;
  readonly open: () => Promise<BlockSource>;
}

/** Which blocks come from where. A run that may end early starts on this thread. */
function sourcesFor(
  live: LiveTable,
  orderings: readonly Ordering[],
  sampling: Sampling,
  recipe: Pick<SamplingRecipe, 'parts' | 'options'> | null,
  surroundings: Surroundings,
  mayEndEarly: boolean,
  ranks?: RankTable,
): Stretch[] {
  const blocks = blocksFor(sampling.draws);
  const each = blockMilliseconds(live);
  const threads = surroundings.threads ?? availableParallelism();
  const local = (begin: number, end: number): Stretch => ({
    begin,
    end,
    open: () => Promise.resolve(localSource(live, orderings, sampling, ranks)),
  });
  if (recipe === null || threads < 2 || !canUseThreads || blocks * each < longMilliseconds) return [local(0, blocks)];
  const first = mayEndEarly ? Math.min(blocks, Math.ceil(shortMilliseconds / each)) : 0;
  const whole: SamplingRecipe = {
    ...recipe,
    orderings: orderings.map(({ name }) => name),
    sampling,
    ranked: ranks !== undefined,
  };
  return [
    local(0, first),
    {
      begin: first,
      end: blocks,
      open: async () => {
        const own = localSource(live, orderings, sampling, ranks);
        return (await threadedSource(whole, live, threads, own)) ?? own;
      },
    },
  ];
}

async function* inTurn(stretches: readonly Stretch[], sampling: Sampling): AsyncGenerator<Block> {
  for (const { begin, end, open } of stretches) {
    if (begin >= end) continue;
    const source = await open();
    try {
      yield* blocksInOrder(source, sampling, begin, end);
    } finally {
      await source.close();
    }
  }
}
