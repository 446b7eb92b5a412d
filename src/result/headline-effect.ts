// The one effect that the sentence for a report names beside p, with its interval where it has one (Wasserstein & Lazar 2016).
import { quoted } from './label-words.js';
import { digits, levelWords } from './number-words.js';
import type { ResultBeforeWords } from './describe.js';
import type { Effect, EffectInterval } from './result.js';
import { pairedMethod } from './shown-effects.js';

type Extended = NonNullable<Effect['estimate']>;

/** "95% interval 2.06 to 1,770"; undefined where there is none. */
export function intervalWords(interval: EffectInterval | undefined, words = numberWords): string | undefined {
  if (interval === undefined || interval.lower === null || interval.upper === null) return undefined;
  return `${levelWords(interval.confidence)} interval ${words(interval.lower)} to ${words(interval.upper)}`;
}

/**
 * A clause with the effect of a table whose statistic compares no two groups: of a 2x2 table the odds ratio, of ordered sides
 * gamma, else how far columns can be told from rows. undefined where none was worked out.
 */
export function effectClause(result: ResultBeforeWords): string | undefined {
  const { effects = [] } = result;
  const named = (name: string): Effect | undefined => effects.find((effect) => effect.name === name);
  const odds = named('conditional-odds-ratio');
  if (odds !== undefined) return clause(oddsWords(result), odds, pairedMethod(result));
  const gamma = named('gamma');
  if (gamma !== undefined) return clause('gamma', gamma, 'large-sample');
  const strength = named('cramer-v-corrected');
  if (strength?.intervals.length) return clause("Cramer's V without bias", strength, 'bootstrap');
  const foretold = effects.find(({ name, predicts }) => name === 'goodman-kruskal-tau' && predicts === 'columns');
  if (foretold !== undefined) return clause("Goodman and Kruskal's tau (columns from rows)", foretold, 'delta');
  return undefined;
}

function clause(words: string, { estimate, intervals }: Effect, method: string): string | undefined {
  if (estimate === null) return undefined;
  const interval = intervalWords(intervals.find((one) => one.method === method));
  return `${words} is ${numberWords(estimate)}${interval === undefined ? '' : ` (${interval})`}`;
}

/** "the odds ratio of "healed" in "treated" against "control", given the margins,". */
function oddsWords({ plan, input }: ResultBeforeWords): string {
  const labels = plan.groups === 'columns' ? input.columnLabels : input.rowLabels;
  const first = labels.find((label) => label !== plan.reference);
  return plan.event === null || plan.reference === null || first === undefined || labels.length !== 2
    ? 'the odds ratio given the margins'
    : `the odds ratio of ${quoted(plan.event)} in ${quoted(first)} against ${quoted(plan.reference)}, given the margins,`;
}

function numberWords(value: Extended): string {
  if (typeof value !== 'number') return value === 'infinity' ? 'infinite' : 'minus infinite';
  return value === 0 ? '0' : digits(value, 3);
}
