// What the report of adjusted families says, and in which order.
import { adjustMethods, adjustSentence, type Adjustment } from '../result/adjust-words.js';
import type { AdjustedLine } from '../result/adjusted-declaration.js';
import { shown } from '../result/label-words.js';
import { countWords, probabilityWords } from '../result/number-words.js';
import { capital } from './capital.js';
import type { Grid, Page, Sentence } from './page.js';

const sentence = (text: string, tone: Sentence['tone'] = 'plain'): Sentence => ({
  kind: 'sentence',
  text: shown(text),
  tone,
});

export const adjustedPage = (
  lines: readonly AdjustedLine[],
  methods: readonly Adjustment[],
  alpha: number,
  remarks: readonly string[],
): Page => ({
  title: 'Which results stand when all are counted?',
  sections: [
    {
      heading: 'What was adjusted',
      blocks: [
        sentence(`${countWords(lines.length)} p-values in ${familiesWords(lines)}.`),
        ...remarks.map((text) => sentence(`${capital(text)}.`)),
      ],
    },
    {
      heading: 'The answer',
      blocks: [sentence(adjustSentence(lines, methods, alpha), 'answer'), gridOf(lines, methods)],
    },
    {
      heading: 'Before you use it',
      blocks: [
        sentence(
          'Count every test that was made, not only those that are shown; choose the procedure before the p-values are seen.',
        ),
        sentence(
          "A decision that can hurt someone belongs with the study's protocol, local rules and a qualified statistician.",
        ),
      ],
    },
    { heading: 'For a methods section', blocks: [sentence(adjustMethods(methods, alpha))] },
  ],
});

function familiesWords(lines: readonly AdjustedLine[]): string {
  const families = new Set(lines.map(({ family }) => family)).size;
  return families === 1 ? 'one family' : `${countWords(families)} families`;
}

function gridOf(lines: readonly AdjustedLine[], methods: readonly Adjustment[]): Grid {
  const isOne = new Set(lines.map(({ family }) => family)).size === 1;
  const words = (p: number | null | undefined): string =>
    p === null || p === undefined ? 'none' : probabilityWords(p);
  return {
    kind: 'grid',
    headings: ['result', ...(isOne ? [] : ['family']), 'p', ...methods],
    rows: lines.map(({ key, family, p, adjusted }) => [
      shown(key),
      ...(isOne ? [] : [shown(family)]),
      words(p),
      ...methods.map((method) => words(adjusted[method])),
    ]),
  };
}
