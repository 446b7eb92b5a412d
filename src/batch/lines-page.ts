// Saved lines of a batch as one page: a table with a row for each table that was tested, what could not be used, and the
// whole report of each line that holds one. Loaded only by runs that write it.
import { errorAside, pName, pNumber } from '../result/describe.js';
import { shown } from '../result/label-words.js';
import { countWords, statisticValueWords } from '../result/number-words.js';
import type { Result } from '../result/result.js';
import { htmlDocument } from '../report/html/document.js';
import { worded, type Markup } from '../report/html/element.js';
import { articles, contents } from '../report/html/report.js';
import { sectionMarkup } from '../report/html/sections.js';
import type { Grid, Sentence } from '../report/page.js';
import type { CompactLine, ErrorLine } from './lines.js';

export type SavedLine =
  | { readonly kind: 'whole'; readonly line: Result }
  | { readonly kind: 'compact'; readonly line: CompactLine }
  | { readonly kind: 'error'; readonly line: ErrorLine };

const many =
  'Each p speaks for its table alone. The more tables there are, the more small p-values chance alone brings: keepsum adjust adjusts them for their number.';
const cautions = [
  'Association is not causation. A p is not the size of an effect; keepsum batch --full gives effects and whole reports.',
  "A decision that can hurt someone (clinical, food, product safety) belongs with the study's protocol, local rules and a qualified statistician.",
];

/** @param version of the program that writes the page */
export function linesPage(lines: readonly SavedLine[], version: string): string {
  const whole = lines.flatMap((each) => (each.kind === 'whole' ? [each.line] : []));
  const compact = lines.flatMap((each) => (each.kind === 'compact' ? [each.line] : []));
  const failed = lines.flatMap((each) => (each.kind === 'error' ? [each.line] : []));
  const title = `${countWords(lines.length)} table${lines.length === 1 ? '' : 's'} of a batch`;
  return htmlDocument({
    title,
    main: [
      worded('h1', title),
      ...testedPart(compact),
      ...failedPart(failed),
      ...(whole.length === 0 ? [] : [contents(whole), ...articles(whole, false)]),
    ],
    version,
    record: `[${lines.map(({ line }) => JSON.stringify(line)).join(',\n')}]`,
  });
}

const said = (text: string): Sentence => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

function testedPart(lines: readonly CompactLine[]): Markup[] {
  if (lines.length === 0) return [];
  const grid: Grid = {
    kind: 'grid',
    headings: ['table', 'counts', 'statistic', 'value', 'p', 'which p, its error', 'take note'],
    rows: lines.map(rowOf),
  };
  return [
    sectionMarkup({ heading: 'The answers', blocks: [grid, said(many)] }, 'h2', ''),
    sectionMarkup({ heading: 'Before you use it', blocks: cautions.map(said) }, 'h2', ''),
  ];
}

function rowOf({ key, counts, statistic, pValues, notes }: CompactLine): string[] {
  const [p] = pValues;
  return [
    key,
    countWords(counts.flat().reduce((sum, count) => sum + count, 0)),
    statistic.name,
    statistic.value === null ? 'undefined' : statisticValueWords(statistic.value),
    pNumber(p!),
    `${pName(p!)}${p!.method === 'exact' ? ', exact' : ''}${errorAside(p!)}`,
    notes.map(({ text }) => text).join(' '),
  ].map(shown);
}

function failedPart(lines: readonly ErrorLine[]): Markup[] {
  if (lines.length === 0) return [];
  const grid: Grid = {
    kind: 'grid',
    headings: ['table', 'what is wrong', 'where', 'hint'],
    rows: lines.map(({ key, error: { message, place, hint } }) => [key, message, place, hint].map(shown)),
  };
  return [sectionMarkup({ heading: 'Tables that could not be used', blocks: [grid] }, 'h2', '')];
}
