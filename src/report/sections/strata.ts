// What a report says of strata: the tables side by side, the common measures with their limits, whether the strata agree.
import { isOneTableOnly, pSentence } from '../../result/describe.js';
import { shown } from '../../result/label-words.js';
import { countWords, levelWords } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import { numberWords } from '../../result/strata-words.js';
import type { Block, Grid, Section, Sentence } from '../page.js';

const plain = (text: string): Sentence => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

const agreement: readonly string[] = ['breslow-day', 'tarone', 'zelen'];

/** p-values that the strata section says, so that no other one does. */
export const isOfAgreement = (statistic: string): boolean => agreement.includes(statistic);

/** Their tables, and a picture of their odds ratios where they have any. */
export const strataSection = (result: Result): Section => ({
  heading: 'The strata',
  blocks:
    result.strata === undefined
      ? []
      : [
          tablesGrid(result),
          ...(result.strata.oddsRatios === undefined ? [] : [{ kind: 'picture', picture: 'strata' } as const]),
        ],
});

/** How strong it is over all strata. */
export const strataBlocks = (result: Result): Block[] => (result.strata === undefined ? [] : measures(result));

export const agreementSection = (result: Result): Section => ({
  heading: 'Do the strata agree?',
  blocks: result.strata === undefined ? [] : agreementBlocks(result),
});

/** More cells than this make a line that nobody reads; only totals are shown then. */
const mostCells = 8;

function tablesGrid({ input, strata }: Result): Grid {
  const { labels, tables, totals, oddsRatios } = strata!;
  const cells = input.rowLabels.length * input.columnLabels.length;
  const rows = cells <= mostCells ? input.rowLabels.map((label) => shown(label)) : [];
  const widths = input.columnLabels.map(shown).join(' / ');
  return {
    kind: 'grid',
    headings: [
      rows.length === 0 ? '' : `counts: ${widths}`,
      ...rows,
      'all',
      ...(oddsRatios === undefined ? [] : ['odds ratio']),
    ],
    rows: labels.map((label, s) => [
      shown(label.trim() === '' ? '(blank)' : label),
      ...rows.map((_, i) => tables[s]![i]!.map(countWords).join(' / ')),
      countWords(totals[s]!),
      ...(oddsRatios === undefined ? [] : [numberWords(oddsRatios[s]!)]),
    ]),
  };
}

const names: Readonly<Record<string, string>> = {
  'conditional-odds-ratio': 'conditional odds ratio',
  'mantel-haenszel-odds-ratio': 'Mantel-Haenszel odds ratio',
  'mantel-haenszel-risk-ratio': 'Mantel-Haenszel risk ratio',
  'mantel-haenszel-risk-difference': 'Mantel-Haenszel risk difference',
};

const methodNames: Readonly<Record<string, string>> = {
  'exact-conditional': 'exact',
  'mid-p-conditional': 'mid-p',
  'robins-breslow-greenland': 'Robins 1986',
  'greenland-robins': 'Greenland 1985',
  sato: 'Sato 1989',
};

function measures({ effects = [], plan }: Result): Block[] {
  const known = effects.filter(({ name }) => name in names);
  if (known.length === 0) return [];
  const rows = known.flatMap((effect) =>
    effect.intervals.map(({ method, lower, upper }) => [
      names[effect.name]!,
      numberWords(effect.estimate),
      lower === null || upper === null ? 'none' : `${numberWords(lower)} to ${numberWords(upper)}`,
      methodNames[method] ?? method,
    ]),
  );
  return [{ kind: 'grid', headings: ['', 'estimate', `${levelWords(plan.confidence)} limits`, ''], rows }];
}

function agreementBlocks(result: Result): Block[] {
  if (isOneTableOnly(result)) return [];
  return result.pValues.filter(({ statistic }) => isOfAgreement(statistic)).map((p) => plain(pSentence(result, p)));
}
