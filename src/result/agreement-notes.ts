// Remarks for when tests and intervals of the same table do not say the same, in plain words.
import { pairedRule, type Disagreement, type RuleP } from '../effect/agreement.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry } from '../pvalue/contract.js';
import { levelWords, probabilityWords } from './number-words.js';
import type { Note } from './result.js';

/** The rules lie on both sides of alpha: which one is asked decides the verdict. */
export function straddleNotes(rules: readonly RuleP[], alpha: number): Note[] {
  const below = rules.filter(({ p }) => p <= alpha);
  if (below.length === 0 || below.length === rules.length) return [];
  const listed = rules.map(({ rule, p }) => `${rule} ${probabilityWords(p)}`).join(', ');
  return [
    {
      code: 'two-sided-rules-straddle',
      text: `The exact two-tailed p is on both sides of ${alpha} depending on the two-sided rule (${listed}): the rule has to be chosen before the counts are seen.`,
    },
  ];
}

const effectWords: Readonly<Record<string, string>> = {
  'risk-difference': 'risk difference',
  'risk-ratio': 'risk ratio',
  'odds-ratio': 'odds ratio',
  'conditional-odds-ratio': 'odds ratio given the margins',
};

/** p and some intervals differ in their verdict on "no effect". */
export function disagreementNotes(found: readonly Disagreement[], headline: PValueEntry, plan: Plan): Note[] {
  if (found.length === 0) return [];
  const rejects = headline.p === null || headline.p <= plan.alpha;
  const listed = found.map(({ effect, method }) => `${effectWords[effect] ?? effect} (${method})`).join(', ');
  const level = levelWords(plan.confidence);
  const verdict = rejects
    ? `p is at most ${plan.alpha}, yet these ${level} intervals hold the value of no effect: ${listed}`
    : `p is above ${plan.alpha}, yet these ${level} intervals leave out the value of no effect: ${listed}`;
  return [
    { code: 'interval-disagrees', text: `${verdict}. They come from other tests than p does; ${pairWords(headline)}.` },
  ];
}

function pairWords(headline: PValueEntry): string {
  switch (pairedRule(headline)) {
    case 'doubled':
      return 'the central interval is the one that goes with this p';
    case 'probability':
      return 'the interval named probability is the one that goes with this p';
    case 'blaker':
      return 'the interval named blaker is the one that goes with this p';
    default:
      return 'none of the intervals goes with this p: for a pair that agrees use a two-sided rule that has one (doubled, probability, blaker)';
  }
}
