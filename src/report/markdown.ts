// The report for documents: the same page as headings, paragraphs and a pipe table. Labels are escaped for markdown and
// for html, so that none of them becomes a link, an image or a tag.
import { shown } from '../result/label-words.js';
import { countWords } from '../result/number-words.js';
import type { InputEcho, Result } from '../result/result.js';
import type { Format, ReportSettings } from './format.js';
import { histogramLines, histogramWords } from './histogram.js';
import { marksOf, type Mark, type Marks } from './marks.js';
import { pageFor, type Block, type Grid, type Sentence } from './page.js';

export const markdown: Format = {
  words: 'headings, sentences and a table, for documents',
  write(result, settings) {
    const { title, sections } = pageFor(result);
    const parts = [
      `# ${escaped(title)}`,
      ...sections.flatMap(({ heading, blocks }) => [
        `## ${heading}`,
        ...blocks.map((block) => blockText(block, result, settings)).filter((words) => words !== ''),
      ]),
      '## For a methods section',
      escaped(shown(result.methods)),
    ];
    return `${parts.join('\n\n')}\n`;
  },
};

function blockText(block: Block, result: Result, { histogram }: ReportSettings): string {
  switch (block.kind) {
    case 'sentence':
      return sentenceText(block);
    case 'table':
      return tableText(result.input, marksOf(result));
    case 'grid':
      return gridText(block);
    case 'endings':
      return `${escaped(block.start)}\n\n${block.endings.map(({ number, words }) => `- ${escaped(number)} ${escaped(words)}`).join('\n')}`;
    case 'picture': {
      const { nullSummary } = result;
      if (histogram === undefined || nullSummary === undefined || block.picture !== 'null') return '';
      const lines = histogramLines(nullSummary, 76, histogram).map((line) => `    ${line}`);
      return `${lines.join('\n')}\n\n${escaped(histogramWords(nullSummary))}`;
    }
    case 'command':
      return `    ${block.words.join(' ')}`;
  }
}

function sentenceText({ text, tone }: Sentence): string {
  if (tone === 'answer') return `**${escaped(text)}**`;
  return tone === 'warning' ? `> ${escaped(text)}` : escaped(text);
}

const row = (cells: readonly string[]): string => `| ${cells.join(' | ')} |`;
const ruleUnder = (headings: readonly string[]): string => row(headings.map((_, j) => (j === 0 ? ':--' : '--:')));

const gridText = ({ headings, rows }: Grid): string =>
  [row(headings.map(escaped)), ruleUnder(headings), ...rows.map((cells) => row(cells.map(escaped)))].join('\n');

function tableText(input: InputEcho, marks: Marks | undefined): string {
  const bold = (words: string): string => `**${words}**`;
  const headings = ['', ...input.columnLabels.map(labelText), bold('all')];
  return [
    row(headings),
    ruleUnder(headings),
    ...input.counts.map((counts, i) =>
      row([
        labelText(input.rowLabels[i]!),
        ...counts.map((n, j) => (input.impossible?.[i]?.[j] ? '-' : markedCount(n, marks?.[i]?.[j]))),
        bold(countWords(input.rowTotals[i]!)),
      ]),
    ),
    row([bold('all'), ...[...input.columnTotals, input.total].map((total) => bold(countWords(total)))]),
  ].join('\n');
}

const markedCount = (count: number, mark: Mark = ''): string => `${countWords(count)}${mark === '' ? '' : ` ${mark}`}`;

const labelText = (label: string): string => (label.trim() === '' ? '(blank)' : escaped(shown(label)));

/** Text in which markdown and html find nothing to act on, bare addresses and the start of a list included. */
const escaped = (words: string): string =>
  words
    .trim()
    .replace(/&(?=[#a-z])/gi, '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replace(/[\\`*_[\]|~#$]/g, '\\$&')
    .replace(/:(?=\/\/)/g, '\\:')
    .replace(/\bwww\./gi, (start) => start.replace('.', '\\.'))
    .replace(/^([-+=]|\d+(?=[.)]))/, (start) => (/\d/.test(start) ? `${start}\\` : `\\${start}`));
