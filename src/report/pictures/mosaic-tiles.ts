// Where the tiles of a mosaic lie.
import { scaleLinear } from 'd3-scale';
import { countWords, digits } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Room } from './frame.js';

export interface Tile {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly count: number;
  /** Adjusted residual beyond 2 or 4: 1 or 2, with its sign; else 0. */
  readonly strength: -2 | -1 | 0 | 1 | 2;
  /** The cell in words. */
  readonly words: string;
}

export interface Band {
  readonly label: string;
  readonly middle: number;
  readonly tiles: readonly Tile[];
}

const gap = 2.5;
/** A band of few counts still shows. */
const thinnest = 3;

/** One band for each row with counts; empty rows have no area and are left out. */
export function bandsOf({ input, cells }: Result, { left, right, top, bottom }: Room): Band[] {
  const rows = input.rowLabels.map((_, i) => i).filter((i) => input.rowTotals[i]! > 0);
  const across = scaleLinear([0, 1], [0, right - left - gap * (input.columnLabels.length - 1)]);
  const heights = bandHeights(
    rows.map((i) => input.rowTotals[i]!),
    bottom - top - gap * (rows.length - 1),
  );
  let y = top;
  return rows.map((i, place) => {
    const height = heights[place]!;
    let x = left;
    const tiles = input.counts[i]!.map((count, j): Tile => {
      const width = across(count / input.rowTotals[i]!);
      const cell = cells?.[i * input.columnLabels.length + j];
      const residual = cell?.adjustedResidual ?? 0;
      const tile: Tile = {
        x,
        y,
        width,
        height,
        count,
        strength: strengthOf(residual),
        words: `${input.rowLabels[i]!}, ${input.columnLabels[j]!}: ${countWords(count)}${
          cell === undefined ? '' : `, expected ${digits(cell.expected, 3)}`
        }`,
      };
      x += width + gap;
      return tile;
    });
    const band = {
      label: input.rowLabels[i]!.trim() === '' ? '(blank)' : input.rowLabels[i]!,
      middle: y + height / 2,
      tiles,
    };
    y += height + gap;
    return band;
  });
}

/** In proportion, but none thinner than a line; the others give way. */
function bandHeights(totals: readonly number[], room: number): number[] {
  const least = Math.min(thinnest, room / totals.length);
  const all = totals.reduce((sum, total) => sum + total, 0);
  const isThin = totals.map((total) => (total / all) * room < least);
  const left = room - least * isThin.filter(Boolean).length;
  const thick = totals.reduce((sum, total, i) => (isThin[i] ? sum : sum + total), 0);
  return totals.map((total, i) => (isThin[i] ? least : (total / thick) * left));
}

const strengthOf = (residual: number): Tile['strength'] => {
  const size = Math.abs(residual) >= 4 ? 2 : Math.abs(residual) >= 2 ? 1 : 0;
  return (size === 0 ? 0 : residual > 0 ? size : -size) as Tile['strength'];
};
