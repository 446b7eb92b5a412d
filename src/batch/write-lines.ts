// Outcomes to lines: compact or whole, as objects for a program or as text.
import { findingsOf, statisticOf, type Answer } from '../analyse.js';
import { keptWishes } from '../plan/kept-wishes.js';
import type { PlanOptions } from '../plan/plan.js';
import { cellText, csvColumns, csvLine, csvRows } from '../report/csv.js';
import { beforeWords, type Findings } from '../result/build-result.js';
import type { ReadTable } from '../input/read-table.js';
import type { Result } from '../result/result.js';
import type { Table } from '../table/table.js';
import { shownJson } from '../result/label-words.js';
import { checkExpectations } from '../table/expectation-check.js';
import type { Outcome } from './answer-table.js';
import type { CompactLine, ErrorLine, FullLine } from './lines.js';

export type OutputLine = CompactLine | FullLine | ErrorLine;

export function lineOf(outcome: Outcome): OutputLine {
  const { key, family } = outcome;
  const name = family === undefined ? { key } : { key, family };
  switch (outcome.kind) {
    case 'error':
      return { key, error: { ...outcome.error } };
    case 'full':
      return { ...name, ...outcome.result } as FullLine;
    case 'grouped':
      return groupedLine(name, outcome.read, outcome.result, outcome.wishes);
    case 'compact':
      return compactLine(name, outcome.answer, outcome.wishes);
  }
}

/** Ends in a line feed. Text in it can be read on a screen without acting on it. */
export function ndjsonText(outcome: Outcome): string {
  const json = JSON.stringify(lineOf(outcome));
  return `${plain.test(json) ? json : shownJson(json)}\n`;
}

/** Nothing that shownJson would have to look at. */
const plain = /^[\x20-\x7e]*$/;

type Name = Pick<CompactLine, 'key' | 'family'>;

export function compactLine(name: Name, found: Answer, wishes: PlanOptions): CompactLine {
  const { table } = found.read;
  return {
    ...name,
    counts: table.counts as number[][],
    ...(table.impossible === undefined ? {} : { impossible: table.impossible as boolean[][] }),
    ...labelsOf(table),
    statistic: statisticOf(found),
    pValues: found.pValues as CompactLine['pValues'],
    notes: found.notes as CompactLine['notes'],
    plan: keptWishes(wishes, found.prepared.plan, found.prepared.plan.seed) as CompactLine['plan'],
  };
}

/** Of a table with strata or clusters, which the line holds as well. */
export function groupedLine(
  name: Name,
  { table, strata }: ReadTable,
  result: Result,
  wishes: PlanOptions,
): CompactLine {
  return {
    ...name,
    counts: table.counts as number[][],
    ...(strata === undefined
      ? {}
      : { strata: strata.map(({ label, counts }) => ({ label, counts: counts as number[][] })) }),
    ...(result.clusters === undefined ? {} : { clusters: result.clusters.alike }),
    ...labelsOf(table),
    statistic: result.statistic,
    pValues: result.pValues,
    notes: result.notes,
    plan: keptWishes(wishes, result.plan, result.plan.seed) as CompactLine['plan'],
  };
}

const labelsOf = ({ rowLabels, columnLabels }: Table): Pick<CompactLine, 'rowLabels' | 'columnLabels'> => ({
  ...(areOurs('row', rowLabels) ? {} : { rowLabels: rowLabels as string[] }),
  ...(areOurs('column', columnLabels) ? {} : { columnLabels: columnLabels as string[] }),
});

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
  return csvRows(outcome.kind === 'compact' ? beforeWords(allOf(outcome.answer)) : outcome.result, raw)
    .map((cells) => csvLine([key, ...cells, '']))
    .join('');
}

const allOf = (found: Answer): Findings => ({ ...findingsOf(found), expectations: checkExpectations(found.live) });
