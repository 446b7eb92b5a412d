// The table as a mosaic (Hartigan & Kleiner 1981): each row a band as high as its share of all, parted by the shares of its
// columns; cells far from what independence expects are marked by hatching and by signs (Friendly 1994).
import { countWords } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import {
  blue,
  cutToWidth,
  element,
  escapedText,
  foldToWidth,
  ink,
  label,
  labelAround,
  lineHeight,
  orange,
  paper,
  quiet,
  quietEdge,
  textWidth,
  type Markup,
} from './element.js';
import { line, pictureWidth, type Picture } from './frame.js';
import { residualHatching } from './hatching.js';
import { spreadLabels } from './spread-labels.js';
import { bandsOf, type Band, type Tile } from './mosaic-tiles.js';
import { caption, keyFor, type KeyEntry } from './words.js';

/** The sign itself: a hyphen is too short to be seen on hatching. */
const minus = '\u2212';
const leastHeight = 170;
/** Of one row, where there are many. */
const heightOfRow = 15;
/** More make no picture that anybody could read. */
export const mostRows = 60;
export const mostColumns = 30;
/** Widest row label, in units. */
const widestLabel = 90;
/** Labels wider than their place stand on their side, unless it is as wide as this. */
const uprightLabel = 70;
const right = pictureWidth - 10;

/** @param id as of the document: names the hatching. */
export function mosaic(result: Result, id: string): Picture {
  const { input } = result;
  const hasResiduals = result.cells !== undefined;
  const title = hasResiduals ? 'Counts as areas, marked by adjusted residuals' : 'Counts as areas, row by row';
  const head = caption(title);
  const ring = input.counts.some((row) => row.includes(0)) ? [ringEntry] : [];
  const key = keyFor([...(hasResiduals ? keyEntries(id) : [plainEntry]), ...ring], head.bottom);
  const left = 18 + Math.min(widestLabel, Math.max(...input.rowLabels.map((words) => textWidth(words || '(blank)'))));
  const columns = columnLabels(result, left, key.bottom);
  const height = Math.max(leastHeight, heightOfRow * input.rowLabels.length);
  const bands = bandsOf(result, { left, right, top: columns.bottom, bottom: columns.bottom + height });
  return {
    title: 'Mosaic of the table',
    description: describe(result),
    height: columns.bottom + height + 10,
    marks: [
      residualHatching(id),
      ...head.marks,
      ...key.marks,
      ...columns.marks(bands.find(({ tiles }) => tiles.length > 0)!.tiles),
      ...bandLabels(bands, left, columns.bottom, columns.bottom + height),
      ...bands.flatMap(({ tiles }) => tiles.map((tile) => tileMark(tile, id))),
    ],
  };
}

/** Beside their bands, moved apart where bands are thin, each then with a line to its own. */
function bandLabels(bands: readonly Band[], left: number, top: number, bottom: number): Markup[] {
  const folded = bands.map(({ label: words, tiles }) => foldToWidth(words, left - 14, linesIn(tiles[0]!.height)));
  const places = spreadLabels(
    bands.map(({ middle }) => middle),
    folded.map((lines) => lines.length * lineHeight),
    top,
    bottom,
  );
  return bands.flatMap(({ middle }, k) => {
    const y = places[k]!;
    const leader = line(left - 8, y, left - 1, middle, { stroke: quietEdge, 'stroke-width': 0.6 });
    return [
      ...labelAround(left - 10, y, folded[k]!, { 'text-anchor': 'end' }),
      ...(Math.abs(y - middle) > 2 ? [leader] : []),
    ];
  });
}

/** Of the label of a band: as many as it is high, up to three. */
const linesIn = (high: number): number => Math.max(1, Math.min(3, Math.floor(high / lineHeight)));

const ringEntry: KeyEntry = { words: 'no counts', sample: (x, y) => ring(x + 7, y + 4.5) };

const plainEntry: KeyEntry = {
  words: 'areas are counts; residuals of cells were not worked out',
  sample: (x, y) => element('rect', { x, y, width: 14, height: 9, fill: quiet, stroke: quietEdge }),
};

const keyEntries = (id: string): KeyEntry[] => {
  const pair =
    (first: string, second: string, stroke: string): KeyEntry['sample'] =>
    (x, y) =>
      element('rect', { x, y, width: 7, height: 9, fill: `url(#${id}-${first})`, stroke, 'stroke-width': 0.8 }) +
      element('rect', { x: x + 7, y, width: 7, height: 9, fill: `url(#${id}-${second})`, stroke, 'stroke-width': 0.8 });
  return [
    { words: '+ more than expected: residual 2 to 4; ++ from 4', sample: pair('more-1', 'more-2', blue) },
    {
      words: `${minus} fewer than expected: ${minus}2 to ${minus}4; ${minus}${minus} from ${minus}4`,
      sample: pair('fewer-1', 'fewer-2', orange),
    },
  ];
};

