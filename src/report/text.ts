// The report for a terminal: the page, folded to the width, with colour that only repeats what words say.
import type { Result } from '../result/result.js';
import { displayWidth, padLeft } from './display-width.js';
import { fold } from './fold.js';
import type { Format, Painter, ReportSettings } from './format.js';
import { marksOf } from './marks.js';
import { pageFor, type Block, type Command, type Endings, type Section, type Sentence } from './page.js';
import { histogramLines, histogramWords } from './histogram.js';
import { gridLines } from './text-grid.js';
import { tableLines } from './text-table.js';

const narrowest = 40;
/** Longer lines of prose are hard to follow; tables use the whole width. */
const widestProse = 96;
const margin = 2;
const hanging = { first: margin, rest: margin + 2 };

export const text: Format = {
  words: 'for reading on a screen',
  write(result, settings) {
    const width = Math.max(narrowest, Math.floor(settings.width));
    const { title, sections } = pageFor(result);
    const lines = [
      ...fold(title, width).map((line) => settings.paint.bold(line)),
      ...sections.flatMap((section) => ['', ...sectionLines(section, result, { ...settings, width })]),
    ];
    return `${lines.join('\n')}\n`;
  },
};

const sectionLines = (section: Section, result: Result, settings: ReportSettings): string[] => [
  ...fold(section.heading, settings.width).map((line) => settings.paint.bold(line)),
  ...section.blocks.flatMap((block) => blockLines(block, result, settings)),
];

function blockLines(block: Block, result: Result, { width, paint, histogram }: ReportSettings): string[] {
  switch (block.kind) {
    case 'sentence':
      return fold(block.text, Math.min(width, widestProse), hanging).map(toneOf(block, paint));
    case 'table':
      return tableLines(result.input, width - margin, marksOf(result)).map((line) =>
        `${' '.repeat(margin)}${line}`.trimEnd(),
      );
    case 'grid':
      return gridLines(block, Math.min(width, widestProse) - margin).map((line) =>
        `${' '.repeat(margin)}${line}`.trimEnd(),
      );
    case 'endings':
      return endingLines(block, Math.min(width, widestProse));
    case 'picture': {
      const { nullSummary } = result;
      if (histogram === undefined || nullSummary === undefined || block.picture !== 'null') return [];
      const prose = Math.min(width, widestProse);
      return [
        '',
        ...histogramLines(nullSummary, prose - margin, histogram).map((line) => `${' '.repeat(margin)}${line}`),
        '',
        ...fold(histogramWords(nullSummary), prose, hanging),
      ];
    }
    case 'command':
      return commandLines(block, Math.min(width, widestProse));
  }
}

function toneOf({ tone }: Sentence, paint: Painter): (line: string) => string {
  switch (tone) {
    case 'answer':
      return (line) => paint.bold(line);
    case 'warning':
      return (line) => paint.warn(line);
    case 'aside':
    case 'plain':
      return (line) => line;
  }
}

/** Numbers under each other, the words that go with each to their right. */
function endingLines({ start, endings }: Endings, width: number): string[] {
  const column = Math.max(...endings.map(({ number }) => displayWidth(number)));
  const indent = margin + column + 2;
  return [
    ...fold(start, width, hanging),
    ...endings.flatMap(({ number, words }) => {
      const [first, ...rest] = fold(words, width, { first: indent, rest: indent });
      return [`${' '.repeat(margin)}${padLeft(number, column)}${first!.slice(margin + column)}`, ...rest];
    }),
  ];
}

/** A command over as many lines as it needs, joined by backslashes; a sentence where a word is wider than a line. */
function commandLines({ words, otherwise }: Command, width: number): string[] {
  const room = width - margin - 4;
  if (words.some((word) => displayWidth(word) > room)) return fold(otherwise, width, hanging);
  const lines = [''];
  for (const word of words) {
    const line = lines.at(-1)!;
    if (line === '') lines[lines.length - 1] = word;
    else if (displayWidth(line) + 1 + displayWidth(word) <= room) lines[lines.length - 1] = `${line} ${word}`;
    else lines.push(word);
  }
  return lines.map((line, i) => {
    const indent = ' '.repeat(i === 0 ? margin : margin + 2);
    return `${indent}${line}${i < lines.length - 1 ? ' \\' : ''}`;
  });
}
