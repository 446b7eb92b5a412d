// A page of sentences and small tables as lines for a screen: for reports that are not about one table.
import { fold } from './fold.js';
import type { ReportSettings } from './format.js';
import type { Block, Page } from './page.js';
import { gridLines } from './text-grid.js';

const narrowest = 40;
const widestProse = 96;

/** The whole document, ending in a line feed. Blocks that belong to one table alone have no place here. */
export function pageText({ title, sections }: Page, { width: wide, paint }: ReportSettings): string {
  const width = Math.max(narrowest, Math.floor(wide));
  const prose = Math.min(width, widestProse);
  const lines = (block: Block): string[] => {
    if (block.kind === 'grid') return gridLines(block, prose - 2).map((line) => `  ${line}`.trimEnd());
    if (block.kind !== 'sentence') return [];
    const folded = fold(block.text, prose, { first: 2, rest: 4 });
    if (block.tone === 'answer') return folded.map((line) => paint.bold(line));
    return block.tone === 'warning' ? folded.map((line) => paint.warn(line)) : folded;
  };
  const all = [
    ...fold(title, width).map((line) => paint.bold(line)),
    ...sections.flatMap(({ heading, blocks }) => ['', paint.bold(heading), ...blocks.flatMap(lines)]),
  ];
  return `${all.join('\n')}\n`;
}
