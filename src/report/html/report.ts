// The report as one file for a browser: the same page as the other formats, pictures and record inside. Loaded only by runs
// that write it.
import { sourcesUsed } from '../../result/citations.js';
import { shown } from '../../result/label-words.js';
import type { Result } from '../../result/result.js';
import { asText } from '../../result/sources/source.js';
import { json } from '../json.js';
import { defaultSettings } from '../format.js';
import { marksOf } from '../marks.js';
import { pageFor, type Section } from '../page.js';
import { drawPicture, lackOf } from '../pictures/pictures.js';
import { htmlDocument } from './document.js';
import { element, escapedWords, worded, type Markup } from './element.js';
import { sectionMarkup, type DrawnBlock } from './sections.js';
import { countsTable } from './tables.js';

/**
 * One or more results as an HTML document, ending in a line feed. Its record is in the element `#keepsum-record`: one result as in
 * the json format, or a list where there are several.
 */
export function htmlReport(results: readonly Result[]): string {
  const alone = results.length === 1;
  const title = alone ? pageFor(results[0]!).title : `${results.length} tests of association`;
  return htmlDocument({
    title,
    main: [...(alone ? [] : [worded('h1', title), contents(results)]), ...articles(results, alone)],
    version: results[0]!.tool.version,
    record: recordOf(results),
  });
}

/** @param alone its title is that of the page */
export const articles = (results: readonly Result[], alone: boolean): Markup[] =>
  results.map((result, k) => articleFor(result, k, alone));

/** The names of what stands in a table of the report tell it from those of other results. */
const nameOf = (result: Result, k: number): string => `${k + 1}. ${pageFor(result).title}`;

/** Links to all, each with its sentence. */
export const contents = (results: readonly Result[]): Markup =>
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
          element('a', { href: `#test-${k + 1}` }, escapedWords(nameOf(result, k))),
          `: ${escapedWords(result.sentence)}`,
        ),
      ),
    ),
  );

function articleFor(result: Result, k: number, alone: boolean): Markup {
  const [heading, below] = alone ? (['h1', 'h2'] as const) : (['h2', 'h3'] as const);
  const { title, sections } = pageFor(result);
  const place = alone ? '' : ` of test ${k + 1}`;
  const draw = (block: DrawnBlock): Markup => {
    if (block.kind === 'table') return countsTable(result.input, place, marksOf(result));
    return lackOf(result, block.picture) === undefined
      ? element('figure', {}, drawPicture(result, block.picture, `test-${k + 1}-${block.picture}`))
      : '';
  };
  const methods: Section = {
    heading: 'For a methods section',
    blocks: [{ kind: 'sentence', text: shown(result.methods), tone: 'plain' }],
  };
  return element(
    'article',
    { id: `test-${k + 1}` },
    worded(heading, alone ? title : nameOf(result, k)),
    ...[...sections, methods].map((section) => sectionMarkup(section, below, place, draw)),
    sourcesOf(result, below),
  );
}

/** What the methods paragraph cites, in full. */
function sourcesOf(result: Result, heading: string): Markup {
  const used = sourcesUsed(result);
  if (used.length === 0) return '';
  const items = used.map((source) => worded('li', asText(source)));
  return element('section', {}, worded(heading, 'Sources'), element('ul', { class: 'sources' }, ...items));
}

function recordOf(results: readonly Result[]): string {
  const each = results.map((result) => json.write(result, defaultSettings).trimEnd());
  return results.length === 1 ? each[0]! : `[${each.join(',\n')}]`;
}
