// How strong the association is: a few measures with their intervals, and in words what the numbers do not say themselves.
import type { Effect, EffectInterval, Result } from '../../result/result.js';
import { quoted, shown } from '../../result/label-words.js';
import { digits, levelWords } from '../../result/number-words.js';
import { pairedMethod, shownEffects } from '../../result/shown-effects.js';
import type { Block, Grid, Sentence } from '../page.js';

type Extended = NonNullable<Effect['estimate']>;

export function strengthBlocks(result: Result): Block[] {
  const effects = shownEffects(result);
  if (effects.length === 0 || result.strata !== undefined) return [];
  const level = levelWords(result.plan.confidence);
  const grid: Grid = {
    kind: 'grid',
    headings: ['', 'estimate', `${level} interval`, 'method'],
    rows: effects.map(({ effect, words, interval, method }) => [
      words,
      effect.estimate === null ? 'none' : valueWords(effect.estimate),
      interval === undefined ? '' : limitsWords(interval),
      interval === undefined ? '' : (method ?? interval.method),
    ]),
  };
  const missing = effects.flatMap(({ effect, words }) =>
    effect.estimate === null ? [`No estimate of the ${words}: ${reasonWords(effect.reason)}.`] : [],
  );
  const remarks = [
    ...missing,
    ...openWords(effects.map(({ interval }) => interval)),
    ...needed(result),
    ...pairing(result),
  ];
  return [...whoIsCompared(result), grid, ...remarks.map(plain)];
}

const plain = (text: string): Sentence => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

function whoIsCompared({ plan, input, effects }: Result): Sentence[] {
  if (effects?.[0]?.direction === undefined || plan.reference === null || plan.event === null) return [];
  const labels = plan.groups === 'columns' ? input.columnLabels : input.rowLabels;
  const empty = plan.groups === 'columns' ? input.emptyColumns : input.emptyRows;
  const live = labels.filter((label) => labels.length === 2 || !empty.includes(label));
  const first = live.find((label) => label !== plan.reference) ?? '';
  return [plain(`${quoted(plan.event)} in ${quoted(first)}, compared with ${quoted(plan.reference)}:`)];
}

/** Four significant digits; infinite in words. */
function valueWords(value: Extended): string {
  if (value === 'infinity') return 'infinite';
  if (value === '-infinity') return '-infinite';
  return value === 0 ? '0' : digits(value, 3);
}

function limitsWords({ lower, upper, reason }: EffectInterval): string {
  if (lower === null || upper === null) return `none: ${reasonWords(reason)}`;
  return `${valueWords(lower)} to ${valueWords(upper)}`;
}

const reasons: Readonly<Record<NonNullable<EffectInterval['reason']>, string>> = {
  'empty-group': 'a group is empty',
  'no-events': 'no events',
  'only-events': 'nothing but events',
  'zero-cell': 'an empty cell',
  'zero-variance': 'no spread',
  'only-one-table': 'the margins allow one table only',
  'one-level-only': 'one level only',
  'at-boundary': 'at the end of its range',
  'difference-may-be-zero': 'the difference may be 0',
  'no-discordant-pairs': 'no pair differs',
  'beyond-effort': 'too much work at this total',
  'tied-maximum': 'tied largest counts',
};

const reasonWords = (reason: EffectInterval['reason']): string => (reason === undefined ? 'unknown' : reasons[reason]);

/** An interval without an end on one side says why. */
function openWords(intervals: readonly (EffectInterval | undefined)[]): string[] {
  const open = intervals.some((interval) => interval?.lower === '-infinity' || interval?.upper === 'infinity');
  return open
    ? ['An interval without end means that the counts set no limit on that side; nothing was added to empty cells.']
    : [];
}

/** The number needed to treat, and what an interval through infinity means (Altman 1998). */
function needed({ effects, plan }: Result): string[] {
  const effect = effects?.find(({ name }) => name === 'number-needed-to-treat');
  const interval = effect?.intervals.find(({ method }) => method === 'newcombe');
  if (effect === undefined || effect.estimate === null || interval === undefined) return [];
  const { lower, upper } = interval;
  if (lower === null || upper === null) return [];
  const more = (value: Extended): string => (typeof value === 'number' && value < 0 ? 'fewer' : 'more');
  const size = (value: Extended): string =>
    typeof value === 'number' ? digits(Math.abs(value), 3) : 'infinitely many';
  const estimate =
    effect.estimate === 'infinity'
      ? 'Number needed to treat: infinite, for the proportions are equal'
      : `Number needed to treat: one event ${more(effect.estimate)} for every ${size(effect.estimate)} units`;
  const level = levelWords(plan.confidence);
  return [
    interval.throughInfinity
      ? `${estimate}; its ${level} interval holds "no difference": from one event more for every ${size(lower)} units, through infinitely many, to one event fewer for every ${size(upper)} (Altman 1998).`
      : `${estimate} (${level} interval ${[size(lower), size(upper)].sort((a, b) => Number(a) - Number(b)).join(' to ')}).`,
  ];
}

/** Which exact interval goes with the p, so that the two cannot contradict each other (Fay 2010). */
function pairing(result: Result): string[] {
  const exact = result.effects?.find(({ name }) => name === 'conditional-odds-ratio');
  const headline = result.pValues[0]!;
  if (exact === undefined || headline.tail === 'lower' || result.notes.some(({ code }) => code === 'only-one-table'))
    return [];
  const method = pairedMethod(result);
  const interval = exact.intervals.find((one) => one.method === method);
  const rule = headline.rule ?? (headline.statistic === 'probability' ? 'probability' : undefined);
  const gap = interval?.setHasGap
    ? [' The values that this test does not reject have a gap; the interval spans it.']
    : [];
  if (interval?.invertsP === rule) {
    return [`The exact interval holds the odds ratios that this p does not reject (Fay 2010).${gap.join('')}`];
  }
  return headline.tail === 'both' || headline.rule === undefined
    ? [
        'The exact interval goes with the two-sided rule doubled; no interval inverts the p above, so that close to the level the two can differ.',
      ]
    : [];
}