function describe({ input, cells, sentence }: Result): string {
  const far = (cells ?? []).filter(({ adjustedResidual }) => Math.abs(adjustedResidual ?? 0) >= 2);
  const named = far.map(
    ({ row, column, count, adjustedResidual }) =>
      `${row}, ${column}: ${countWords(count)}, ${adjustedResidual! > 0 ? 'more' : 'fewer'} than expected`,
  );
  return `A ${input.rowLabels.length} by ${input.columnLabels.length} table of ${countWords(input.total)} counts drawn as areas. ${
    named.length === 0 ? 'No cell has an adjusted residual beyond 2.' : `Marked cells: ${named.join('; ')}.`
  } ${sentence}`;
}

interface ColumnLabels {
  readonly bottom: number;
  marks(tiles: readonly Tile[]): Markup[];
}

/** Labels in places of equal width, each with a line to its part of the first band; on their side where places are narrow. */
function columnLabels({ input }: Result, left: number, top: number): ColumnLabels {
  const labels = input.columnLabels.map((words) => (words.trim() === '' ? '(blank)' : words));
  const place = (right - left) / labels.length;
  const widest = Math.max(...labels.map((words) => textWidth(words)));
  const isUpright = widest <= place - 4 || place >= uprightLabel;
  const upright = labels.map((words) => foldToWidth(words, place - 4, 2));
  const room = isUpright
    ? 2 + lineHeight * Math.max(...upright.map((lines) => lines.length))
    : Math.min(70, widest + 4);
  const leader = 12;
  return {
    bottom: top + room + leader,
    marks: (tiles) =>
      labels.flatMap((words, j) => {
        const x = left + (j + 0.5) * place;
        const tile = tiles[j]!;
        const middle = top + room - 1 - (upright[j]!.length * lineHeight) / 2;
        return [
          ...(isUpright
            ? labelAround(x, middle, upright[j]!, { 'text-anchor': 'middle' })
            : [
                label(x + 3.5, top + room, cutToWidth(words, room), {
                  transform: `rotate(-90 ${(x + 3.5).toFixed(2)} ${(top + room).toFixed(2)})`,
                }),
              ]),
          line(x, top + room + 1, tile.x + tile.width / 2, top + room + leader - 2, {
            stroke: quietEdge,
            'stroke-width': 0.6,
          }),
        ];
      }),
  };
}

const ring = (cx: number, cy: number, ...inside: Markup[]): Markup =>
  element('circle', { class: 'keepsum-none', cx, cy, r: 2.4, fill: paper, stroke: ink }, ...inside);

function tileMark({ x, y, width, height: high, count, strength, words }: Tile, id: string): Markup {
  const title = element('title', {}, escapedText(words));
  if (count === 0 || width <= 0.8) {
    return ring(x + width / 2, y + high / 2, title);
  }
  const fill = strength === 0 ? quiet : `url(#${id}-${strength > 0 ? 'more' : 'fewer'}-${Math.abs(strength)})`;
  const stroke = strength === 0 ? quietEdge : strength > 0 ? blue : orange;
  const sign = (strength > 0 ? '+' : minus).repeat(Math.abs(strength));
  const full = `${countWords(count)}${sign === '' ? '' : ` ${sign}`}`;
  const inside = [full, sign].find((text) => text !== '' && textWidth(text) + 4 <= width && high >= 13);
  return element(
    'g',
    { class: 'keepsum-cell' },
    title,
    element('rect', {
      class: 'keepsum-tile',
      x,
      y,
      width,
      height: high,
      fill,
      stroke,
      'stroke-width': strength === 0 ? 0.6 : 1.2,
    }),
    inside === undefined ? '' : plate(inside, x + width / 2, y + high / 2, strength !== 0),
  );
}

/** Words on a patch of paper, so that hatching does not cross them. */
function plate(words: string, x: number, y: number, onHatching: boolean): Markup {
  const wide = textWidth(words) + 3;
  return (
    (onHatching
      ? element('rect', {
          class: 'keepsum-paper',
          x: x - wide / 2,
          y: y - 6.5,
          width: wide,
          height: 13,
          fill: paper,
          rx: 2,
        })
      : '') +
    label(x, y + 3.6, words, {
      'text-anchor': 'middle',
      class: onHatching ? 'keepsum-words' : 'keepsum-on-tile',
      ...(onHatching ? { 'font-weight': 'bold' } : {}),
    })
  );
}
