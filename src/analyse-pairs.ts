// The spine for change in pairs: a square table and wishes in, a result out.
//   1. Which pairs changed, and between which levels.          pairs
//   2. What will be done with them, settled before it starts.  plan
//   3. How far the changes lie from symmetry.                   pairs
//   4. How much of what fair coins do lies as far.              pairs -> cut
//   5. What that says, with its error.                          pvalue
//   6. How strong the change is.                                pairs -> effects
import { exactBowker } from './pairs/bowker-exact.js';
import { expectationsOfChange } from './pairs/expectations.js';
import { changeEffects } from './pairs/change-effects.js';
import { changeForms, unconditionalEntry } from './pairs/change-forms.js';
import { exactHomogeneity } from './pairs/homogeneity-exact.js';
import { homogeneityForm } from './pairs/homogeneity.js';
import { exactMcNemar } from './pairs/mcnemar-exact.js';
import { mcnemarValue, bowkerValue, workFor } from './pairs/work.js';
import { discordantPairs } from './pairs/square-table.js';
import { kappaEffect } from './pairs/kappa-effect.js';
import { normalQuantile } from './pairs/normal-quantile.js';
import type { Answer } from './analyse.js';
import type { Effect } from './effect/contract.js';
import type { ReadTable } from './input/read-table.js';
import type { ExactCut } from './null/contract.js';
import { pairedStatisticOf, planPairs } from './plan/pairs-plan.js';
import type { Plan, PlanOptions } from './plan/plan.js';
import type { PValueEntry, Question } from './pvalue/contract.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import { unsettledNotes } from './result/notes.js';
import { pairNotes } from './result/pairs-notes.js';
import { liveTable } from './table/live-table.js';
import type { Table } from './table/table.js';
import type { Surroundings } from './sampled-answer.js';
import { sampledPairs } from './sampled-pairs.js';

export { refuseUnreadByPairs } from './plan/pairs-plan.js';
export { squareTable } from './pairs/square-table.js';
export { isAgreement } from './statistic/paired.js';

/**
 * Decides whether pairs changed one way more than the other.
 * @param read a table whose rows and columns have the same levels (see `squareTable`).
 * @throws Problem, of kind `usage` or `effort`.
 */
export async function answerPairs(
  read: ReadTable,
  options: PlanOptions,
  surroundings: Surroundings = {},
): Promise<Answer> {
  const { table } = read;
  const levels = table.rowLabels.length;
  const pairs = discordantPairs(table);
  const statistic = pairedStatisticOf(options, levels);
  const form = homogeneityForm(levels, pairs);
  const plan = planPairs(options, statistic, workFor(statistic.name, pairs, form));
  const questions = questionsOf(plan);
  const { there = 0, back = 0 } = pairs[0] ?? {};

  const values = { mcnemar: mcnemarValue(there, back), bowker: bowkerValue(pairs), 'marginal-homogeneity': form.value };
  const value = values[plan.statistic as keyof typeof values];
  const forms = changeForms(plan, questions[0]!, values, pairs, form);
  const found = plan.method === 'asymptotic' ? forms.splice(0, forms.length) : await askCoins();
  if (plan.statistic === 'mcnemar' && pairs.length > 0) {
    found.push(...unconditionalEntry(plan, questions[0]!, there, back, table.total));
  }
  found.push(...forms);

  const nothingChanged = pairs.length === 0;
  return {
    read,
    live: liveTable(table),
    prepared: { plan, named: null },
    value,
    degreesOfFreedom:
      plan.statistic === 'mcnemar' ? undefined : plan.statistic === 'bowker' ? pairs.length : form.degreesOfFreedom,
    pValues: found,
    expectations: expectationsOfChange(pairs),
    tables: undefined,
    effects: await changeEffects(table, plan.confidence),
    notes: [
      ...read.notes,
      ...pairNotes(table, plan, found, nothingChanged),
      ...(await unsettledNotes(found[0]!, plan)),
    ],
  };

  async function askCoins(): Promise<PValueEntry[]> {
    if (plan.statistic === 'mcnemar' && plan.method === 'exact') {
      const { cuts, point } = exactMcNemar(there, back, orderingsNeeded(questions));
      return conditionalPValues(questions, cuts, point, plan.samplingConfidence);
    }
    const others = otherQuestion(plan, levels);
    if (plan.method === 'sample') {
      const asked = [questions, ...others.map((question) => [question])];
      return (await sampledPairs(asked, plan, pairs, form, surroundings)).map(withValue);
    }
    const entries: PValueEntry[] = [];
    for (const question of [questions[0]!, ...others]) {
      const cut = exactCutOf(question.statistic);
      if (cut !== undefined) entries.push(...(await exactEntry(question, cut)));
    }
    return entries.map(withValue);
  }

  /** The headline's engine was found to fit; the other statistic is answered where its own does. */
  function exactCutOf(name: string): ExactCut | undefined {
    const { possible, workUnits } = workFor(name, pairs, form);
    if (!possible || workUnits > plan.effort) return undefined;
    return name === 'bowker' ? exactBowker(pairs, values.bowker) : exactHomogeneity(form, pairs);
  }

  async function exactEntry(question: Question, cut: ExactCut): Promise<PValueEntry[]> {
    const entries = await conditionalPValues([question], [cut], cut.tied, plan.samplingConfidence);
    // The probability of one table is not known where tables were added up by their value.
    for (const entry of entries) delete entry.point;
    return entries;
  }

  /** The headline's value stands with the statistic itself. */
  function withValue(entry: PValueEntry): PValueEntry {
    return entry.statistic === plan.statistic
      ? entry
      : { ...entry, value: values[entry.statistic as keyof typeof values] };
  }
}

/** Beside symmetry, marginal homogeneity, and the other way round; for two levels they are one question. */
function otherQuestion(plan: Plan, levels: number): Question[] {
  if (levels === 2 || plan.statistic === 'mcnemar') return [];
  const statistic = plan.statistic === 'bowker' ? 'marginal-homogeneity' : 'bowker';
  return [{ tail: 'upper', rule: null, statistic }];
}

/** What an analysis of agreement adds to that of an association: kappa with its interval. */
export async function agreementFindings(
  table: Table,
  plan: Plan,
): Promise<{ effects: Effect[]; undefinedBecause: 'one-level-only' }> {
  const z = await normalQuantile(plan.confidence);
  return { effects: [kappaEffect(table, plan.statistic, plan.confidence, z)], undefinedBecause: 'one-level-only' };
}
