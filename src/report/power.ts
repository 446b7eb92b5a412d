// The report of a planned study: for a screen, for programs, for spreadsheets.
import { shown } from '../result/label-words.js';
import type { PowerResult } from '../result/power-declaration.js';
import { fold } from './fold.js';
import type { ReportSettings } from './format.js';
import type { Block } from './page.js';
import { powerPage } from './power-page.js';
import { gridLines } from './text-grid.js';

export const powerFormats = ['text', 'json', 'csv', 'html'] as const;
/** html is written by `html/power.ts`, with its picture, and loaded only then. */
export type PowerFormat = Exclude<(typeof powerFormats)[number], 'html'>;

export function renderPower(result: PowerResult, format: PowerFormat, settings: ReportSettings): string {
  if (format === 'json') return `${JSON.stringify(result, null, 2)}\n`;
  return format === 'csv' ? csv(result) : text(result, settings);
}

function text(result: PowerResult, { width: wide, paint }: ReportSettings): string {
  const width = Math.max(40, Math.floor(wide));
  const prose = Math.min(width, 96);
  const { title, sections } = powerPage(result);
  const lines = (block: Block): string[] => {
    if (block.kind === 'grid') return gridLines(block, prose - 2).map((line) => `  ${line}`.trimEnd());
    if (block.kind !== 'sentence') return [];
    const folded = fold(block.text, prose, { first: 2, rest: 4 });
    if (block.tone === 'plain') return folded;
    return folded.map((line) => (block.tone === 'answer' ? paint.bold(line) : paint.warn(line)));
  };
  return [
    ...fold(title, width).map((line) => paint.bold(line)),
    ...sections.flatMap(({ heading, blocks }) => ['', paint.bold(heading), ...blocks.flatMap(lines)]),
    '',
  ].join('\n');
}

function csv({ plan, answers, tool }: PowerResult): string {
  const header = 'sizes,total,power,size,lower,upper,test,tail,rule,alpha,seed,version';
  const rows = answers.map(({ sizes, total, power, size, error }) =>
    [
      sizes === null ? '' : sizes.join(' '),
      total,
      power,
      size ?? '',
      ...(error.kind === 'sampling' ? error.interval : ['', '']),
      plan.test ?? plan.statistic ?? '',
      plan.tail,
      plan.twoSidedRule ?? '',
      plan.alpha,
      plan.seed === null ? '' : `"${shown(plan.seed).replaceAll('"', '""')}"`,
      tool.version,
    ].join(','),
  );
  return `${[header, ...rows].join('\n')}\n`;
}
