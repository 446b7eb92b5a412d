// What a report for people says, and in which order, before any format lays it out: what was tested, the table, the
// answer with its error, how strong, how fragile, other readings, the footing of the approximation, cautions, how to run it again.
import { citedStatistic, isOneTableOnly, pSentence, tableWords, tiesSentence } from '../result/describe.js';
import { errorSentences } from '../result/error-sentences.js';
import { levelSentences } from '../result/level-words.js';
import { designSentences } from '../result/design-words.js';
import { quoted, shown } from '../result/label-words.js';
import { strataInWords } from '../result/strata-words.js';
import { digits, percentWords } from '../result/number-words.js';
import { statedOpening, statedQuestion } from '../result/stated-words.js';
import type { Result } from '../result/result.js';
import { cautionsFor } from './cautions.js';
import type { PictureName } from './pictures/names.js';
import { pairsQuestion, pairsSection } from './sections/pairs.js';
import { quasiSection } from './sections/quasi.js';
import { againCommand, againInWords, againSentences } from './run-again.js';
import { comparisonBlocks } from './sections/comparisons.js';
import { orderSection } from './sections/order.js';
import { cellsBlocks } from './sections/cells.js';
import { fragilityBlocks } from './sections/fragility.js';
import { strengthBlocks } from './sections/effects.js';
import { isOfAgreement, strataSections } from './sections/strata.js';
import { clusterSentences, methodSentences, missingSentences, sourceWords } from './setting.js';

export interface Sentence {
  readonly kind: 'sentence';
  readonly text: string;
  readonly tone: 'plain' | 'answer' | 'warning' | 'aside';
}

/** The table of the result stands here. */
export interface TablePlace {
  readonly kind: 'table';
}

/** A command to type, in words that each stay whole, and the same as a sentence for where it does not fit. */
export interface Command {
  readonly kind: 'command';
  readonly words: readonly string[];
  readonly otherwise: string;
}

/** A small table of words and numbers, headed; the first column holds names, the others stand to the right. */
export interface Grid {
  readonly kind: 'grid';
  readonly headings: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** A picture of the result; formats that cannot draw it say or show what they can. */
export interface PicturePlace {
  readonly kind: 'picture';
  readonly picture: PictureName;
}

export type Block = Sentence | TablePlace | Command | Grid | PicturePlace;

export interface Section {
  readonly heading: string;
  readonly blocks: readonly Block[];
}

export interface Page {
  readonly title: string;
  readonly sections: readonly Section[];
}

export function pageFor(result: Result): Page {
  return {
    title: pairsQuestion(result) ?? questionOf(result),
    sections: sectionsOf(result).filter((section) => section.blocks.length > 0),
  };
}

const forestBlock = ({ strata }: Result): Block[] =>
  strata?.oddsRatios === undefined ? [] : [{ kind: 'picture', picture: 'strata' }];

const sectionsOf = (result: Result): Section[] => [
  { heading: 'What was tested', blocks: tested(result) },
  { heading: 'The table', blocks: [{ kind: 'table' }, { kind: 'picture', picture: 'mosaic' }] },
  ...strataSections(result)
    .slice(0, 1)
    .map(({ heading, blocks }) => ({ heading, blocks: [...blocks, ...forestBlock(result)] })),
  { heading: 'The answer', blocks: answer(result) },
  { heading: 'How strong is it?', blocks: result.strata === undefined ? strengthBlocks(result) : [] },
  { heading: 'How fragile is it?', blocks: fragilityBlocks(result) },
  ...strataSections(result).slice(1),
  { heading: 'Other readings of the same table', blocks: otherReadings(result) },
  orderSection(result),
  pairsSection(result),
  { heading: 'Which cells?', blocks: cellsBlocks(result) },
  { heading: 'Which lines differ?', blocks: comparisonBlocks(result) },
  { heading: 'If the study fixed something else', blocks: designSentences(result).map(plain) },
  quasiSection(result),
  { heading: 'Would an approximation do?', blocks: footing(result) },
  { heading: 'Before you use it', blocks: cautionsFor(result).map(({ text, tone }) => sentence(text, tone)) },
  { heading: 'To run it again', blocks: again(result) },
];

function questionOf(result: Result): string {
  const question = wholeQuestion(result);
  return result.strata === undefined ? question : question.replace(/\?$/, ', stratum by stratum?');
}

function wholeQuestion(result: Result): string {
  const { statistic, pValues } = result;
  if (statistic.groups === undefined || statistic.event === undefined) return 'Are rows and columns related?';
  const [first, second] = statistic.groups.map(({ label }) => quoted(label));
  const event = quoted(statistic.event);
  const tail = pValues[0]!.tail;
  const stated = statedQuestion(result);
  if (stated !== undefined) return stated;
  if (tail === 'both') return `Is ${event} as common in ${first} as in ${second}?`;
  return `Is ${event} more common in ${tail === 'upper' ? `${first} than in ${second}` : `${second} than in ${first}`}?`;
}

/** A result may have been read from a file, so nothing in it is printed unseen. */
const sentence = (text: string, tone: Sentence['tone']): Sentence => ({ kind: 'sentence', text: shown(text), tone });
const plain = (text: string): Sentence => sentence(text, 'plain');

const tested = (result: Result): Block[] => [
  plain(
    result.strata === undefined
      ? `A ${tableWords(result)}, ${sourceWords(result)}.`
      : `${strataInWords(result)}, ${sourceWords(result)}.`,
  ),
  ...missingSentences(result).map(plain),
  ...levelSentences(result.input).map(plain),
  ...clusterSentences(result).map(plain),
  plain(
    result.plan.nullValue === undefined
      ? `Measured by ${citedStatistic(result.statistic.name)}.`
      : statedOpening(result.pValues[0]!)!,
  ),
  ...methodSentences(result).map(plain),
];

function answer(result: Result): Block[] {
  const picture: Block[] = result.nullSummary?.bins.length ? [{ kind: 'picture', picture: 'null' }] : [];
  return [sentence(result.sentence, 'answer'), ...errorSentences(result.pValues[0]!).map(plain), ...picture];
}

function otherReadings(result: Result): Block[] {
  if (isOneTableOnly(result)) return [];
  const [headline, ...others] = result.pValues.filter(({ statistic }) => !isOfAgreement(statistic));
  const ties = tiesSentence(headline!);
  return [...(ties === undefined ? [] : [ties]), ...others.map((p) => pSentence(result, p))].map(plain);
}

function footing(result: Result): Block[] {
  if (isOneTableOnly(result) || result.plan.nullValue !== undefined) return [];
  const { smallestExpected, shareBelowFive, cochranSentence } = result.diagnostics;
  const where = result.plan.fixed === 'pairs' ? ' off the diagonal' : '';
  const share =
    shareBelowFive === 0 ? `no cell${where} expects` : `${percentWords(shareBelowFive)} of the cells${where} expect`;
  return [
    plain(
      `The smallest expected count${where} is ${smallestExpected === 0 ? '0' : digits(smallestExpected, 3)}; ${share} fewer than 5.`,
    ),
    plain(cochranSentence),
  ];
}

function again(result: Result): Block[] {
  const words = againCommand(result);
  const otherwise = againInWords(result);
  const first: Block = words === undefined ? plain(otherwise) : { kind: 'command', words, otherwise: shown(otherwise) };
  return [first, ...againSentences(result).map((text) => sentence(text, 'aside'))];
}
