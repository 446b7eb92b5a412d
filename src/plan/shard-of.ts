// A part of a sampled run: every so many blocks of a fixed number of draws, to be pooled with the others later.
import { blockSize } from '../null/sampled/limits.js';
import { usageProblem, type Problem } from '../problem/problem.js';
import type { ChosenMethod, Plan, PlanOptions, Shard } from './plan.js';
import { unused } from './settings.js';

/** @throws Problem (usage) where draws are not of a fixed number, or there are fewer blocks than parts. */
export function shardOf(
  { shard, seed }: PlanOptions,
  method: ChosenMethod,
  draws: Plan['draws'],
): { readonly shard?: Shard } {
  if (shard === undefined) return {};
  const { index, of } = shard;
  if (!(Number.isInteger(index) && Number.isInteger(of) && index >= 1 && index <= of)) {
    throw usageProblem({
      code: 'not-a-shard',
      message: `part ${index} of ${of} is none`,
      place: '--shard',
      hint: 'for example --shard 3/16: the third of sixteen parts',
    });
  }
  if (method !== 'sample' || typeof draws !== 'number') {
    throw unused(
      '--shard',
      method === 'sample'
        ? 'with --draws auto: parts cannot know when all together are settled'
        : `with the method ${method}, which draws nothing`,
      'add --method sample --draws N',
    );
  }
  if (seed === undefined) throw partNeedsSeed();
  if (Math.ceil(draws / blockSize) < of) {
    throw usageProblem({
      code: 'more-shards-than-blocks',
      message: `${draws} draws are ${Math.ceil(draws / blockSize)} blocks of ${blockSize}, fewer than ${of} parts`,
      place: '--shard',
      hint: `take at least --draws ${of * blockSize}, or fewer parts`,
    });
  }
  return { shard: { index, of } };
}

/** Each part would make a seed of its own. */
export const partNeedsSeed = (): Problem =>
  usageProblem({
    code: 'part-needs-seed',
    message: 'a part needs the seed that all parts of its run share',
    place: '--shard',
    hint: 'add --seed TEXT, the same for every part',
  });
