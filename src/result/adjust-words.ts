// An adjusted family in words: one sentence for a report, and the paragraph behind it.
import type { Adjustment } from '../family/adjust.js';
import type { AdjustedLine } from './adjusted-declaration.js';
import { quoted } from './label-words.js';
import { countWords, probabilityWords } from './number-words.js';
import { version } from './version.js';

export type { Adjustment };

/** What a procedure promises, and where it comes from. */
const procedures: Readonly<Record<Adjustment, readonly [promise: 'any' | 'share', source: string]>> = {
  bonferroni: ['any', 'Dunn 1961'],
  holm: ['any', 'Holm 1979'],
  hochberg: ['any', 'Hochberg 1988'],
  tarone: ['any', 'Tarone 1990'],
  'benjamini-hochberg': ['share', 'Benjamini & Hochberg 1995'],
  'benjamini-yekutieli': ['share', 'Benjamini & Yekutieli 2001'],
  gilbert: ['share', 'Gilbert 2005'],
};

/** Of the first procedure asked for, family by family: how many stay at the level, and the smallest. */
export function adjustSentence(lines: readonly AdjustedLine[], [method]: readonly Adjustment[], alpha: number): string {
  const families = [...new Set(lines.map(({ family }) => family))];
  const parts = families.map((family) => {
    const members = lines.filter((line) => line.family === family);
    const values = members.flatMap(({ key, adjusted }) => {
      const value = adjusted[method!];
      return value === null || value === undefined ? [] : [{ key, value }];
    });
    const [least] = [...values].sort((a, b) => a.value - b.value);
    const within = values.filter(({ value }) => value <= alpha).length;
    const smallest =
      least === undefined ? 'none has one' : `the smallest is ${probabilityWords(least.value)} (${quoted(least.key)})`;
    return `${countWords(within)} of ${countWords(members.length)} tests in family ${quoted(family)} have a p adjusted by ${method!} of at most ${alpha}; ${smallest}`;
  });
  return `${parts.join('. ')}.`;
}

export function adjustMethods(methods: readonly Adjustment[], alpha: number): string {
  const of = (promise: 'any' | 'share'): string =>
    methods
      .filter((method) => procedures[method][0] === promise)
      .map((method) => `${method} (${procedures[method][1]})`)
      .join(', ');
  const [any, share] = [of('any'), of('share')];
  return [
    'p-values were adjusted within each family, to the smallest level at which the procedure rejects (Wright 1992).',
    ...(any === '' ? [] : [`For the probability of any false finding: ${any}.`]),
    ...(share === '' ? [] : [`For the expected share of false findings among all findings: ${share}.`]),
    ...(methods.includes('hochberg') || methods.includes('benjamini-hochberg')
      ? ['Hochberg and Benjamini-Hochberg take the tests as independent or positively dependent.']
      : []),
    ...(methods.includes('gilbert') ? [`gilbert took in the tests that could reach ${alpha}.`] : []),
    `Computed with keepsum ${version}.`,
  ].join(' ');
}
