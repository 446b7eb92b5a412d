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

/** A tag around words. */
export const worded = (name: string, words: string, attributes: Readonly<Record<string, string>> = {}): Markup =>
  element(name, attributes, escapedText(words));
