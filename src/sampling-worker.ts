// What runs on a worker thread: prepares a sampler from a recipe, once, and counts the blocks it is asked for. Only the
// built file is ever loaded by a thread.
import { ranksFor } from './cell/which-cells.js';
import type { OrderingName } from './null/contract.js';
import { orderingFor } from './null/ordering.js';
import { localSource, type BlockSource } from './null/sampled/block-source.js';
import type { Sampling, Tally } from './null/sampled/sample-cuts.js';
import { makePlan } from './plan/make-plan.js';
import type { PlanOptions } from './plan/plan.js';
import { liveTable } from './table/live-table.js';
import { makeTable, type TableParts } from './table/table.js';

/** All that a thread needs to draw and judge the same tables as any other; plain data, so that it can be sent. */
export interface SamplingRecipe {
  readonly parts: TableParts;
  readonly options: PlanOptions;
  readonly orderings: readonly OrderingName[];
  readonly sampling: Sampling;
  /** Whether the smallest p of the cells is judged too. */
  readonly ranked?: boolean;
}

export interface CountTask {
  readonly recipe: SamplingRecipe;
  readonly first: number;
  readonly end: number;
}

let prepared: { name: string; source: BlockSource } | undefined;

/** Tallies of the blocks from `first` to before `end`. */
export default function countBlocks({ recipe, first, end }: CountTask): Promise<readonly (readonly Tally[])[]> {
  const name = JSON.stringify(recipe);
  if (prepared?.name !== name) prepared = { name, source: sourceOf(recipe) };
  return prepared.source.tallies(first, end);
}

function sourceOf({ parts, options, orderings, sampling, ranked }: SamplingRecipe): BlockSource {
  const table = makeTable(parts);
  const live = liveTable(table);
  const { bound } = makePlan(table, live, options);
  if (bound === null) throw new Error('one table only: nothing to draw');
  return localSource(
    live,
    orderings.map((ordering) => orderingFor(live, bound, ordering)),
    sampling,
    ranked ? ranksFor(live) : undefined,
  );
}
