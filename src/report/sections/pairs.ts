// What a report on pairs says of its own: the question, what chance does, and how strong change or agreement is.
import { isAbout } from '../../result/describe.js';
import { quoted, shown } from '../../result/label-words.js';
import { digits, levelWords } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Block, Grid } from '../page.js';

/** undefined for results that are not about pairs. */
export function pairsQuestion({ statistic, plan, input, pValues }: Result): string | undefined {
  if (!plan.paired) return undefined;
  if (isAbout(statistic.name) === 'agreement') return 'Do two raters agree more than by chance?';
  const { tail } = pValues[0]!;
  if (statistic.name !== 'mcnemar' || tail === 'both') return 'Did pairs change one way more than the other?';
  const [first, second] = input.rowLabels.map(quoted) as [string, string];
  return tail === 'upper'
    ? `Did more pairs go from ${first} to ${second} than back?`
    : `Did more pairs go from ${second} to ${first} than back?`;
}

const effectNames: Readonly<Record<string, string>> = {
  'matched-odds-ratio': 'matched odds ratio',
  'matched-difference': 'difference',
};

const limitNames: Readonly<Record<string, string>> = {
  'clopper-pearson': 'exact limits',
  'mid-p': 'mid-p limits',
  tango: 'score limits',
  newcombe: "Newcombe's limits",
  wald: "Wald's limits",
  'fleiss-cohen-everitt': 'limits for large counts',
};

type Effects = NonNullable<Result['effects']>;

/** How strong the change or the agreement is. */
export function pairsBlocks(result: Result): Block[] {
  const effects = (result.plan.paired ? result.effects : undefined) ?? [];
  if (effects.length === 0) return [];
  const agreement = isAbout(result.statistic.name) === 'agreement';
  return [gridOf(effects, result.plan.confidence), ...(agreement ? [] : [readingOf(result)])];
}

/** With more than two levels the first interval of each difference stands for all. */
function gridOf(effects: Effects, confidence: number): Grid {
  const many = effects.length > 2;
  return {
    kind: 'grid',
    headings: ['', 'estimate', `${levelWords(confidence)} interval`],
    rows: effects.flatMap(({ name, event, estimate, reason, intervals }) =>
      intervals
        .slice(0, many ? 1 : undefined)
        .map((interval) => [
          many && event !== undefined
            ? quoted(event)
            : `${effectNames[name] ?? shown(name)}, ${limitNames[interval.method] ?? shown(interval.method)}`,
          valueWords(estimate, reason),
          interval.reason === undefined
            ? `${valueWords(interval.lower)} to ${valueWords(interval.upper)}`
            : valueWords(null, interval.reason),
        ]),
    ),
  };
}

function readingOf({ effects = [], input }: Result): Block {
  const [first, second] = input.rowLabels.map(quoted) as [string, string];
  const text =
    effects.length > 2
      ? 'For each level: its share in the rows minus its share in the columns, with score limits (Tango 1998); levels are taken one at a time.'
      : `The odds ratio is that of going from ${first} to ${second} against going back; the difference is the share of ${first} in the rows minus that in the columns.`;
  return { kind: 'sentence', text, tone: 'plain' };
}

function valueWords(number: Effects[number]['estimate'], reason?: string): string {
  if (number === null) return `none (${(reason ?? 'unknown').replaceAll('-', ' ')})`;
  if (typeof number === 'string') return number === 'infinity' ? 'infinite' : 'minus infinite';
  return number === 0 ? '0' : digits(number, 3);
}

/** What chance does, for tests of change. */
export const coinSentence =
  'Chance turns every changed pair round or not, like a fair coin; pairs on the diagonal take no part.';
