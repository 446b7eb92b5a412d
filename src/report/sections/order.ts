// What the order of rows and columns adds: which question each test answers, which way the counts go, and how strongly.
import { errorAside, foundWords, pName, pNumber, shortStatisticWords } from '../../result/describe.js';
import { quoted, shown } from '../../result/label-words.js';
import { digits } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Block, Section, Sentence } from '../page.js';

type Order = NonNullable<Result['order']>;
type Asks = Order['questions'][number]['asks'];
type Effect = NonNullable<Result['effects']>[number];

export const orderSection = (result: Result): Section => ({
  heading: 'What the order adds',
  blocks: result.order === undefined ? [] : [...sentences(result.order).map(plain), ...measures(result)],
});

const plain = (text: string): Sentence => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

const sentences = (order: Order): string[] => [
  ...directionSentence(order),
  ...order.questions.map((question) => `${meaning[question.asks]} ${answerSentence(question)}`),
  ...(order.questions.length === 0
    ? []
    : [
        'A test that uses the order finds a steady rise or fall with fewer units; it can miss a rise followed by a fall. Choose the question before you see the answers.',
      ]),
];

const meaning: Readonly<Record<Asks, string>> = {
  'any-departure': 'Are rows and columns related in any way, the order left out?',
  'rise-together': 'Do they rise or fall together, by their scores?',
  'rise-of-any-shape': 'Do the responses rise, or fall, with the groups in their listed order, in steps of any size?',
  'groups-on-a-scale': 'Do the groups lie alike on the ordered scale?',
};

/** It may have draws of its own, so the seed stands with it. */
function answerSentence({ p, seed }: Order['questions'][number]): string {
  const found = foundWords(p, seed ?? null);
  return `The ${pName(p)} of ${shortStatisticWords(p.statistic)} is ${pNumber(p)}${errorAside(p)}${p.method === 'asymptotic' ? ' ' : ', '}${found}.`;
}

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
