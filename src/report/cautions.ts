// What a reader should know before using the answer: remarks that belong to this table first, then whether an approximation
// would do, then the cautions that belong to every p-value (Wasserstein & Lazar 2016).
import { isOneTableOnly } from '../result/describe.js';
import { shown } from '../result/label-words.js';
import { digits, percentWords } from '../result/number-words.js';
import type { Result } from '../result/result.js';
import { capital } from './capital.js';
import type { Sentence } from './page.js';

const unitsIndependent =
  'Counts were taken as independent of each other; members of one household, litter or clinic are not.';
const clustersIndependent =
  'Clusters were permuted whole: their members may depend on each other, but clusters were taken as independent of each other, and as assigned to rows whole.';

const rightUse =
  'Association is not causation; a p is neither the size of an effect nor the probability that there is none.';
const whoDecides =
  "A decision that can hurt someone (clinical, food, product safety) belongs with the study's protocol, local rules and a qualified statistician.";

export const cautionsFor = (result: Result): Sentence[] => [
  ...result.notes.map(({ text }) => warning(asSentence(text))),
  ...[
    ...footing(result),
    rightUse,
    result.clusters === undefined ? unitsIndependent : clustersIndependent,
    whoDecides,
  ].map(plain),
];

/** How far an approximation could be leant on here: the expected counts, and what Cochran (1954) advises of them. */
function footing(result: Result): string[] {
  if (isOneTableOnly(result) || result.plan.nullValue !== undefined) return [];
  const { smallestExpected, shareBelowFive, cochranSentence } = result.diagnostics;
  const where = result.plan.fixed === 'pairs' ? ' off the diagonal' : '';
  const share =
    shareBelowFive === 0 ? `no cell${where} expects` : `${percentWords(shareBelowFive)} of the cells${where} expect`;
  const smallest = smallestExpected === 0 ? '0' : digits(smallestExpected, 3);
  return [`The smallest expected count${where} is ${smallest}; ${share} fewer than 5. ${cochranSentence}`];
}

const sentence = (text: string, tone: Sentence['tone']): Sentence => ({ kind: 'sentence', text: shown(text), tone });
const plain = (text: string): Sentence => sentence(text, 'plain');
const warning = (text: string): Sentence => sentence(text, 'warning');

/** Notes are written as clauses or as sentences; here they all become sentences. */
const asSentence = (text: string): string => capital(text) + (/[.!?]$/.test(text) ? '' : '.');
