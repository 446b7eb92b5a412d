// What every page is: one file that needs no network and no script, whose policy allows none, with its record inside.
import { shown, shownJson } from '../../result/label-words.js';
import { element, escapedText, worded, type Markup } from './element.js';
import { style } from './style.js';

/** Where the record stands in the file, for whoever reads it back. */
export const recordId = 'keepsum-record';

export interface PageParts {
  readonly title: string;
  readonly main: readonly Markup[];
  /** Of the program. */
  readonly version: string;
  /** JSON text. */
  readonly record: string;
}

/** A whole document, ending in a line feed. */
export const htmlDocument = ({ title, main, version, record }: PageParts): string =>
  `<!doctype html>\n${element(
    'html',
    { lang: 'en' },
    element(
      'head',
      {},
      '<meta charset="utf-8">',
      '<meta name="viewport" content="width=device-width, initial-scale=1">',
      `<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'">`,
      element('title', {}, escapedText(shown(title))),
      `<style>${style}</style>`,
    ),
    element(
      'body',
      {},
      element(
        'main',
        {},
        ...main,
        worded(
          'footer',
          `Written by keepsum ${version}. This file holds the whole record, in its element "${recordId}", with every digit.`,
        ),
      ),
      recordElement(record),
    ),
  )}\n`;

/** No text in it can end the element: every < is spelled out, which JSON reads back as the same. */
const recordElement = (json: string): Markup =>
  `<script type="application/json" id="${recordId}">${shownJson(json.trimEnd()).replaceAll('<', '\\u003c')}</script>`;
