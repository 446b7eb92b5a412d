// Beside the answer of fair coins: the limiting laws of the statistics of change, and McNemar without holding the number of changed pairs.
import type { Plan } from '../plan/plan.js';
import type { PValueEntry, Question } from '../pvalue/contract.js';
import { chiSquarePValue, normalPValue } from '../pvalue/from-asymptotic.js';
import { orderedBy } from '../pvalue/contract.js';
import type { HomogeneityForm } from './homogeneity.js';
import { largestSquare, mostPairs, unconditionalMcNemar } from './mcnemar-unconditional.js';
import type { DiscordantPair } from './square-table.js';

interface Values {
  readonly mcnemar: number;
  readonly bowker: number;
  readonly 'marginal-homogeneity': number;
}

/** The headline's statistic first. Empty where no pair changed: nothing has a limiting law then. */
export function changeForms(
  plan: Plan,
  question: Question,
  values: Values,
  pairs: readonly DiscordantPair[],
  form: HomogeneityForm,
): PValueEntry[] {
  if (pairs.length === 0) return plan.method === 'asymptotic' ? [certain(question)] : [];
  if (plan.statistic === 'mcnemar') {
    const { mcnemar } = values;
    const m = pairs[0]!.there + pairs[0]!.back;
    const shrunk = Math.max(0, Math.abs(mcnemar) - 1 / Math.sqrt(m)) * Math.sign(mcnemar);
    const corrected = normalPValue({ ...question, statistic: 'mcnemar-corrected' }, shrunk);
    return [normalPValue(question, mcnemar), { ...corrected, value: shrunk }];
  }
  const both = [
    { name: 'bowker', value: values.bowker, degrees: pairs.length },
    { name: 'marginal-homogeneity', value: form.value, degrees: form.degreesOfFreedom },
  ];
  const headline = both.find(({ name }) => name === plan.statistic)!;
  return [headline, ...both.filter((one) => one !== headline && form.levels > 2)].map((one) => ({
    ...chiSquarePValue({ ...question, statistic: one.name }, one.value, one.degrees),
    ...(one === headline ? {} : { value: one.value }),
  }));
}

/** No pair changed: whatever the law, p is 1. */
function certain(question: Question): PValueEntry {
  const { tail, rule, statistic } = question;
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: orderedBy(question),
    method: 'asymptotic',
    statistic,
    p: 1,
    log10P: 0,
    strict: 0,
    mid: 0.5,
    tied: 1,
    guaranteed: false,
    errors: [{ kind: 'approximation' }],
  };
}

/** Empty where it is not worked out: too many pairs, or a p near the end of the doubles. */
export function unconditionalEntry(
  plan: Plan,
  question: Question,
  there: number,
  back: number,
  pairs: number,
): PValueEntry[] {
  if (pairs > mostPairs || (there - back) ** 2 > largestSquare * (there + back)) return [];
  const { tail } = plan;
  const { lower, upper, at } = unconditionalMcNemar(there, back, pairs, tail);
  return [
    {
      tail,
      ...(tail === 'both' ? { rule: 'distance' as const } : {}),
      orderedBy: orderedBy({ ...question, rule: tail === 'both' ? 'distance' : null }),
      method: 'unconditional',
      statistic: question.statistic,
      p: upper,
      log10P: Math.log10(upper),
      strict: null,
      mid: null,
      tied: null,
      nuisance: { value: at, certifiedUpper: upper },
      guaranteed: true,
      errors: [{ kind: 'nuisance-maximum', relative: upper / lower - 1 }],
    },
  ];
}
