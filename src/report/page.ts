// What a report for people says, and in which order, before any format lays it out: what was tested, the table, the
// answer with its error, the effect, the cells, what another choice would change, how fragile, cautions, how to run it again.
import { errorSentences } from '../result/error-sentences.js';
import { quoted, shown } from '../result/label-words.js';
import { statedQuestion } from '../result/stated-words.js';
import type { Result } from '../result/result.js';
import { cautionsFor } from './cautions.js';
import { legendWords, marksOf } from './marks.js';
import type { PictureName } from './pictures/names.js';
import { againCommand, againInWords, againSentences } from './run-again.js';
import { cellsBlocks } from './sections/cells.js';
import { choiceBlocks } from './sections/choices.js';
import { comparisonBlocks } from './sections/comparisons.js';
import { strengthBlocks } from './sections/effects.js';
import { fragilityBlocks } from './sections/fragility.js';
import { orderBlocks } from './sections/order.js';
import { pairsBlocks, pairsQuestion } from './sections/pairs.js';
import { quasiSection } from './sections/quasi.js';
import { agreementSection, strataBlocks, strataSection } from './sections/strata.js';
import { methodSentence, testedSentences } from './setting.js';

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

/** Endings of one sentence, a line each: the number first, then under what choice it comes out. */
export interface Endings {
  readonly kind: 'endings';
  readonly start: string;
  readonly endings: readonly { readonly number: string; readonly words: string }[];
}

/** A picture of the result; formats that cannot draw it say or show what they can. */
export interface PicturePlace {
  readonly kind: 'picture';
  readonly picture: PictureName;
}

export type Block = Sentence | TablePlace | Command | Grid | Endings | PicturePlace;

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

const sectionsOf = (result: Result): Section[] => [
  { heading: 'What was tested', blocks: testedSentences(result).map(plain) },
  { heading: 'The table', blocks: table(result) },
  strataSection(result),
  { heading: 'The answer', blocks: answer(result) },
  {
    heading: 'How strong is it?',
    blocks: [...strataBlocks(result), ...pairsBlocks(result), ...strengthBlocks(result), ...orderBlocks(result)],
  },
  agreementSection(result),
  { heading: 'Which cells?', blocks: cellsBlocks(result) },
  { heading: 'Which lines differ?', blocks: comparisonBlocks(result) },
  quasiSection(result),
  { heading: 'What another choice would change', blocks: choiceBlocks(result) },
  { heading: 'How fragile is it?', blocks: fragilityBlocks(result) },
  { heading: 'Before you use it', blocks: cautionsFor(result) },
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

const table = (result: Result): Block[] => [
  { kind: 'table' },
  ...(marksOf(result) === undefined ? [] : [plain(legendWords(result))]),
  { kind: 'picture', picture: 'mosaic' },
];

function answer(result: Result): Block[] {
  const picture: Block[] = result.nullSummary?.bins.length ? [{ kind: 'picture', picture: 'null' }] : [];
  return [sentence(result.sentence, 'answer'), ...errorSentences(result.pValues[0]!).map(plain), ...picture];
}

function again(result: Result): Block[] {
  const words = againCommand(result);
  const otherwise = againInWords(result);
  const first: Block = words === undefined ? plain(otherwise) : { kind: 'command', words, otherwise: shown(otherwise) };
  return [first, ...[methodSentence(result), ...againSentences(result)].map((text) => sentence(text, 'aside'))];
}
