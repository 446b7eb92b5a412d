// Words over several lines in a picture: captions and the key.
import { fold } from '../fold.js';
import { element, fontSize, label, type Markup } from './element.js';
import { pictureWidth } from './frame.js';

const lineHeight = 13;
const edge = 8;

export interface Written {
  readonly marks: readonly Markup[];
  /** Where the next thing may begin. */
  readonly bottom: number;
}

/** Mean advance of running text in the font, in ems: prose may be set closer than labels, whose width must be safe. */
const proseWidth = { normal: 0.57, bold: 0.65 };

const charactersAcross = (width: number, weight: keyof typeof proseWidth): number =>
  Math.floor(width / (proseWidth[weight] * fontSize));

/** A caption in bold at the top, folded. */
export function caption(words: string): Written {
  const lines = fold(words, charactersAcross(pictureWidth - 2 * edge, 'bold'));
  return {
    marks: lines.map((each, k) => label(edge, edge + fontSize + k * lineHeight, each, { 'font-weight': 'bold' })),
    bottom: edge + lines.length * lineHeight + 4,
  };
}

export interface KeyEntry {
  readonly words: string;
  /** Draws the sample within a box of 14 by 9 at this corner. */
  sample(x: number, y: number): Markup;
}

export function keyFor(entries: readonly KeyEntry[], top: number): Written {
  let y = top;
  const marks = entries.flatMap(({ words, sample }) => {
    const lines = fold(words, charactersAcross(pictureWidth - 2 * edge - 20, 'normal'));
    const drawn = element(
      'g',
      { class: 'keepsum-key' },
      sample(edge, y + 2),
      ...lines.map((each, k) => label(edge + 20, y + fontSize + k * lineHeight, each)),
    );
    y += lines.length * lineHeight;
    return [drawn];
  });
  return { marks, bottom: y + 4 };
}
