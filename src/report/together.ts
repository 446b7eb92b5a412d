// The report of several outcomes tested together.
import type { TogetherResult } from '../result/together-declaration.js';
import { disarmed } from './csv.js';
import type { ReportSettings } from './format.js';
import { pageText } from './page-lines.js';
import { togetherPage } from './together-page.js';

export const togetherFormats = ['text', 'json', 'csv'] as const;
export type TogetherFormat = (typeof togetherFormats)[number];

export function renderTogether(result: TogetherResult, format: TogetherFormat, settings: ReportSettings): string {
  if (format === 'json') return `${JSON.stringify(result, null, 2)}\n`;
  return format === 'csv' ? csv(result) : pageText(togetherPage(result), settings);
}

function csv({ outcomes, plan, input, tool }: TogetherResult): string {
  const header =
    'outcome,statistic,p,pLower,pUpper,maxT,maxTLower,maxTUpper,minP,minPLower,minPUpper,draws,seed,total,version';
  const rows = outcomes.map(({ label, statistic, alone, maxT, minP }) =>
    [
      field(label),
      statistic,
      ...[alone, maxT, minP].flatMap(({ p, interval }) => [p, ...interval]),
      plan.draws,
      field(plan.seed),
      input.total,
      tool.version,
    ].join(','),
  );
  return `${[header, ...rows].join('\n')}\n`;
}

/** Quoted, and disarmed where a spreadsheet would run it. */
const field = (words: string): string => `"${disarmed(words).replaceAll('"', '""')}"`;
