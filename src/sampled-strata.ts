// From blocks of random tables within strata to p-values: all of a fixed number, or until the headline is settled.
import type { OrderingName, SampledCut } from './null/contract.js';
import { blocksInOrder, type BlockSource } from './null/sampled/block-source.js';
import { drawsInBlock, type Sampling, type Tally } from './null/sampled/sample-cuts.js';
import type { Plan } from './plan/plan.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { conditionalPValues, orderingsNeeded } from './pvalue/p-values.js';
import { followQuestions } from './pvalue/sequential/follow-questions.js';
import { blockStream } from './random/stream.js';
import type { Surroundings } from './sampled-answer.js';
import type { StrataFamily } from './strata/family.js';
import type { LayerSampler } from './strata/general/sample-layers.js';

/** Blocks made between two pauses. */
const stride = 8;

export async function sampledStrata(
  questions: readonly Question[],
  plan: Plan,
  family: StrataFamily,
  surroundings: Surroundings,
): Promise<PValueEntry[]> {
  const most = plan.draws === 'auto' ? plan.mostDraws! : plan.draws!;
  const sampling: Sampling = { seed: plan.seed!, tableKey: plan.tableKey, draws: most };
  const names = orderingsNeeded(questions);
  const follower = plan.draws === 'auto' ? followQuestions(questions, plan) : null;
  const sums = names.map((): [number, number, number] => [0, 0, 0]);
  let draws = 0;
  for await (const block of blocksInOrder(sourceOf(family.sampler(names), sampling), sampling)) {
    draws += block.draws;
    block.tallies.forEach((tally, o) => tally.forEach((count, side) => (sums[o]![side]! += count)));
    surroundings.onProgress?.(draws, most);
    const atLeast = (name: OrderingName): number => {
      const [, tied, above] = block.tallies[names.indexOf(name)]!;
      return tied + above;
    };
    if (follower?.settles(atLeast, block.draws)) break;
  }
  const cuts = names.map((ordering, o): SampledCut => {
    const [below, tied, above] = sums[o]!;
    return { kind: 'sampled', ordering, below, tied, above, draws };
  });
  return follower === null
    ? conditionalPValues(questions, cuts, null, plan.samplingConfidence)
    : follower.pValues((name) => cuts.find(({ ordering }) => ordering === name)!);
}

function sourceOf(sampler: LayerSampler, sampling: Sampling): BlockSource {
  return {
    stride,
    ahead: false,
    tallies(first, end) {
      const found: Tally[][] = [];
      for (let block = first; block < end; block++) {
        const stream = blockStream(sampling.seed, sampling.tableKey, block);
        found.push(sampler.countBlock(stream, drawsInBlock(sampling.draws, block)));
      }
      return Promise.resolve(found);
    },
    close: () => Promise.resolve(),
  };
}
