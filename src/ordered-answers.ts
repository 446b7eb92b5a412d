// What a declared order adds to an answer: the questions that use it, each asked by a statistic of its own with the same
// method, and measures of how strongly the two sides rise together. Like the spine, this joins stages.
import { findingsOf, type Answer } from './analyse.js';
import type { Effect } from './effect/contract.js';
import { directionOf, type Direction } from './order/direction.js';
import { ordinalEffects } from './order/measures.js';
import { orderOf, questionsBeside, type OrderQuestion, type Ordered } from './order/questions.js';
import type { Plan, PlanOptions } from './plan/plan.js';
import { statisticFound } from './result/build-result.js';
import type { Result } from './result/result.js';

export interface OrderedAnswers {
  readonly order: NonNullable<Result['order']>;
  readonly effects: readonly Effect[];
}

/** Seeds the draws of a question that must be sampled where the answer itself was not and no seed was given. */
const standInSeed = 'order';

/** Draws of a question that must be sampled, where no number was given. */
const standardDraws = 100_000;

/**
 * @param ask answers one statistic for the same table; called once for each question that the headline leaves open.
 * @returns undefined where no order was declared and the statistic implies none.
 */
export async function orderedAnswers(
  { read: { table }, live, prepared: { plan } }: Answer,
  options: PlanOptions,
  ask: (options: PlanOptions) => Promise<Answer>,
): Promise<OrderedAnswers | undefined> {
  const ordered = orderOf(live, plan);
  if (ordered === undefined || live.rows < 2 || live.columns < 2) return undefined;
  const questions: NonNullable<Result['order']>['questions'] = [];
  // The further tests take time, so they wait for a declared order.
  const asked = plan.ordered === undefined ? [] : questionsBeside(live, plan, ordered);
  for (const question of asked) questions.push(await answered(question));
  const { jStat } = await import('jstat');
  const quantile = jStat.normal.inv((1 + plan.confidence) / 2, 0, 1);
  return {
    order: { ordered, ...directionPart(ordered), questions },
    effects: ordered === 'both' ? ordinalEffects(table, plan.confidence, quantile) : [],
  };

  async function answered(question: OrderQuestion): Promise<NonNullable<Result['order']>['questions'][number]> {
    const seed = plan.seed ?? options.seed ?? standInSeed;
    const found = await ask(wishesFor(question, plan, options, seed));
    const { plan: made } = found.prepared;
    return {
      asks: question.asks,
      statistic: statisticFound(findingsOf(found)),
      ...(made.groups === null || question.groups === undefined ? {} : { groups: made.groups }),
      ...(made.rowScores === undefined ? {} : { rowScores: made.rowScores }),
      ...(made.columnScores === undefined ? {} : { columnScores: made.columnScores }),
      ...(made.seed === null ? {} : { seed: made.seed }),
      p: found.pValues[0]!,
    };
  }

  function directionPart(side: Ordered): { direction?: Direction } {
    const direction = side === 'both' ? directionOf(table, plan.rowScores, plan.columnScores) : undefined;
    return direction === undefined ? {} : { direction };
  }
}

/** The same wishes for another statistic; what only the headline reads is left out. */
function wishesFor(question: OrderQuestion, plan: Plan, options: PlanOptions, seed: string): PlanOptions {
  const { rowScores, columnScores } = options;
  const { statistic, groups, reads } = question;
  return {
    statistic,
    ...(groups === undefined ? {} : { groups }),
    ...(reads.includes('rowScores') && rowScores !== undefined ? { rowScores } : {}),
    ...(reads.includes('columnScores') && columnScores !== undefined ? { columnScores } : {}),
    // A question that exact work cannot reach is sampled, and says so, rather than losing the answer that was asked for.
    method: plan.methodAsked === 'exact' ? 'auto' : plan.methodAsked,
    ...(plan.methodAsked === 'asymptotic'
      ? {}
      : {
          seed,
          draws: typeof options.draws === 'number' ? options.draws : standardDraws,
        }),
    effort: plan.effort,
    alpha: plan.alpha,
    samplingConfidence: plan.samplingConfidence,
  };
}
