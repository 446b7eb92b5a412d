// What stands beside the p-values of one table: how strong the association is, whether p and intervals agree, how much one
// count could change, and what in the table asks for another look. None of it changes a p.
import type { Answer } from './analyse.js';
import { disagreements, pByRule } from './effect/agreement.js';
import { effectsOf } from './effect/effects-of.js';
import { fragilityOf } from './one-count-moved.js';
import type { Prepared } from './plan/make-plan.js';
import { isTwoByTwo } from './plan/roles.js';
import type { PlanOptions } from './plan/plan.js';
import type { Findings } from './result/build-result.js';
import { disagreementNotes, straddleNotes } from './result/agreement-notes.js';
import { hintNotes } from './result/hints.js';

/** @param options as given for the answer. */
export async function besideThe(
  { read, live, pValues, notes }: Answer,
  prepared: Prepared,
  options: PlanOptions,
): Promise<Pick<Findings, 'effects' | 'fragility' | 'pValues' | 'notes'>> {
  const { plan, statistic, bound, named } = prepared;
  const { table } = read;
  const effects = await effectsOf(table, live, isTwoByTwo(table, live) ? named : null, plan);
  // Rules and moved counts are those of the p given both margins.
  const isConditional = prepared.design === 'conditional';
  const { leastAttainable, fragility } = isConditional
    ? await fragilityOf(table, live, prepared, options)
    : { leastAttainable: undefined, fragility: undefined };
  const [headline, ...others] = pValues;
  const isTwoSided = headline!.tail === 'both' || (statistic.sided === 'upper' && headline!.tail === 'upper');
  const rules =
    !isConditional ||
    bound === null ||
    named === null ||
    live.rows !== 2 ||
    live.columns !== 2 ||
    !isTwoSided ||
    statistic.own
      ? []
      : await pByRule(live, statistic, bound, named, plan);
  return {
    effects,
    fragility,
    pValues: [leastAttainable === undefined ? headline! : { ...headline!, leastAttainable }, ...others],
    notes: [
      ...notes,
      ...straddleNotes(rules, plan.alpha),
      ...(isTwoSided && plan.nullValue === undefined
        ? disagreementNotes(disagreements(effects, headline!, plan), headline!, plan)
        : []),
      ...hintNotes(table, live, statistic, plan.ordered !== undefined),
    ],
  };
}
