// SVG as text: elements with escaped attributes and words, so that no label can become markup.
import { shown } from '../../result/label-words.js';
import { cutTo, displayWidth } from '../display-width.js';
import { fold } from '../fold.js';

/** Markup that is already escaped. */
export type Markup = string;

type AttributeValue = string | number | undefined;

/** Text for element content and attribute values. Control characters are spelled out. */
export const escapedText = (text: string): Markup =>
  shown(text).replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');

/** A hundredth of a unit is below what any printer shows. */
const written = (value: string | number): string => {
  if (typeof value === 'string') return escapedText(value);
  if (!Number.isFinite(value)) throw new TypeError(`a picture has a coordinate ${value}`);
  return String(Math.round(value * 100) / 100);
};

export function element(
  name: string,
  attributes: Readonly<Record<string, AttributeValue>>,
  ...children: readonly Markup[]
): Markup {
  const listed = Object.entries(attributes)
    .filter((entry): entry is [string, string | number] => entry[1] !== undefined)
    .map(([key, value]) => ` ${key}="${written(value)}"`)
    .join('');
  return children.length === 0 ? `<${name}${listed}/>` : `<${name}${listed}>${children.join('')}</${name}>`;
}

/** Points of the font to a unit of the picture. */
export const fontSize = 10;
/** Mean advance of a character in the font, in ems, on the wide side. */
const characterWidth = 0.62;

export const textWidth = (words: string, size: number = fontSize): number =>
  displayWidth(shown(words)) * characterWidth * size;

/** Words cut with an ellipsis to a width in units. */
export const cutToWidth = (words: string, width: number, size: number = fontSize): string =>
  cutTo(shown(words), Math.max(1, Math.floor(width / (characterWidth * size))));

/** The same over several lines, of which the last is cut where there are more than `most`. */
export function foldToWidth(words: string, width: number, most: number): string[] {
  const columns = Math.max(1, Math.floor(width / (characterWidth * fontSize)));
  const lines = fold(shown(words), columns);
  if (lines.length <= most) return lines;
  return [...lines.slice(0, most - 1), cutTo(lines.slice(most - 1).join(' '), columns)];
}

export const lineHeight = 12;

/** Lines of words around a middle. */
export const labelAround = (
  x: number,
  middle: number,
  lines: readonly string[],
  attributes: Readonly<Record<string, AttributeValue>> = {},
): Markup[] =>
  lines.map((words, k) => label(x, middle + 3.5 + (k - (lines.length - 1) / 2) * lineHeight, words, attributes));

/** Words at a point, on one line. */
export const label = (
  x: number,
  y: number,
  words: string,
  attributes: Readonly<Record<string, AttributeValue>> = {},
): Markup => element('text', { x, y, class: 'keepsum-words', fill: ink, ...attributes }, escapedText(words));

/** Colours that eyes without red or green tell apart (Okabe & Ito 2008), and whose greys differ. */
export const ink = '#222222';
export const paper = '#ffffff';
export const quiet = '#c9c9c9';
export const quietEdge = '#777777';
export const blue = '#0072b2';
export const orange = '#d55e00';
