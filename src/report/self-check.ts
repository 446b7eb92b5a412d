// The validation report: the verdict, what it ran on, and every case; for a screen, for programs, for spreadsheets.
import { shown } from '../result/label-words.js';
import { countWords } from '../result/number-words.js';
import type { CheckedAnswer, CheckedCase, SelfCheck } from '../result/self-check-declaration.js';
import { fold } from './fold.js';
import type { ReportSettings } from './format.js';

export const selfCheckFormats = ['text', 'json', 'csv', 'html'] as const;
/** html is written by `html/self-check.ts`, and loaded only then. */
export type SelfCheckFormat = Exclude<(typeof selfCheckFormats)[number], 'html'>;

export function renderSelfCheck(report: SelfCheck, format: SelfCheckFormat, settings: ReportSettings): string {
  if (format === 'json') return `${JSON.stringify(report, null, 2)}\n`;
  return format === 'csv' ? csv(report) : text(report, settings);
}

export const selfCheckTitle = 'Does this copy of keepsum give the known answers here?';

export const remarks: readonly string[] = [
  'Agreement here says that this copy of the program computes on this machine what is known of these cases. It does not say that a test suits your data.',
  'Where your rules ask for qualified software, keep this report with the version of the program, and run it again after every change of machine, runtime or version.',
];

export const verdictSentence = ({ verdict, answersCompared, answersDiffering, casesRun }: SelfCheck): string =>
  verdict === 'agrees'
    ? `All ${countWords(answersCompared)} answers of ${countWords(casesRun)} cases agree.`
    : `${countWords(answersDiffering)} of ${countWords(answersCompared)} answers differ: do not rely on this copy on this machine.`;

export const machineSentences = ({ tool, machine, answersSha256 }: SelfCheck): string[] => [
  `${tool.name} ${tool.version} on ${machine.runtime} (${machine.engine}), ${machine.system}, ${machine.architecture}.`,
  `The reference answers have the SHA-256 ${answersSha256}.`,
  'A difference is relative to the expected number; the limit is the largest that agrees.',
];

export const sourceSentence = ({ source, origin }: CheckedCase): string => `Counts: ${source}. Answers: ${origin}.`;

/** One answer in the words of its columns; the difference is the reason where there is no number. */
export const answerWords = (answer: CheckedAnswer) => ({
  what: answer.what,
  expected: String(answer.expected),
  obtained: String(answer.obtained ?? 'none'),
  difference: answer.difference === null ? (answer.reason ?? '') : smallWords(answer.difference),
  limit: smallWords(answer.tolerance),
  verdict: answer.agrees ? 'agrees' : 'DIFFERS',
});

function text(report: SelfCheck, { width: wide, paint }: ReportSettings): string {
  const width = Math.max(40, Math.floor(wide));
  const prose = Math.min(width, 96);
  const said = (words: string): string[] => fold(shown(words), prose, { first: 2, rest: 4 });
  return [
    ...fold(selfCheckTitle, width).map(paint.bold),
    '',
    paint.bold('The verdict'),
    ...said(verdictSentence(report)).map(report.verdict === 'agrees' ? paint.bold : paint.warn),
    '',
    paint.bold('What was run'),
    ...machineSentences(report).flatMap(said),
    ...report.cases.flatMap((each) => ['', ...caseLines(each, prose)]),
    '',
    paint.bold('Before you use it'),
    ...remarks.flatMap(said),
    '',
  ].join('\n');
}

/** One item an answer, the verdict first, in the order in which it is read aloud. */
function caseLines(each: CheckedCase, prose: number): string[] {
  const item = (answer: CheckedAnswer): string => {
    const { what, expected, obtained, difference, limit, verdict } = answerWords(answer);
    const apart = answer.difference === null ? ` (${difference})` : `, difference ${difference} (limit ${limit})`;
    return `${verdict}: ${what}, expected ${expected}, obtained ${obtained}${apart}`;
  };
  return [
    ...fold(shown(`${each.id}: ${each.title}`), prose),
    ...fold(shown(sourceSentence(each)), prose, { first: 2, rest: 4 }),
    ...each.answers.flatMap((answer) => fold(shown(item(answer)), prose, { first: 2, rest: 4 })),
  ];
}

const smallWords = (value: number): string => (value === 0 ? '0' : value.toExponential(1).replace('e+', 'e'));

const field = (words: string): string => `"${shown(words).replaceAll('"', '""')}"`;

/** One row an answer. */
function csv({ cases, tool, machine }: SelfCheck): string {
  const header =
    'case,title,source,origin,statistic,answer,expected,obtained,difference,limit,verdict,version,runtime,system,architecture';
  const rows = cases.flatMap((each) =>
    each.answers.map((answer) =>
      [
        field(each.id),
        field(each.title),
        field(each.source),
        field(each.origin),
        each.statistic,
        field(answer.what),
        answer.expected,
        answer.obtained ?? '',
        answer.difference ?? '',
        answer.tolerance,
        answer.agrees ? 'agrees' : 'differs',
        tool.version,
        field(machine.runtime),
        field(machine.system),
        machine.architecture,
      ].join(','),
    ),
  );
  return `${[header, ...rows].join('\n')}\n`;
}
