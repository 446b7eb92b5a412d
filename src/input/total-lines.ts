// Rows and columns of totals: which lines they are, and what leaving them out takes away. Counting a total as data
// doubles every count, so it is never done in silence: refused unless the user says drop or keep.
import type { Problem } from '../problem/problem.js';
import { dataProblem } from '../problem/problem.js';
import type { LabelledCounts } from './level-order.js';
import type { InputNote } from './read-table.js';
import { shownList, shownValue } from './shown-value.js';

export type TotalsRule = 'refuse' | 'drop' | 'keep';

/** A whole label, in lower case, without blanks around it or a colon after it. */
const totalWords = new RegExp(
  '^(' +
    [
      '((grand|overall|row|column|col\\.?|sub)[ -]?)?(totals?|sums?)( ?\\(?n\\)?)?',
      'totals? (row|column)',
      '(gesamt|zwischen|zeilen|spalten)?summen?|gesamt|insgesamt',
      'totale|totaux|somme|total général|suma|totaal',
      '[σ∑]',
    ].join('|') +
    ')$',
);
/** Words that speak of a total among others ("Total cases", "All wards"): enough where the line holds sums too. */
const totalWord =
  /(^|[^\p{L}])(totals?|sums?|all|overall|altogether|both|gesamt|summen?|alle|insgesamt|totale|totaux|tous|total|suma|todos|totaal|alles)($|[^\p{L}])/u;
const subtotal = /^(sub|zwischen)/;

const plain = (label: string): string => label.trim().toLowerCase().replace(/\s*:$/, '');

export const isTotalLabel = (label: string): boolean => totalWords.test(plain(label));

/** Which lines are totals, by index, and how that is known. */
export interface TotalLines {
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  readonly by: 'label' | 'sums' | 'label and sums';
}

/** Text kept beside the number: a total may be written in a way that a count may not; null is then its number. */
export interface TotalsView {
  readonly values: readonly (readonly (number | null)[])[];
  readonly texts: readonly (readonly string[])[];
  readonly rowLabels: readonly string[];
  readonly columnLabels: readonly string[];
}

/**
 * Lines whose label says total, and a last line whose label speaks of one and that holds the sums of the others ("All wards"). Also,
 * in a table of 3x3 or more, the last row and the last column when both hold the sums of the others, corner included (one of them
 * alone may be chance, and so may sums that are all 0); where totals are named on one side, the last line of the other side needs only
 * its own sums.
 */
export function findTotals(view: TotalsView): TotalLines {
  const rows = labelled(view.rowLabels);
  const columns = labelled(view.columnLabels);
  const lastRow = view.rowLabels.length - 1;
  const lastColumn = view.columnLabels.length - 1;
  const goesDown = (): boolean => holdsSums(transposed(view.values), lastRow, columns);
  const goesAcross = (): boolean => holdsSums(view.values, lastColumn, rows);
  const isNamed = (labels: readonly string[], last: number, found: readonly number[]): boolean =>
    !found.includes(last) && totalWord.test(plain(labels[last] ?? ''));
  if (isNamed(view.rowLabels, lastRow, rows) && goesDown()) rows.push(lastRow);
  if (isNamed(view.columnLabels, lastColumn, columns) && goesAcross()) columns.push(lastColumn);
  const across = goesAcross();
  const down = goesDown();
  const nothingNamed = rows.length + columns.length === 0;
  if (nothingNamed) {
    return across && down ? { rows: [lastRow], columns: [lastColumn], by: 'sums' } : { rows, columns, by: 'label' };
  }
  const moreRows = columns.length > 0 && down && !rows.includes(lastRow) ? [lastRow] : [];
  const moreColumns = rows.length > 0 && across && !columns.includes(lastColumn) ? [lastColumn] : [];
  const by = moreRows.length + moreColumns.length > 0 ? 'label and sums' : 'label';
  return { rows: [...rows, ...moreRows], columns: [...columns, ...moreColumns], by };
}

const labelled = (labels: readonly string[]): number[] =>
  labels.flatMap((label, i) => (isTotalLabel(label) ? [i] : []));

const transposed = <T>(values: readonly (readonly T[])[]): T[][] =>
  (values[0] ?? []).map((_, column) => values.map((row) => row[column]!));

/** Whether each line's last value is the sum of its others, two or more of them; not all 0. Lines of totals are not looked at. */
function holdsSums(lines: readonly (readonly (number | null)[])[], last: number, totals: readonly number[]): boolean {
  const looked = lines.filter((_, index) => !totals.includes(index));
  if (last < 2 || looked.length < 2) return false;
  const sumOfOthers = (line: readonly (number | null)[]): number =>
    line.slice(0, -1).reduce<number>((sum, value) => sum + (value ?? NaN), 0);
  return looked.every((line) => line[last] === sumOfOthers(line)) && looked.some((line) => line[last] !== 0);
}

