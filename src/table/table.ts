// The table: labelled, frozen, non-negative whole counts with their margins. Made by input, held fixed by every null.
import { dataProblem } from '../problem/problem.js';

export interface Table {
  /** counts[row][column]; whole numbers from 0; their total at most 2^53 - 1. */
  readonly counts: readonly (readonly number[])[];
  readonly rowLabels: readonly string[];
  readonly columnLabels: readonly string[];
  readonly rowTotals: readonly number[];
  readonly columnTotals: readonly number[];
  readonly total: number;
  /** impossible[row][column]: cells into which no unit could ever fall (structural zeros); left out where there are none. */
  readonly impossible?: readonly (readonly boolean[])[];
}

export interface TableParts {
  readonly counts: readonly (readonly number[])[];
  /** Cells into which no unit could ever fall; their counts are 0. */
  readonly impossible?: readonly (readonly boolean[])[];
  /** Default: `row 1`, `row 2`, ... */
  readonly rowLabels?: readonly string[];
  /** Default: `column 1`, `column 2`, ... */
  readonly columnLabels?: readonly string[];
}

/** Labels of our own making where the data has none. */
export function defaultLabels(side: 'row' | 'column', length: number): readonly string[] {
  const known = made[side];
  while (known.length < length) known.push(`${side} ${known.length + 1}`);
  return known.slice(0, length);
}

/** Made once: most tables of a batch bring none of their own. */
const made: Record<'row' | 'column', string[]> = { row: [], column: [] };

/**
 * Checks the parts and freezes them into a Table.
 * @throws Problem (data): `ragged-row`, `not-a-count`, `negative-count`, `count-overflow`, `duplicate-label`, `label-count`, `no-counts`.
 */
export function makeTable(parts: TableParts): Table {
  const counts = parts.counts.map((row) => [...row]);
  const width = counts[0]?.length ?? 0;
  const rowLabels = [...(parts.rowLabels ?? defaultLabels('row', counts.length))];
  const columnLabels = [...(parts.columnLabels ?? defaultLabels('column', width))];
  checkShape(counts, width, rowLabels, columnLabels);
  checkLabels('row', rowLabels, counts.length);
  checkLabels('column', columnLabels, width);
  const rowTotals = counts.map((row) => addUp(row));
  const columnTotals = columnLabels.map((_, j) => addUp(counts.map((row) => row[j]!)));
  const total = addUp(rowTotals);
  if (total === 0) {
    throw dataProblem({
      code: 'no-counts',
      message: 'the table holds no counts at all (every cell is 0)',
      hint: 'check that the right columns were named, or that the file is the right one',
    });
  }
  const impossible = impossibleCells(parts, counts);
  return Object.freeze({
    ...(impossible === undefined ? {} : { impossible }),
    counts: Object.freeze(counts.map((row) => Object.freeze(row))),
    rowLabels: Object.freeze(rowLabels),
    columnLabels: Object.freeze(columnLabels),
    rowTotals: Object.freeze(rowTotals),
    columnTotals: Object.freeze(columnTotals),
    total,
  });
}

/** @throws Problem (data) `impossible-cell-counted`. */
function impossibleCells({ impossible }: TableParts, counts: readonly (readonly number[])[]): Table['impossible'] {
  if (impossible === undefined || !impossible.flat().includes(true)) return undefined;
  counts.forEach((row, i) =>
    row.forEach((count, j) => {
      if (count === 0 || !impossible[i]?.[j]) return;
      throw dataProblem({
        code: 'impossible-cell-counted',
        message: `a cell declared impossible holds ${count}`,
        place: `row ${i + 1}, column ${j + 1}`,
        hint: 'units were seen there, so it is not impossible; give its count alone',
      });
    }),
  );
  return Object.freeze(counts.map((row, i) => Object.freeze(row.map((_, j) => impossible[i]?.[j] ?? false))));
}

function checkShape(counts: number[][], width: number, rowLabels: string[], columnLabels: string[]): void {
  counts.forEach((row, i) => {
    const place = `row "${rowLabels[i] ?? i + 1}"`;
    if (row.length !== width) {
      throw dataProblem({
        code: 'ragged-row',
        message: `${row.length} counts where the first row has ${width}`,
        place,
        hint: 'every row needs the same number of counts; write 0 for a cell nobody fell into',
      });
    }
    row.forEach((count, j) => {
      if (!Number.isInteger(count) || count < 0) {
        throw dataProblem({
          code: count < 0 ? 'negative-count' : 'not-a-count',
          message: `${String(count)} is not a count`,
          place: `${place}, column "${columnLabels[j] ?? j + 1}"`,
          hint: 'counts are whole numbers from 0 upwards',
        });
      }
    });
  });
}

function checkLabels(side: 'row' | 'column', labels: readonly string[], length: number): void {
  if (labels.length !== length) {
    throw dataProblem({
      code: 'label-count',
      message: `${labels.length} ${side} labels for ${length} ${side}${length === 1 ? '' : 's'}`,
      hint: `give one label for each ${side}; a label that holds a comma goes in double quotes`,
    });
  }
  const seen = new Set<string>();
  for (const label of labels) {
    if (seen.has(label)) {
      throw dataProblem({
        code: 'duplicate-label',
        message: `two ${side}s have the label "${label}"`,
        hint: `make the ${side} labels different, or add the two ${side}s together first`,
      });
    }
    seen.add(label);
  }
}

/** Sum of counts; refuses to leave the range in which a double holds every whole number. */
export function addUp(counts: readonly number[]): number {
  let sum = 0;
  for (const count of counts) sum += count;
  if (sum > Number.MAX_SAFE_INTEGER) {
    throw dataProblem({
      code: 'count-overflow',
      message: `the counts add up to more than 2^53 - 1 (${Number.MAX_SAFE_INTEGER})`,
      hint: 'keepsum counts exactly up to that total; check for a column of identifiers read as counts',
    });
  }
  return sum;
}
