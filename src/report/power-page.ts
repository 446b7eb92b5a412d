// What the report of a planned study says, and in which order, before any format lays it out.
import { powerNumber, sizesWords, testName } from '../result/power-words.js';
import { quoted, shown } from '../result/label-words.js';
import { digits } from '../result/number-words.js';
import type { PowerResult } from '../result/power-declaration.js';
import type { Block, Grid, Page, Sentence } from './page.js';

/** Where a page shows the curve. */
export const answerHeading = 'The answer';

const cautions = [
  'Power speaks of the probabilities that were assumed; they are guesses until the study is done.',
  'Sizes of a study that can hurt someone are settled with its protocol, local rules and a qualified statistician.',
];

const sentence = (text: string, tone: Sentence['tone'] = 'plain'): Sentence => ({
  kind: 'sentence',
  text: shown(text),
  tone,
});

export const powerPage = (result: PowerResult): Page => ({
  title: 'How likely is the planned study to find the difference?',
  sections: [
    { heading: 'The plan', blocks: planned(result) },
    { heading: answerHeading, blocks: answered(result) },
    {
      heading: 'Before you use it',
      blocks: [...result.notes.map(({ text }) => sentence(text, 'warning')), ...cautions.map((text) => sentence(text))],
    },
  ],
});

const planned = ({ plan }: PowerResult): Block[] => [
  sentence(`Test: ${testName(plan)}, rejecting at p <= ${plan.alpha}.`),
  ...plan.groups.map(({ label, probabilities }) =>
    sentence(
      `${quoted(label)}: ${probabilities.length === 1 ? 'event' : 'outcomes'} with probability ${probabilities.join(', ')}.`,
    ),
  ),
];

function answered(result: PowerResult): Block[] {
  const [{ size } = { size: undefined }, ...more] = result.answers;
  return [
    sentence(result.sentence, 'answer'),
    ...(more.length > 0 ? [gridOf(result)] : []),
    ...(size === undefined
      ? []
      : [sentence(`When the groups are alike it rejects with probability ${digits(size, 3)} at most.`)]),
  ];
}

const gridOf = ({ plan, answers }: PowerResult): Grid => ({
  kind: 'grid',
  headings: ['groups', 'power', ...(plan.method === 'exact' ? ['size'] : [])],
  rows: answers.map((answer) => [
    shown(sizesWords(plan, answer)),
    powerNumber(answer),
    ...(answer.size === undefined ? [] : [digits(answer.size, 3)]),
  ]),
});
