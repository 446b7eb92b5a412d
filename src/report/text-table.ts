// Lays out the table of counts with its margins for a given width: aligned, wide tables folded into groups of columns,
// long labels cut. Totals are ruled off as in an account book.
import { shown } from '../result/label-words.js';
import { countWords } from '../result/number-words.js';
import type { InputEcho } from '../result/result.js';
import { cutInside, cutTo, displayWidth, padLeft, padRight } from './display-width.js';
import type { Mark, Marks } from './marks.js';

const totalsLabel = 'all';
/** How wide a label may be, from generous to tight: the first that needs no folding is taken. */
const rowLabelLimits = [48, 24, 16];
const headingLimits = [32, 20, 14, 10];
/** Below this, columns stand closer and headings are cut shorter. */
const narrow = 60;

interface Column {
  readonly heading: string;
  readonly counts: readonly string[];
  /** Columns of the terminal that the widest count takes. */
  readonly countWidth: number;
}

/** How close things may stand at a given width of the page. */
interface Spacing {
  /** Spaces between columns. */
  readonly gap: number;
  /** Where the table must be folded, headings are cut no shorter than this. */
  readonly foldedHeading: number;
}

const spacingFor = (width: number): Spacing =>
  width < narrow ? { gap: 2, foldedHeading: 8 } : { gap: 3, foldedHeading: 12 };

/** Lines of at most `width` columns (from 38: a count of 16 digits, set in threes, beside a label). Marks stand behind the counts. */
export function tableLines(input: InputEcho, width: number, marks?: Marks): string[] {
  const spacing = spacingFor(width);
  const rowLabels = [...input.rowLabels.map(labelWords), totalsLabel];
  const columns = columnsOf(input, marks);
  const labelsWhole = widest(rowLabels);
  for (const limit of rowLabelLimits) {
    const labelWidth = Math.min(labelsWhole, limit);
    const widths = widthsWithin(columns, width - labelWidth, spacing.gap, headingLimits);
    if (widths !== undefined) return linesOf(rowLabels, labelWidth, columns, widths, spacing.gap);
  }
  const countsWide = Math.max(spacing.foldedHeading, ...columns.map((column) => column.countWidth));
  const labelWidth = Math.min(labelsWhole, 24, Math.floor(width * 0.4), width - spacing.gap - countsWide);
  return foldedLines(rowLabels, labelWidth, columns, width - labelWidth, spacing);
}

/** A label fit for a table: nothing that acts on the terminal, nothing invisible. */
const labelWords = (label: string): string => (label.trim() === '' ? '(blank)' : shown(label));

const widest = (labels: readonly string[]): number => Math.max(...labels.map(displayWidth));

function columnsOf(input: InputEcho, marks: Marks | undefined): Column[] {
  const column = (
    heading: string,
    counts: readonly number[],
    impossible: readonly (boolean | undefined)[] = [],
    signs: readonly Mark[] = [],
  ): Column => {
    // Counts of a column stay under each other whether a sign follows or not.
    const behind = signs.some((sign) => sign !== '') ? 2 : 0;
    const words = counts.map((n, i) => {
      const sign = signs[i] ?? '';
      return (impossible[i] ? '-' : countWords(n)) + padRight(sign === '' ? '' : ` ${sign}`, behind);
    });
    return { heading, counts: words, countWidth: widest(words) };
  };
  return [
    ...input.columnLabels.map((label, j) =>
      column(
        labelWords(label),
        [...input.counts.map((row) => row[j]!), input.columnTotals[j]!],
        input.impossible?.map((row) => row[j]),
        marks?.map((row) => row[j]!),
      ),
    ),
    column(totalsLabel, [...input.rowTotals, input.total]),
  ];
}

/** Column widths under the first limit on headings with which all fit into the room; undefined when none does. */
function widthsWithin(
  columns: readonly Column[],
  room: number,
  gap: number,
  limits: readonly number[],
): number[] | undefined {
  return limits
    .map((limit) => columns.map((column) => columnWidth(column, limit)))
    .find((widths) => widths.reduce((sum, width) => sum + gap + width, 0) <= room);
}

const columnWidth = ({ heading, countWidth }: Column, limit: number): number =>
  Math.max(countWidth, Math.min(displayWidth(heading), limit));

function foldedLines(
  rowLabels: readonly string[],
  labelWidth: number,
  columns: readonly Column[],
  room: number,
  { gap, foldedHeading }: Spacing,
): string[] {
  const limits = [...headingLimits.filter((limit) => limit > foldedHeading), foldedHeading];
  const tight = columns.map((column) => columnWidth(column, foldedHeading));
  return columnGroups(tight, room, gap).flatMap(({ from, to }, place) => {
    const group = columns.slice(from, to);
    const widths = widthsWithin(group, room, gap, limits) ?? tight.slice(from, to);
    return [
      ...(place === 0 ? [] : ['']),
      whichColumns(from, to, columns.length - 1),
      ...linesOf(rowLabels, labelWidth, group, widths, gap),
    ];
  });
}

interface Range {
  readonly from: number;
  /** First one after. */
  readonly to: number;
}

/** The columns that stand side by side, as many as fit, at least one. */
function columnGroups(widths: readonly number[], room: number, gap: number): Range[] {
  const starts = [0];
  let used = 0;
  widths.forEach((width, j) => {
    if (used + gap + width > room && j > 0) {
      starts.push(j);
      used = 0;
    }
    used += gap + width;
  });
  return starts.map((from, i) => ({ from, to: starts[i + 1] ?? widths.length }));
}

/** The last column is that of the row totals. */
function whichColumns(from: number, to: number, columns: number): string {
  if (from >= columns) return 'row totals';
  const last = Math.min(to, columns);
  return last === from + 1 ? `column ${last} of ${columns}` : `columns ${from + 1} to ${last} of ${columns}`;
}

function linesOf(
  rowLabels: readonly string[],
  labelWidth: number,
  columns: readonly Column[],
  widths: readonly number[],
  gap: number,
): string[] {
  const laid = (label: string, cells: readonly string[]): string =>
    padRight(label, labelWidth) + cells.map((cell, j) => ' '.repeat(gap) + padLeft(cell, widths[j]!)).join('');
  const columnHeadings = columns.map(({ heading }) => heading);
  const headings = cutApart(columnHeadings, (j) => widths[j]!);
  const rows = cutApart(rowLabels, () => labelWidth).map((label, i) => {
    const counts = columns.map((column) => column.counts[i]!);
    return laid(label, counts);
  });
  const rule = widths.map((width) => '-'.repeat(width));
  return [laid('', headings), ...rows.slice(0, -1), laid('', rule), rows.at(-1)!];
}

/** Cut at the end; labels that would then look alike are cut inside, and numbered where even that is not enough. */
function cutApart(labels: readonly string[], widthOf: (index: number) => number): string[] {
  const parted = (cut: string[], otherwise: (label: string, index: number) => string): string[] =>
    cut.map((text, i) => (cut.indexOf(text) === cut.lastIndexOf(text) ? text : otherwise(labels[i]!, i)));
  const atEnd = labels.map((label, i) => cutTo(label, widthOf(i)));
  const inside = parted(atEnd, (label, i) => cutInside(label, widthOf(i)));
  return parted(inside, (label, i) => cutTo(`${i + 1}: ${label}`, widthOf(i)));
}
