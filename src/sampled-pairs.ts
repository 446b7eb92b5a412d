// From blocks of random splits of changed pairs to p-values: all of a fixed number, or until the headline is settled. What the other
// statistics say comes from the same draws.
import type { OrderingName, SampledCut } from './null/contract.js';
import { blocksInOrder } from './null/sampled/block-source.js';
import type { Sampling, Tally } from './null/sampled/sample-cuts.js';
import type { HomogeneityForm } from './pairs/homogeneity.js';
import { pairDraws, tallyFor } from './pairs/pair-draws.js';
import type { DiscordantPair } from './pairs/square-table.js';
import type { Plan } from './plan/plan.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { conditionalPValues, orderingsNeeded } from './pvalue/p-values.js';
import { followQuestions } from './pvalue/sequential/follow-questions.js';
import type { Surroundings } from './sampled-answer.js';

/** @param asked the questions of each statistic, the headline's first. */
export async function sampledPairs(
  asked: readonly (readonly Question[])[],
  plan: Plan,
  pairs: readonly DiscordantPair[],
  form: HomogeneityForm,
  surroundings: Surroundings,
): Promise<PValueEntry[]> {
  const most = plan.draws === 'auto' ? plan.mostDraws! : plan.draws!;
  const sampling: Sampling = { seed: plan.seed!, tableKey: plan.tableKey, draws: most };
  const followers = plan.draws === 'auto' ? asked.map((questions) => followQuestions(questions, plan)) : null;
  const sums: [number, number, number][] = [];
  let draws = 0;
  for await (const block of blocksInOrder(pairDraws(pairs, form, sampling), sampling)) {
    draws += block.draws;
    block.tallies.forEach((tally, k) => tally.forEach((count, side) => ((sums[k] ??= [0, 0, 0])[side]! += count)));
    surroundings.onProgress?.(draws, most);
    const settled = followers?.map((one, k) => {
      const { statistic } = asked[k]![0]!;
      return one.settles((ordering) => atLeast(block.tallies[tallyFor(statistic, ordering)]!), block.draws);
    });
    if (settled?.[0]) break;
  }
  const cutOf =
    (statistic: string) =>
    (ordering: OrderingName): SampledCut => {
      const [below, tied, above] = sums[tallyFor(statistic, ordering)]!;
      return { kind: 'sampled', ordering, below, tied, above, draws };
    };
  const entries = asked.map((questions, k) => {
    const cut = cutOf(questions[0]!.statistic);
    if (followers !== null) return Promise.resolve(followers[k]!.pValues(cut));
    return conditionalPValues(questions, orderingsNeeded(questions).map(cut), null, plan.samplingConfidence);
  });
  return (await Promise.all(entries)).flat();
}

const atLeast = ([, tied, above]: Tally): number => tied + above;
