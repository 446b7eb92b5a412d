// What the report of several outcomes tested together says, and in which order.
import { quoted, shown } from '../result/label-words.js';
import { countWords, digits } from '../result/number-words.js';
import type { TogetherResult } from '../result/together-declaration.js';
import { drawnWords, effectWords } from '../result/together-words.js';
import type { Grid, Page, Sentence } from './page.js';

const sentence = (text: string, tone: Sentence['tone'] = 'plain'): Sentence => ({
  kind: 'sentence',
  text: shown(text),
  tone,
});

export function togetherPage(result: TogetherResult): Page {
  const { input, plan, outcomes, notes } = result;
  const { rule, records, dropped } = input.missing;
  const fate =
    (dropped === 0 ? '' : `; ${countWords(dropped)} subjects with a value missing were left out`) +
    (rule === 'level' ? '; missing was kept as a level of its own' : '');
  return {
    title: 'Which outcomes differ between the groups?',
    sections: [
      {
        heading: 'What was tested',
        blocks: [
          `${outcomes.length} outcomes of ${countWords(input.total)} subjects in the groups ${input.groups.map(quoted).join(', ')}.`,
          `${countWords(records)} records were read${fate}.`,
          `Chance deals the groups to the subjects anew, each subject keeping all its outcomes: ${countWords(plan.draws)} times, seed ${quoted(plan.seed)}.`,
        ].map((text) => sentence(text)),
      },
      {
        heading: 'The answer',
        blocks: [
          sentence(result.sentence, 'answer'),
          gridOf(result),
          sentence(
            'An adjusted p speaks for all outcomes together: the probability to see any as extreme, were none related to the groups. Tau is the share of error that knowing the group takes away in guessing the outcome.',
          ),
        ],
      },
      {
        heading: 'Before you use it',
        blocks: [
          ...notes.map(({ text }) => sentence(text, 'warning')),
          sentence('Association is not causation. Subjects were taken as independent of each other.'),
          sentence(
            "A decision that can hurt someone (clinical, food, product safety) belongs with the study's protocol, local rules and a qualified statistician.",
          ),
        ],
      },
    ],
  };
}

const gridOf = ({ outcomes, plan }: TogetherResult): Grid => ({
  kind: 'grid',
  headings: ['outcome', 'chi-square', 'tau', 'p alone', 'adjusted: largest', 'adjusted: smallest p'],
  rows: outcomes.map((outcome) => [
    shown(outcome.label),
    digits(outcome.statistic, 4),
    effectWords(outcome.effect),
    drawnWords(outcome.alone, plan.draws),
    drawnWords(outcome.maxT, plan.draws),
    drawnWords(outcome.minP, plan.draws),
  ]),
});
