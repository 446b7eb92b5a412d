// The report of a planned study: for a screen, for programs, for spreadsheets.
import { shown } from '../result/label-words.js';
import type { PowerResult } from '../result/power-declaration.js';
import type { ReportSettings } from './format.js';
import { pageText } from './page-lines.js';
import { powerPage } from './power-page.js';

export const powerFormats = ['text', 'json', 'csv', 'html'] as const;
/** html is written by `html/power.ts`, with its picture, and loaded only then. */
export type PowerFormat = Exclude<(typeof powerFormats)[number], 'html'>;

export function renderPower(result: PowerResult, format: PowerFormat, settings: ReportSettings): string {
  if (format === 'json') return `${JSON.stringify(result, null, 2)}\n`;
  return format === 'csv' ? csv(result) : pageText(powerPage(result), settings);
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
