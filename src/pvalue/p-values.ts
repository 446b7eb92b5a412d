// All p-values of a run, the one asked for first: from the cuts of its null, in the order of the questions.
import type { BracketCut, Cut, ExactCut, Mass, OrderingName, SampledCut } from '../null/contract.js';
import { orderingFor, type Plan } from '../plan/plan.js';
import type { PValueEntry, Question } from './contract.js';
import { bracketDoubled, bracketPValue } from './from-bracket.js';
import { exactDoubled, exactPValue } from './from-exact.js';
import { sampledDoubled, sampledPValue } from './from-sampled.js';

/** What is reported: the question of the plan, and for two tails each tail alone as well. */
export function questionsOf(plan: Plan): Question[] {
  const { statistic } = plan;
  const headline: Question = { tail: plan.tail, rule: plan.twoSidedRule, statistic };
  if (plan.tail !== 'both') return [headline];
  return [headline, { tail: 'upper', rule: null, statistic }, { tail: 'lower', rule: null, statistic }];
}

/** The orderings whose cuts those questions need, each once. */
export function orderingsNeeded(questions: readonly Question[]): OrderingName[] {
  const names: OrderingName[] = [];
  for (const { tail, rule } of questions) {
    for (const name of orderingFor(tail, rule)) if (!names.includes(name)) names.push(name);
  }
  return names;
}

/** @param point probability of the observed table; needed for exact cuts only. */
export async function conditionalPValues(
  questions: readonly Question[],
  cuts: readonly Cut[],
  point: Mass | null,
  samplingConfidence: number,
): Promise<PValueEntry[]> {
  const cutFor = (name: OrderingName): Cut => cuts.find(({ ordering }) => ordering === name)!;
  return Promise.all(
    questions.map(async (question) => {
      const [first, second] = orderingFor(question.tail, question.rule).map(cutFor);
      if (first!.kind === 'exact') {
        return second === undefined
          ? exactPValue(question, first as ExactCut, point!)
          : exactDoubled(question, first as ExactCut, second as ExactCut, point!);
      }
      if (first!.kind === 'bracket') {
        return second === undefined
          ? bracketPValue(question, first as BracketCut, point!)
          : bracketDoubled(question, first as BracketCut, second as BracketCut, point!);
      }
      return second === undefined
        ? sampledPValue(question, first as SampledCut, samplingConfidence)
        : sampledDoubled(question, first as SampledCut, second as SampledCut, samplingConfidence);
    }),
  );
}
