// What a reader should know before using the answer: remarks that belong to this table first, then the cautions that
// belong to every p-value (Wasserstein & Lazar 2016).
import type { Result } from '../result/result.js';
import type { Sentence } from './page.js';

const standing = [
  'Association is not causation.',
  'A p says how well chance alone explains the counts; it is not the size of an effect, nor the probability that there is none.',
  'Counts were taken as independent of each other; members of one household, litter or clinic are not.',
  "A decision that can hurt someone (clinical, food, product safety) belongs with the study's protocol, local rules and a qualified statistician.",
] as const;

export const cautionsFor = (result: Result): Sentence[] => [
  ...result.notes.map(({ text }) => warning(asSentence(text))),
  ...standing.map((text): Sentence => ({ kind: 'sentence', text, tone: 'plain' })),
];

const warning = (text: string): Sentence => ({ kind: 'sentence', text, tone: 'warning' });

/** Notes are written as clauses or as sentences; here they all become sentences. */
const asSentence = (text: string): string =>
  text.replace(/^[a-z]/, (letter) => letter.toUpperCase()) + (/[.!?]$/.test(text) ? '' : '.');
