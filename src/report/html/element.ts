// HTML as text. Labels are text and nothing else: what could become markup is escaped, control characters spelled out.
import { shown } from '../../result/label-words.js';

/** Markup that is already escaped. */
export type Markup = string;

export const escapedText = (text: string): Markup =>
  shown(text)
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');

/** A tag with escaped attributes around markup. */
export function element(
  name: string,
  attributes: Readonly<Record<string, string | undefined>>,
  ...inside: Markup[]
): Markup {
  const listed = Object.entries(attributes)
    .filter((entry): entry is [string, string] => entry[1] !== undefined)
    .map(([key, value]) => ` ${key}="${escapedText(value)}"`)
    .join('');
  return `<${name}${listed}>${inside.join('')}</${name}>`;
}

const rightToLeft = String.raw`[\p{Script=Hebrew}\p{Script=Arabic}\p{Script=Syriac}\p{Script=Thaana}\p{Script=Nko}]`;
/** Letters written from the right, with what stands between them and the brackets around. */
const rightToLeftRun = new RegExp(`[([{]?${rightToLeft}(?:[^\\p{L}&;]*${rightToLeft})*[)\\]}]?`, 'gu');

/** Text for running words. What is written from right to left is set apart, so that it does not carry the numbers beside it along. */
export const escapedWords = (words: string): Markup =>
  escapedText(words).replace(rightToLeftRun, (run) => `<bdi>${run}</bdi>`);

/** A tag around words. */
export const worded = (name: string, words: string, attributes: Readonly<Record<string, string>> = {}): Markup =>
  element(name, attributes, escapedWords(words));
