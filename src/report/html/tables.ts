// Tables that a spreadsheet takes over as they are: plain digits, one cell each, headings that say what they head.
import { shown } from '../../result/label-words.js';
import type { InputEcho } from '../../result/result.js';
import type { Mark, Marks } from '../marks.js';
import type { Grid } from '../page.js';
import { element, worded, type Markup } from './element.js';

const labelWords = (label: string): string => (label.trim() === '' ? '(blank)' : shown(label));

/** Wide tables scroll on their own, by keyboard too. */
const scrolling = (name: string, table: Markup): Markup =>
  element('div', { class: 'wide', role: 'region', tabindex: '0', 'aria-label': name }, table);

/** An empty heading would head nothing. */
const columnHeading = (words: string, kind = 'number'): Markup =>
  words === '' ? '<td></td>' : worded('th', words, { scope: 'col', ...(kind === 'words' ? { class: kind } : {}) });

/** The sign of a marked count comes from its class, so that a spreadsheet takes over the digits alone. */
const number = (count: number, mark: Mark = ''): Markup =>
  element('td', { class: `number${mark === '' ? '' : mark === '+' ? ' more' : ' fewer'}` }, String(count));

const impossible: Markup = element('td', { class: 'number' }, '-');

/** @param place tells it from the other tables of counts of a report. */
export function countsTable(input: InputEcho, place: string, marks?: Marks): Markup {
  const line = (
    label: string,
    counts: readonly number[],
    total: number,
    signs: readonly (Mark | 'impossible')[] = [],
  ): Markup =>
    element(
      'tr',
      {},
      worded('th', label, { scope: 'row' }),
      ...counts.map((count, j) => (signs[j] === 'impossible' ? impossible : number(count, signs[j]))),
      number(total),
    );
  const headings = ['', ...input.columnLabels.map(labelWords), 'all'].map((words) => columnHeading(words));
  return scrolling(
    `Counts${place}`,
    element(
      'table',
      { style: `--columns:${input.columnLabels.length + 1}` },
      worded('caption', 'Counts, with the totals of rows and columns'),
      element('thead', {}, element('tr', {}, ...headings)),
      element(
        'tbody',
        {},
        ...input.rowLabels.map((label, i) =>
          line(
            labelWords(label),
            input.counts[i]!,
            input.rowTotals[i]!,
            input.impossible?.[i]?.map((is) => (is ? 'impossible' : '')) ?? marks?.[i],
          ),
        ),
      ),
      element('tfoot', {}, line('all', input.columnTotals, input.total)),
    ),
  );
}

/** Numbers, with their limits, are short; whatever is longer may break. */
const isNumber = (words: string): boolean => words === '' || (/\d/.test(words) && words.length <= 24);

/** The first column holds names. @param name of the section that the grid stands in. */
export function gridTable({ headings, rows }: Grid, name: string): Markup {
  const kinds = headings.map((_, j) => (rows.every((row) => isNumber(row[j]!)) ? 'number' : 'words'));
  const cells = ([first, ...others]: readonly string[]): Markup =>
    element(
      'tr',
      {},
      worded('th', first!, { scope: 'row' }),
      ...others.map((words, j) => worded('td', words, { class: kinds[j + 1]! })),
    );
  return scrolling(
    name,
    element(
      'table',
      { style: `--columns:${headings.length}` },
      element('thead', {}, element('tr', {}, ...headings.map((words, j) => columnHeading(words, kinds[j])))),
      element('tbody', {}, ...rows.map(cells)),
    ),
  );
}
