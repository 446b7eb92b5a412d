// Outcomes to lines: compact or whole, as objects for a program or as text.
import { findingsOf, statisticOf, type Answer } from '../analyse.js';
import { keptWishes } from '../plan/kept-wishes.js';
import type { PlanOptions } from '../plan/plan.js';
import { cellText, csvColumns, csvLine, csvRows } from '../report/csv.js';
import { beforeWords, type Findings } from '../result/build-result.js';
import { shownJson } from '../result/label-words.js';
import { checkExpectations } from '../table/expectation-check.js';
import type { Outcome } from './answer-table.js';
import type { CompactLine, ErrorLine, FullLine } from './lines.js';

export type OutputLine = CompactLine | FullLine | ErrorLine;

export function lineOf(outcome: Outcome): OutputLine {
  const { key } = outcome;
  switch (outcome.kind) {
    case 'error':
      return { key, error: { ...outcome.error } };
    case 'full':
      return { key, ...outcome.result } as FullLine;
    case 'compact':
      return compactLine(key, outcome.answer, outcome.wishes);
  }
}

/** Ends in a line feed. Text in it can be read on a screen without acting on it. */
export function ndjsonText(outcome: Outcome): string {
  const json = JSON.stringify(lineOf(outcome));
  return `${plain.test(json) ? json : shownJson(json)}\n`;
}

/** Nothing that shownJson would have to look at. */
const plain = /^[\x20-\x7e]*$/;

export function compactLine(key: string, found: Answer, wishes: PlanOptions): CompactLine {
  const { table } = found.read;
  return {
    key,
    counts: table.counts as number[][],
    ...(areOurs('row', table.rowLabels) ? {} : { rowLabels: table.rowLabels as string[] }),
    ...(areOurs('column', table.columnLabels) ? {} : { columnLabels: table.columnLabels as string[] }),
    statistic: statisticOf(found),
    pValues: found.pValues as CompactLine['pValues'],
    notes: found.notes as CompactLine['notes'],
    plan: keptWishes(wishes, found.prepared.plan, found.prepared.plan.seed) as CompactLine['plan'],
  };
}

/** Labels of our own making. */
const areOurs = (side: 'row' | 'column', labels: readonly string[]): boolean =>
  labels[0] === `${side} 1` && labels.every((label, k) => k === 0 || label === `${side} ${k + 1}`);

/** The published columns of a batch: the key, those of one table, and what is wrong with a table that could not be used. */
export const csvHeader = (): string => csvLine(['key', ...csvColumns.map(({ name }) => name), 'error']);

/** A row for each p-value, or one for a table that could not be used. */
export function csvText(outcome: Outcome, raw: boolean): string {
  const key = cellText(outcome.key, raw);
  if (outcome.kind === 'error') {
    const { code, message, place } = outcome.error;
    return csvLine([key, ...csvColumns.map(() => ''), cellText(`${place}: ${message} (${code})`, raw)]);
  }
  return csvRows(outcome.kind === 'full' ? outcome.result : beforeWords(allOf(outcome.answer)), raw)
    .map((cells) => csvLine([key, ...cells, '']))
    .join('');
}

const allOf = (found: Answer): Findings => ({ ...findingsOf(found), expectations: checkExpectations(found.live) });
