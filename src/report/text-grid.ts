// A small table of words and numbers for a given width; where it does not fit side by side, each row becomes a sentence under its name.
import { displayWidth, padLeft, padRight } from './display-width.js';
import { fold } from './fold.js';
import type { Grid } from './page.js';

/** Spaces between columns: the first that fits is taken. */
const gaps = [3, 2];

/** Lines of at most `width` columns; words that are wider than a line are broken. */
export function gridLines({ headings, rows }: Grid, width: number): string[] {
  const widths = headings.map((heading, j) =>
    Math.max(displayWidth(heading), ...rows.map((row) => displayWidth(row[j]!))),
  );
  const whole = widths.reduce((sum, each) => sum + each, 0);
  const gap = gaps.find((spaces) => whole + spaces * (widths.length - 1) <= width);
  if (gap === undefined) return rows.flatMap((row) => listLines(headings, row, width));
  const laid = (cells: readonly string[]): string =>
    cells
      .map((cell, j) => (j === 0 ? padRight(cell, widths[j]!) : padLeft(cell, widths[j]! + gap)))
      .join('')
      .trimEnd();
  return [laid(headings), ...rows.map(laid)];
}

/** The name, and below it the cells with their headings, one after the other. */
function listLines(headings: readonly string[], [name, ...cells]: readonly string[], width: number): string[] {
  const said = cells.flatMap((cell, j) =>
    cell === '' ? [] : [`${headings[j + 1] === '' ? '' : `${headings[j + 1]!}: `}${cell}`],
  );
  return [...fold(name!, width), ...(said.length === 0 ? [] : fold(said.join('; '), width, { first: 2, rest: 2 }))];
}
