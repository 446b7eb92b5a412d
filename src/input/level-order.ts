// The order of rows or columns that the user lists (`--row-order`, `--column-order`), the same for every input form.
// A listed level that does not occur becomes an empty line; one that occurs and is not listed is an error, never dropped.
import { usageProblem } from '../problem/problem.js';
import { nearest } from '../problem/suggest.js';
import { parseLabelList } from './label-list.js';
import { shownList, shownValue } from './shown-value.js';

export type Side = 'row' | 'column';

export interface OrderOptions {
  /** One CSV record of row labels. */
  readonly rowOrder?: string | undefined;
  /** One CSV record of column labels. */
  readonly columnOrder?: string | undefined;
}

export interface LabelledCounts {
  readonly counts: readonly (readonly number[])[];
  readonly rowLabels: readonly string[];
  readonly columnLabels: readonly string[];
}

/**
 * The counts with their lines in the listed order; unchanged where no order is given.
 * @throws Problem (usage): `unlisted-level`, and those of parseLabelList
 */
export function orderLevels(parts: LabelledCounts, options: OrderOptions): LabelledCounts {
  const rows = listedOrder('row', parts.rowLabels, options.rowOrder);
  const columns = listedOrder('column', parts.columnLabels, options.columnOrder);
  return {
    counts: rows.from.map((row) => columns.from.map((column) => parts.counts[row]?.[column] ?? 0)),
    rowLabels: rows.labels,
    columnLabels: columns.labels,
  };
}

/** Labels in their new order, and for each the index it had (-1: it does not occur). */
function listedOrder(
  side: Side,
  found: readonly string[],
  order: string | undefined,
): { labels: readonly string[]; from: readonly number[] } {
  if (order === undefined) return { labels: found, from: found.map((_, index) => index) };
  const option = `--${side}-order`;
  const labels = parseLabelList(order, option);
  const listed = new Set(labels);
  const unlisted = found.filter((label) => !listed.has(label));
  if (unlisted.length > 0) throw unlistedLevels(option, unlisted, found, labels);
  const indexOf = new Map(found.map((label, index) => [label, index]));
  return { labels, from: labels.map((label) => indexOf.get(label) ?? -1) };
}

function unlistedLevels(option: string, unlisted: string[], found: readonly string[], labels: string[]) {
  const occurring = new Set(found);
  const spare = labels.filter((label) => !occurring.has(label));
  const close = spare.find((label) => nearest(label, unlisted) !== undefined);
  const meant = close === undefined ? undefined : nearest(close, unlisted);
  const suggestion =
    meant === undefined ? '' : `did you mean ${shownValue(meant)} where ${shownValue(close!)} stands? `;
  const several = unlisted.length > 1;
  return usageProblem({
    code: 'unlisted-level',
    message: several
      ? `${unlisted.length} levels occur in the data and are not listed: ${shownList(unlisted, 5)}`
      : `${shownValue(unlisted[0]!)} occurs in the data and is not listed`,
    place: option,
    hint: `${suggestion}list every level that occurs: ${shownList(found)}`,
  });
}
