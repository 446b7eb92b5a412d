// The report of several outcomes tested together.
import { quoted, shown } from '../result/label-words.js';
import { countWords, digits, roundedTo } from '../result/number-words.js';
import type { TogetherResult } from '../result/together-declaration.js';
import { disarmed } from './csv.js';
import { fold } from './fold.js';
import type { ReportSettings } from './format.js';
import { gridLines } from './text-grid.js';

export const togetherFormats = ['text', 'json', 'csv'] as const;
export type TogetherFormat = (typeof togetherFormats)[number];
type DrawnP = TogetherResult['outcomes'][number]['alone'];

export function renderTogether(result: TogetherResult, format: TogetherFormat, settings: ReportSettings): string {
  if (format === 'json') return `${JSON.stringify(result, null, 2)}\n`;
  return format === 'csv' ? csv(result) : text(result, settings);
}

function text(result: TogetherResult, { width: wide, paint }: ReportSettings): string {
  const width = Math.max(40, Math.floor(wide));
  const prose = Math.min(width, 96);
  const said = (words: string): string[] => fold(shown(words), prose, { first: 2, rest: 4 });
  const heading = (words: string): string[] => ['', paint.bold(words)];
  const { input, plan, outcomes, notes } = result;
  const { rule, records, dropped } = input.missing;
  const grid = {
    kind: 'grid' as const,
    headings: ['outcome', 'chi-square', 'p alone', 'adjusted: maxT', 'adjusted: minP'],
    rows: outcomes.map((outcome) => [
      shown(outcome.label),
      digits(outcome.statistic, 4),
      pWords(outcome.alone, plan.draws),
      pWords(outcome.maxT, plan.draws),
      pWords(outcome.minP, plan.draws),
    ]),
  };
  return [
    paint.bold('Which outcomes differ between the groups?'),
    ...heading('What was tested'),
    ...said(
      `${outcomes.length} outcomes of ${countWords(input.total)} subjects in the groups ${input.groups.map(quoted).join(', ')}.`,
    ),
    ...said(
      `${countWords(records)} records were read${dropped === 0 ? '' : `; ${countWords(dropped)} subjects with a value missing were left out`}${rule === 'level' ? '; missing was kept as a level of its own' : ''}.`,
    ),
    ...said(
      `Chance deals the groups to the subjects anew, each subject keeping all its outcomes: ${countWords(plan.draws)} times, seed ${quoted(plan.seed)}.`,
    ),
    ...heading('The answer'),
    ...gridLines(grid, prose - 2).map((line) => `  ${line}`.trimEnd()),
    ...said(
      'An adjusted p speaks for all outcomes together: the probability to see any as extreme, were none related to the groups.',
    ),
    ...heading('Before you use it'),
    ...notes.flatMap(({ text: words }) => said(words).map((line) => paint.warn(line))),
    ...said('Association is not causation. Subjects were taken as independent of each other.'),
    ...said(
      "A decision that can hurt someone (clinical, food, product safety) belongs with the study's protocol, local rules and a qualified statistician.",
    ),
    '',
  ].join('\n');
}

/** No further than the error of drawing allows. */
function pWords({ p, estimate }: DrawnP, draws: number): string {
  const error = Math.sqrt((estimate * (1 - estimate)) / draws);
  return roundedTo(error === 0 ? p : error, p);
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