/** @param place of the first line found */
export function totalLineProblem(found: TotalLines, view: TotalsView, place: string | undefined): Problem {
  const names = namesOf(found, view);
  const one = found.rows.length + found.columns.length === 1;
  const reasons = {
    label: one ? 'is a total by its label' : 'are totals by their labels',
    sums: 'hold the sums of the other rows and columns',
    'label and sums': 'are totals, by label or because they hold the sums of the others',
  };
  return dataProblem({
    code: 'total-line',
    message: `${names} ${reasons[found.by]}`,
    ...(place === undefined ? {} : { place }),
    hint: 'add --drop-totals to leave totals out, or --keep-totals if these are counts like the others',
  });
}

const namesOf = (found: TotalLines, view: TotalsView): string =>
  [
    ...found.rows.map((row) => `row ${shownValue(view.rowLabels[row]!)}`),
    ...found.columns.map((column) => `column ${shownValue(view.columnLabels[column]!)}`),
  ].join(' and ');

export const keptTotalsNote = (found: TotalLines, view: TotalsView): InputNote => ({
  code: 'totals-kept',
  text: `${namesOf(found, view)} looked like totals and were counted as data, as asked`,
});

export const noTotalsNote: InputNote = {
  code: 'no-totals-found',
  text: 'no row or column of totals was found to leave out',
};

/** The other lines, with notes: what was left out, and where a total was not the sum of what stayed. */
export function leaveOutTotals(view: TotalsView, found: TotalLines): { kept: LabelledCounts; notes: InputNote[] } {
  const keptRows = view.rowLabels.flatMap((_, i) => (found.rows.includes(i) ? [] : [i]));
  const keptColumns = view.columnLabels.flatMap((_, j) => (found.columns.includes(j) ? [] : [j]));
  const kept = {
    counts: keptRows.map((i) => keptColumns.map((j) => view.values[i]![j]!)),
    rowLabels: keptRows.map((i) => view.rowLabels[i]!),
    columnLabels: keptColumns.map((j) => view.columnLabels[j]!),
  };
  const notes: InputNote[] = [{ code: 'totals-left-out', text: `left out as totals: ${namesOf(found, view)}` }];
  const wrong = disagreements(view, found, keptRows, keptColumns);
  if (wrong.length > 0) {
    notes.push({
      code: 'totals-disagree',
      text: `a total left out is not the sum of the counts: ${shownPlaces(wrong)}`,
    });
  }
  return { kept, notes };
}

const shownPlaces = (wrong: readonly string[]): string =>
  wrong.slice(0, 5).join('; ') + (wrong.length > 5 ? ` and ${wrong.length - 5} more` : '');

/** Every total that can be checked (a subtotal cannot: which lines it covers is not written) and is wrong. */
function disagreements(view: TotalsView, found: TotalLines, keptRows: number[], keptColumns: number[]): string[] {
  const whole = (labels: readonly string[]) => (line: number) => !subtotal.test(plain(labels[line]!));
  const totalRows = found.rows.filter(whole(view.rowLabels));
  const totalColumns = found.columns.filter(whole(view.columnLabels));
  const wrong: string[] = [];
  const check = (i: number, j: number, overRows: readonly number[], overColumns: readonly number[]): void => {
    const written = view.texts[i]![j]!.trim();
    let sum = 0;
    for (const row of overRows) for (const column of overColumns) sum += view.values[row]![column]!;
    if (written === '' || view.values[i]![j] === sum) return;
    const cell = `row ${shownValue(view.rowLabels[i]!)}, column ${shownValue(view.columnLabels[j]!)}`;
    wrong.push(`${cell} says ${shownValue(written).slice(1, -1)} where the counts add up to ${sum}`);
  };
  for (const i of totalRows) for (const j of keptColumns) check(i, j, keptRows, [j]);
  for (const j of totalColumns) for (const i of keptRows) check(i, j, [i], keptColumns);
  for (const i of totalRows) for (const j of totalColumns) check(i, j, keptRows, keptColumns);
  return wrong;
}

export const onlyTotals = (view: TotalsView, place: string | undefined): Problem =>
  dataProblem({
    code: 'only-totals',
    message: `nothing is left when the totals are left out (rows: ${shownList(view.rowLabels, 5)}; columns: ${shownList(view.columnLabels, 5)})`,
    ...(place === undefined ? {} : { place }),
    hint: 'add --keep-totals if these are counts like the others',
  });
