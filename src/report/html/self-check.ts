// The validation report as a page: the verdict, what it ran on, and a table for every case. Loaded only by runs that write it.
import type { CheckedCase, SelfCheck } from '../../result/self-check-declaration.js';
import {
  answerWords,
  machineSentences,
  remarks,
  selfCheckTitle,
  sourceSentence,
  verdictSentence,
} from '../self-check.js';
import type { Sentence } from '../page.js';
import { htmlDocument } from './document.js';
import { element, worded, type Markup } from './element.js';
import { sectionMarkup } from './sections.js';
import { gridTable } from './tables.js';

export function selfCheckHtml(report: SelfCheck): string {
  const said = (text: string, tone: Sentence['tone'] = 'plain'): Sentence => ({ kind: 'sentence', text, tone });
  const tone = report.verdict === 'agrees' ? 'answer' : 'warning';
  return htmlDocument({
    title: selfCheckTitle,
    main: [
      worded('h1', selfCheckTitle),
      sectionMarkup({ heading: 'The verdict', blocks: [said(verdictSentence(report), tone)] }, 'h2', ''),
      sectionMarkup(
        { heading: 'What was run', blocks: machineSentences(report).map((words) => said(words)) },
        'h2',
        '',
      ),
      element('section', {}, worded('h2', 'Every case'), ...report.cases.map(caseMarkup)),
      sectionMarkup({ heading: 'Before you use it', blocks: remarks.map((words) => said(words)) }, 'h2', ''),
    ],
    version: report.tool.version,
    record: JSON.stringify(report, null, 2),
  });
}

function caseMarkup(each: CheckedCase): Markup {
  const grid = {
    kind: 'grid' as const,
    headings: ['answer', 'expected', 'obtained', 'difference', 'limit', 'verdict'],
    rows: each.answers.map((answer) => {
      const { what, expected, obtained, difference, limit, verdict } = answerWords(answer);
      return [what, expected, obtained, difference, limit, verdict];
    }),
  };
  return element(
    'section',
    {},
    worded('h3', `${each.id}: ${each.title}`),
    worded('p', sourceSentence(each)),
    gridTable(grid, each.id),
  );
}
