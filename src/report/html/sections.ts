// Sections of a page as markup: a heading, then its blocks. What only some pages hold is drawn by whoever writes that page.
import type { Block, PicturePlace, Section, TablePlace } from '../page.js';
import { element, worded, type Markup } from './element.js';
import { gridTable } from './tables.js';

/** Blocks that need more than their own words. */
export type DrawnBlock = TablePlace | PicturePlace;

/**
 * @param heading the element of its heading
 * @param place tells its tables from those of other parts of the page
 * @param after what follows its blocks
 */
export const sectionMarkup = (
  { heading: words, blocks }: Section,
  heading: 'h2' | 'h3',
  place: string,
  draw: (block: DrawnBlock) => Markup = () => '',
  ...after: readonly Markup[]
): Markup =>
  element(
    'section',
    {},
    worded(heading, words),
    ...blocks.map((block, k) => blockMarkup(block, `${words}${whichGrid(blocks, k)}${place}`, draw)),
    ...after,
  );

/** Tables of one section have names of their own. */
function whichGrid(blocks: readonly Block[], k: number): string {
  const before = blocks.slice(0, k).filter(({ kind }) => kind === 'grid').length;
  return before === 0 ? '' : `, table ${before + 1}`;
}

function blockMarkup(block: Block, name: string, draw: (block: DrawnBlock) => Markup): Markup {
  switch (block.kind) {
    case 'sentence':
      return worded('p', block.text, block.tone === 'plain' ? {} : { class: block.tone });
    case 'grid':
      return gridTable(block, name);
    case 'endings':
      return (
        worded('p', block.start) +
        element(
          'ul',
          { class: 'endings' },
          ...block.endings.map(({ number, words }) => worded('li', `${number} ${words}`)),
        )
      );
    case 'command':
      return element('pre', {}, worded('code', block.words.join(' ')));
    default:
      return draw(block);
  }
}
