// The spine for strata: tables that share their levels and wishes in, a result out.
//   1. Which strata say anything, and what they are asked.       table -> strata
//   2. What will be done, settled before it starts.               plan
//   3. How far all of them together lie from independence.       strata
//   4. How much of what chance does within strata lies as far.    strata -> cut
//   5. What that says, with its error.                           pvalue
//   6. Whether the strata agree, and how strong the association is.
import type { ReadTable } from './input/read-table.js';
import { onlyTable } from './null/exact/exact-cuts.js';
import { OutOfReach } from './null/exact/out-of-reach.js';
import type { Plan, PlanOptions } from './plan/plan.js';
import { rolesOf } from './plan/roles.js';
import { unused } from './plan/settings.js';
import { planStrata, refuseUnreadByStrata, stratifiedStatisticOf } from './plan/strata-plan.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import { buildResult } from './result/build-result.js';
import { emptyLineNotes, onlyOneTable, unsettledNotes } from './result/notes.js';
import type { Result } from './result/result.js';
import { strataNotes } from './result/strata-notes.js';
import type { Surroundings } from './sampled-answer.js';
import { sampledStrata } from './sampled-strata.js';
import { score } from './statistic/score.js';
import { chooseFamily, twoByTwos } from './strata/choose-family.js';
import type { StrataFamily } from './strata/family.js';
import { pointOf } from './strata/point.js';
import { strataFound } from './strata/strata-found.js';
import { checkExpectations } from './table/expectation-check.js';
import { liveTable, type LiveTable } from './table/live-table.js';

/**
 * Decides whether rows and columns are associated once the strata are held apart.
 * @param read a table with strata
 * @param withEffects whether to say how strong the association is
 * @throws Problem, of kind `usage` or `effort`.
 */
export async function analyseStrata(
  read: ReadTable,
  options: PlanOptions,
  surroundings: Surroundings = {},
  withEffects = true,
): Promise<Result> {
  if (read.clusters !== undefined) throw unused('--cluster', 'with --strata', 'leave one of the two out');
  const { table } = read;
  const live = liveTable(table);
  const tables = read.strata!.map(({ counts }) => counts);
  const statistic = stratifiedStatisticOf(options, live.rows <= 2 && live.columns <= 2);
  refuseUnreadByStrata(statistic, options);
  const roles = statistic.name === 'common-odds-ratio' ? rolesOf(table, live, score, options) : null;
  const { family, pooled, shown } = chooseFamily(statistic.name, table, live, tables, roles, options);
  const planFor = (wishes: PlanOptions): Plan => planStrata(wishes, statistic, family.work, roles, shown);

  const first = planFor(options);
  try {
    return await carryOut(first);
  } catch (thrown) {
    if (!(thrown instanceof OutOfReach) || first.methodAsked === 'exact') throw thrown;
    const methodReason =
      'the observed tables are too improbable for the exact law over strata, which is held in doubles';
    return carryOut({ ...planFor({ ...options, method: 'sample' }), methodAsked: first.methodAsked, methodReason });
  }

  async function carryOut(plan: Plan): Promise<Result> {
    const questions = questionsOf(plan);
    const nothingVaries = family.layers.length === 0;
    const found = await askNull(plan, questions, family, live, surroundings);
    const beside = plan.method === 'asymptotic' ? [] : family.approximations(questions[0]!);
    const homogeneity = nothingVaries ? [] : await family.homogeneity();
    // Limits of the conditional odds ratio need the law of the exact test.
    const withLaw = !nothingVaries && family.work.workUnits <= plan.effort;
    const corners = roles === null ? null : twoByTwos([...tables, table.counts], live, roles);
    const facts = strataFound(
      read.source.strataFrom ?? null,
      read.strata!,
      corners?.slice(0, -1) ?? null,
      pooled,
      corners?.at(-1) ?? null,
      questions[0]!,
      plan.confidence,
    );
    return buildResult({
      read,
      plan,
      named: roles,
      value: family.value,
      degreesOfFreedom: family.degreesOfFreedom,
      pValues: [...found, ...beside, ...homogeneity],
      expectations: nothingVaries ? checkExpectations(live) : family.expectations,
      tables: undefined,
      effects: withEffects ? await family.effects(plan.confidence, withLaw) : undefined,
      strata: facts,
      notes: [
        ...read.notes,
        ...emptyLineNotes(table),
        ...(nothingVaries ? [onlyOneTable] : []),
        ...strataNotes(plan, facts, beside[0] ?? found[0]!, family.value, homogeneity),
        ...(await unsettledNotes(found[0]!, plan)),
      ],
    });
  }
}

/** The p-values of the questions, by the method of the plan. */
async function askNull(
  plan: Plan,
  questions: readonly Question[],
  family: StrataFamily,
  live: LiveTable,
  surroundings: Surroundings,
): Promise<PValueEntry[]> {
  const names = orderingsNeeded(questions);
  if (family.layers.length === 0) {
    const { cuts, point } = onlyTable({ ...live, rows: 1 }, names);
    return conditionalPValues(questions, cuts, point, plan.samplingConfidence);
  }
  if (plan.method === 'asymptotic') return questions.flatMap((question) => family.approximations(question));
  if (plan.method === 'sample') return sampledStrata(questions, plan, family, surroundings);
  return conditionalPValues(questions, family.exact(names), pointOf(family.layers), plan.samplingConfidence);
}
