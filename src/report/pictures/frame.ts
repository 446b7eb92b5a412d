// What every picture has in common: its size, its names for those who listen, its font, its axes.
import type { ScaleContinuousNumeric } from 'd3-scale';
import { element, escapedText, fontSize, ink, label, paper, textWidth, type Markup } from './element.js';

/** Units across; set to 85 mm, the width of a column, a unit is a quarter of a millimetre. */
export const pictureWidth = 340;
const millimetres = 85;

export interface Picture {
  /** A short name, and the whole of it in words, for those who cannot see it. */
  readonly title: string;
  readonly description: string;
  readonly height: number;
  readonly marks: readonly Markup[];
}

/** A whole SVG document. @param id parts the names inside from those of other pictures on the same page. */
export function svgDocument({ title, description, height, marks }: Picture, id: string): string {
  return element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      viewBox: `0 0 ${pictureWidth} ${Math.ceil(height)}`,
      width: `${millimetres}mm`,
      height: `${Math.round(((Math.ceil(height) * millimetres) / pictureWidth) * 100) / 100}mm`,
      role: 'img',
      'aria-labelledby': `${id}-title ${id}-description`,
      'font-family': "'DejaVu Sans', Verdana, sans-serif",
      'font-size': fontSize,
      class: 'keepsum-picture',
    },
    element('title', { id: `${id}-title` }, escapedText(title)),
    element('desc', { id: `${id}-description` }, escapedText(description)),
    element('rect', { class: 'keepsum-paper', width: pictureWidth, height: Math.ceil(height), fill: paper }),
    ...marks,
  );
}

export interface Room {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

const line = (x1: number, y1: number, x2: number, y2: number, attributes: object = {}): Markup =>
  element('line', { x1, y1, x2, y2, class: 'keepsum-line', stroke: ink, 'stroke-width': 0.8, ...attributes });

export interface Tick {
  readonly at: number;
  readonly words: string;
}

/** Ticks with words that do not run into each other. */
export function ticksOf(
  scale: ScaleContinuousNumeric<number, number>,
  wanted: number,
  along: 'across' | 'up' = 'across',
): Tick[] {
  for (let number = wanted; ; number--) {
    const write = scale.tickFormat(number);
    const ticks = scale.ticks(number).map((value) => ({ at: scale(value), words: write(value).replace('−', '-') }));
    const fits = ticks.every(({ at, words }, k) => {
      const next = ticks[k + 1];
      return (
        next === undefined ||
        Math.abs(next.at - at) > (along === 'up' ? fontSize : (textWidth(words) + textWidth(next.words)) / 2 + 4)
      );
    });
    if (fits || number <= 2) return ticks;
  }
}

/** Along the bottom of the room. */
export const bottomAxis = ({ left, right, bottom }: Room, ticks: readonly Tick[], words: string): Markup =>
  element(
    'g',
    { class: 'keepsum-axis' },
    line(left, bottom, right, bottom),
    ...ticks.flatMap(({ at, words: tick }) => [
      line(at, bottom, at, bottom + 4),
      label(at, bottom + 14, tick, { 'text-anchor': 'middle' }),
    ]),
    label((left + right) / 2, bottom + 28, words, { 'text-anchor': 'middle' }),
  );

/** Up the left side of the room, its words along it. */
export const leftAxis = ({ left, top, bottom }: Room, ticks: readonly Tick[], words: string): Markup =>
  element(
    'g',
    { class: 'keepsum-axis' },
    line(left, top, left, bottom),
    ...ticks.flatMap(({ at, words: tick }) => [
      line(left - 4, at, left, at),
      label(left - 6, at + 3.5, tick, { 'text-anchor': 'end' }),
    ]),
    label(12, (top + bottom) / 2, words, {
      'text-anchor': 'middle',
      transform: `rotate(-90 12 ${(top + bottom) / 2})`,
    }),
  );

/** Where the left axis stands so that its ticks and words have room. */
export const leftOf = (ticks: readonly Tick[]): number =>
  26 + Math.max(0, ...ticks.map(({ words }) => textWidth(words)));

export { line };
