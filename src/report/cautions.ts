// What a reader should know before using the answer: remarks that belong to this table first, then the cautions that
// belong to every p-value (Wasserstein & Lazar 2016).
import type { Result } from '../result/result.js';
import type { Sentence } from './page.js';

const unitsIndependent =
  'Counts were taken as independent of each other; members of one household, litter or clinic are not.';
const clustersIndependent =
  'Clusters were permuted whole: their members may depend on each other, but clusters were taken as independent of each other, and as assigned to rows whole.';

const standing = [
  'Association is not causation.',
  'A p says how well chance alone explains the counts; it is not the size of an effect, nor the probability that there is none.',
  unitsIndependent,
  "A decision that can hurt someone (clinical, food, product safety) belongs with the study's protocol, local rules and a qualified statistician.",
] as const;

export const cautionsFor = (result: Result): Sentence[] => [
  ...result.notes.map(({ text }) => warning(asSentence(text))),
  ...standingFor(result).map((text): Sentence => ({ kind: 'sentence', text, tone: 'plain' })),
];

/** With clusters the units within one need no independence, the clusters do. */
const standingFor = ({ clusters }: Result): readonly string[] =>
  clusters === undefined ? standing : standing.map((text) => (text === unitsIndependent ? clustersIndependent : text));

const warning = (text: string): Sentence => ({ kind: 'sentence', text, tone: 'warning' });

/** Notes are written as clauses or as sentences; here they all become sentences. */
const asSentence = (text: string): string =>
  text.replace(/^[a-z]/, (letter) => letter.toUpperCase()) + (/[.!?]$/.test(text) ? '' : '.');
