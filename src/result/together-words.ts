// Several outcomes tested together, in words: one sentence for a report, and the paragraph behind it.
import { intervalWords } from './headline-effect.js';
import { quoted } from './label-words.js';
import { countWords, digits, levelWords, probabilityWords, roundedTo } from './number-words.js';
import type { TogetherResult } from './together-declaration.js';

type Before = Omit<TogetherResult, 'sentence' | 'methods'>;
type Outcome = Before['outcomes'][number];

/** No further than the error of drawing allows. */
export function drawnWords({ p, estimate }: Outcome['alone'], draws: number): string {
  const error = Math.sqrt((estimate * (1 - estimate)) / draws);
  return roundedTo(error === 0 ? p : error, p);
}

export const effectWords = (effect: Outcome['effect']): string =>
  typeof effect?.estimate === 'number' ? (effect.estimate === 0 ? '0' : digits(effect.estimate, 3)) : 'none';

export function togetherSentence({ outcomes, input, plan }: Before): string {
  const [least] = [...outcomes].sort((a, b) => a.maxT.p - b.maxT.p);
  const { maxT, alone, effect, label } = least!;
  const interval = intervalWords(effect?.intervals[0]);
  const size =
    effect === undefined
      ? ''
      : `tau (outcome from group) is ${effectWords(effect)}${interval === undefined ? '' : ` (${interval})`}, `;
  return (
    `Of ${countWords(outcomes.length)} outcomes of ${countWords(input.total)} subjects in ${input.groups.length} groups, ${quoted(label)} stands furthest out: ` +
    `${size}its upper-tailed permutation p is ${drawnWords(alone, plan.draws)} alone and ${drawnWords(maxT, plan.draws)} adjusted over all ` +
    `by the largest statistic (${levelWords(plan.samplingConfidence)} interval ${probabilityWords(maxT.interval[0])} to ${probabilityWords(maxT.interval[1])}), ` +
    `sampled by dealing the groups anew ${countWords(plan.draws)} times (seed ${quoted(plan.seed)}).`
  );
}

export function togetherMethods({ input, plan, outcomes, tool }: Before): string {
  return (
    `${outcomes.length} outcomes of ${countWords(input.total)} subjects in ${input.groups.length} groups were each tested with Pearson's chi-square statistic (Pearson 1900). ` +
    `The groups were dealt to the subjects anew ${countWords(plan.draws)} times (seed ${quoted(plan.seed)}; generator ${plan.generator}), each subject keeping all its outcomes, and p-values were adjusted ` +
    'step-down by the largest statistic (maxT) and by the smallest p (minP), the p of each outcome taken from the same draws (Westfall & Young 1993; Ge, Dudoit & Speed 2003). ' +
    'Both hold the family-wise error when groups and outcomes that are not related are so together (subset pivotality). ' +
    `p is (b + 1) / (m + 1) with b of m draws at least as extreme (Phipson & Smyth 2010), with ${levelWords(plan.samplingConfidence)} intervals for b / m (Clopper & Pearson 1934). ` +
    'Effects: tau, outcome from group (Goodman & Kruskal 1954), with 95% intervals by the delta method (Goodman & Kruskal 1972). ' +
    `Computed with ${tool.name} ${tool.version}.`
  );
}
