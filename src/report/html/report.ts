// The report as one file for a browser: the same page as the other formats, pictures and record inside. It needs no network
// and no script, and its policy allows none. Loaded only by runs that write it.
import { shown, shownJson } from '../../result/label-words.js';
import type { Result } from '../../result/result.js';
import { json } from '../json.js';
import { defaultSettings } from '../format.js';
import { pageFor, type Block, type Section, type Sentence } from '../page.js';
import { drawPicture, lackOf } from '../pictures/pictures.js';
import { element, escapedText, worded, type Markup } from './element.js';
import { style } from './style.js';
import { countsTable, gridTable } from './tables.js';

/** Where the record stands in the file, for whoever reads it back. */
export const recordId = 'keepsum-record';

/**
 * One or more results as an HTML document, ending in a line feed. Its record is in the element `#keepsum-record`: one result as in
 * the json format, or a list where there are several.
 */
export function htmlReport(results: readonly Result[]): string {
  const alone = results.length === 1;
  const articles = results.map((result, k) => articleFor(result, k, alone));
  const title = alone ? pageFor(results[0]!).title : `${results.length} tests of association`;
  return `<!doctype html>\n${element(
    'html',
    { lang: 'en' },
    element(
      'head',
      {},
      '<meta charset="utf-8">',
      '<meta name="viewport" content="width=device-width, initial-scale=1">',
      `<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'">`,
      worded('title', shown(title)),
      `<style>${style}</style>`,
    ),
    element(
      'body',
      {},
      element('main', {}, ...(alone ? [] : [worded('h1', title), contents(results)]), ...articles, footer(results)),
      record(results),
    ),
  )}\n`;
}

/** The names of what stands in a table of the report tell it from those of other results. */
const nameOf = (result: Result, k: number): string => `${k + 1}. ${pageFor(result).title}`;

const contents = (results: readonly Result[]): Markup =>
  element(
    'nav',
    { 'aria-label': 'Tests' },
    element(
      'ul',
      {},
      ...results.map((result, k) =>
        element(
          'li',
          {},
          element('a', { href: `#test-${k + 1}` }, escapedText(nameOf(result, k))),
          `: ${escapedText(result.sentence)}`,
        ),
      ),
    ),
  );

function articleFor(result: Result, k: number, alone: boolean): Markup {
  const [heading, below] = alone ? ['h1', 'h2'] : ['h2', 'h3'];
  const { title, sections } = pageFor(result);
  const place = alone ? '' : ` of test ${k + 1}`;
  const methods: Section = {
    heading: 'For a methods section',
    blocks: [{ kind: 'sentence', text: shown(result.methods), tone: 'plain' }],
  };
  return element(
    'article',
    { id: `test-${k + 1}` },
    worded(heading!, alone ? title : nameOf(result, k)),
    ...[...sections, methods].map((section) =>
      element(
        'section',
        {},
        worded(below!, section.heading),
        ...section.blocks.map((block) => blockMarkup(block, section, result, k, place)),
      ),
    ),
  );
}

function blockMarkup(block: Block, section: Section, result: Result, k: number, place: string): Markup {
  switch (block.kind) {
    case 'sentence':
      return paragraph(block);
    case 'table':
      return countsTable(result.input, place);
    case 'grid':
      return gridTable(block, `${section.heading}${place}`);
    case 'command':
      return element('pre', {}, worded('code', block.words.join(' ')));
    case 'picture':
      return lackOf(result, block.picture) === undefined
        ? element('figure', {}, drawPicture(result, block.picture, `test-${k + 1}-${block.picture}`))
        : '';
  }
}

const paragraph = ({ text, tone }: Sentence): Markup => worded('p', text, tone === 'plain' ? {} : { class: tone });

const footer = (results: readonly Result[]): Markup =>
  worded(
    'footer',
    `Written by keepsum ${results[0]!.tool.version}. This file holds the whole record, in its element "${recordId}", with every digit.`,
  );

/** No text in it can end the element: every < is spelled out, which JSON reads back as the same. */
function record(results: readonly Result[]): Markup {
  const each = results.map((result) => json.write(result, defaultSettings).trimEnd());
  const whole = results.length === 1 ? each[0]! : `[${each.join(',\n')}]`;
  return `<script type="application/json" id="${recordId}">${shownJson(whole).replaceAll('<', '\\u003c')}</script>`;
}
