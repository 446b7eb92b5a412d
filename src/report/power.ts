// The report of a planned study: for a screen, for programs, for spreadsheets.
import { powerNumber, sizesWords, testName } from '../result/power-words.js';
import { quoted, shown } from '../result/label-words.js';
import { digits } from '../result/number-words.js';
import type { PowerResult } from '../result/power-declaration.js';
import { fold } from './fold.js';
import type { ReportSettings } from './format.js';
import { gridLines } from './text-grid.js';

export const powerFormats = ['text', 'json', 'csv'] as const;
export type PowerFormat = (typeof powerFormats)[number];

export function renderPower(result: PowerResult, format: PowerFormat, settings: ReportSettings): string {
  if (format === 'json') return `${JSON.stringify(result, null, 2)}\n`;
  return format === 'csv' ? csv(result) : text(result, settings);
}

const cautions = [
  'Power speaks of the probabilities that were assumed; they are guesses until the study is done.',
  'Sizes of a study that can hurt someone are settled with its protocol, local rules and a qualified statistician.',
];

function text(result: PowerResult, { width: wide, paint }: ReportSettings): string {
  const width = Math.max(40, Math.floor(wide));
  const prose = Math.min(width, 96);
  const said = (words: string): string[] => fold(shown(words), prose, { first: 2, rest: 4 });
  const heading = (words: string): string[] => ['', paint.bold(words)];
  const { plan, answers } = result;
  return [
    paint.bold('How likely is the planned study to find the difference?'),
    ...heading('The plan'),
    ...said(`Test: ${testName(plan)}, rejecting at p <= ${plan.alpha}.`),
    ...plan.groups.flatMap(({ label, probabilities }) =>
      said(
        `${quoted(label)}: ${probabilities.length === 1 ? 'event' : 'outcomes'} with probability ${probabilities.join(', ')}.`,
      ),
    ),
    ...heading('The answer'),
    ...said(result.sentence).map((line) => paint.bold(line)),
    ...(answers.length > 1 ? gridLines(gridOf(result), prose - 2).map((line) => `  ${line}`.trimEnd()) : []),
    ...answers
      .slice(0, 1)
      .flatMap(({ size }) =>
        size === undefined
          ? []
          : said(`When the groups are alike it rejects with probability ${digits(size, 3)} at most.`),
      ),
    ...heading('Before you use it'),
    ...result.notes.flatMap(({ text: words }) => said(words).map((line) => paint.warn(line))),
    ...cautions.flatMap(said),
    '',
  ].join('\n');
}

const gridOf = ({ plan, answers }: PowerResult) => ({
  kind: 'grid' as const,
  headings: ['groups', 'power', ...(plan.method === 'exact' ? ['size'] : [])],
  rows: answers.map((answer) => [
    shown(sizesWords(plan, answer)),
    powerNumber(answer),
    ...(answer.size === undefined ? [] : [digits(answer.size, 3)]),
  ]),
});

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
