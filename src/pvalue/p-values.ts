// All p-values of a run, the one asked for first: from the cuts of its null, with the asymptotic one beside them.
import type { Cut, ExactCut, Mass, OrderingName, SampledCut } from '../null/contract.js';
import { orderingFor, type Plan } from '../plan/plan.js';
import { usageProblem } from '../problem/problem.js';
import type { PValueEntry, Question } from './contract.js';
import { chiSquarePValue, normalPValue } from './from-asymptotic.js';
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
export const orderingsNeeded = (questions: readonly Question[]): OrderingName[] => [
  ...new Set(questions.flatMap(({ tail, rule }) => orderingFor(tail, rule))),
];

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
      return second === undefined
        ? sampledPValue(question, first as SampledCut, samplingConfidence)
        : sampledDoubled(question, first as SampledCut, second as SampledCut, samplingConfidence);
    }),
  );
}

/** @throws Problem (usage) `no-asymptotic-value` where the approximation was asked for and has nothing to say. */
export function asymptoticAlone(
  questions: readonly Question[],
  value: number,
  degreesOfFreedom: number | undefined,
): PValueEntry[] {
  return questions.map((question) => {
    const found = asymptoticPValue(question, value, degreesOfFreedom);
    if (found !== undefined) return found;
    throw usageProblem({
      code: 'no-asymptotic-value',
      message: `the ${question.tail} tail of ${question.statistic} has no asymptotic p at the value ${value}`,
      place: '--method asymptotic',
      hint: 'use --method exact or --method sample',
    });
  });
}

/** The approximation, or undefined where it has nothing to say (an infinite value; no value below the observed). */
export function asymptoticPValue(
  question: Question,
  value: number,
  degreesOfFreedom: number | undefined,
): PValueEntry | undefined {
  if (!Number.isFinite(value)) return undefined;
  if (degreesOfFreedom === undefined) return normalPValue(question, value);
  if (question.tail === 'lower' && value <= 0) return undefined;
  return chiSquarePValue(question, value, Math.max(1, degreesOfFreedom));
}
