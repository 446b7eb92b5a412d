// What the order of rows and columns adds: which way the counts go, how strongly, and which question each test answers.
import { errorAside, foundWords, pNumber, shortStatisticWords, tailOf } from '../../result/describe.js';
import { quoted, shown } from '../../result/label-words.js';
import { digits } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Block, Endings, Sentence } from '../page.js';

type Order = NonNullable<Result['order']>;
type Ending = Endings['endings'][number];
type Asks = Order['questions'][number]['asks'];
type Effect = NonNullable<Result['effects']>[number];

/** Which way the counts go, and how strongly. */
export const orderBlocks = (result: Result): Block[] =>
  result.order === undefined ? [] : [...measures(result), ...directionSentence(result.order).map(plain)];

/** The questions that an order allows, each with its p: ends of "p would be". */
export const orderEndings = ({ order }: Result): Ending[] =>
  (order?.questions ?? []).map((question) => ({
    number: pNumber(question.p),
    words: `${meaning[question.asks]} ${answerWords(question)}`,
  }));

const plain = (text: string): Sentence => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

const meaning: Readonly<Record<Asks, string>> = {
  'any-departure': 'asking whether rows and columns are related in any way, the order left out:',
  'rise-together': 'asking whether they rise or fall together, by their scores:',
  'rise-of-any-shape': 'asking whether responses rise, or fall, with the groups as listed, in steps of any size:',
  'groups-on-a-scale': 'asking whether the groups lie alike on the ordered scale:',
};

/** It may have draws of its own, so the seed stands with it. */
const answerWords = ({ p, seed }: Order['questions'][number]): string =>
  `${tailOf(p)}, by ${shortStatisticWords(p.statistic)}, ${foundWords(p, seed ?? null)}${errorAside(p)}`;

function directionSentence({ direction }: Order): string[] {
  if (direction === undefined) return [];
  const { correlation, fromRow, toRow, towardsColumn } = direction;
  if (correlation === 0) return ['By the scores the counts move neither way: their correlation is 0.'];
  return [
    `From ${quoted(fromRow)} to ${quoted(toRow)} the counts move towards ${quoted(towardsColumn)}: the correlation of row and column scores is ${digits(correlation, 2)}.`,
  ];
}

const names: Readonly<Record<string, string>> = {
  gamma: 'gamma (Goodman & Kruskal 1954)',
  'tau-b': 'tau-b (Kendall 1945)',
  'tau-c': 'tau-c (Stuart 1953)',
  'somers-d-columns': "Somers' d of columns given rows (1962)",
  'somers-d-rows': "Somers' d of rows given columns (1962)",
};

/** The measures as a small table. */
function measures({ effects = [] }: Result): Block[] {
  const rows = effects.flatMap((effect) => (effect.name in names ? [measureRow(effect)] : []));
  if (rows.length === 0) return [];
  const level = effects.find(({ name }) => name === 'gamma')?.intervals[0]?.confidence;
  return [
    {
      kind: 'grid',
      headings: ['measure', 'value', level === undefined ? '' : `${digits(100 * level, 2)}% limits, large-sample`],
      rows,
    },
  ];
}

function measureRow({ name, estimate, intervals }: Effect): string[] {
  const number = (value: number | string | null): string => (typeof value === 'number' ? digits(value, 3) : 'none');
  const [interval] = intervals;
  return [
    names[name]!,
    number(estimate),
    interval === undefined ? '' : `${number(interval.lower)} to ${number(interval.upper)}`,
  ];
}
